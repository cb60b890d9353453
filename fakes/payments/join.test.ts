import { expect, onTestFinished, test } from 'vitest';
import { openKit, openSession, openShop, START, DAY, type Kit } from './test-kit.ts';

async function setUp() {
  const kit = await openKit();
  onTestFinished(kit.close);
  const shop = await openShop(kit);
  return { kit, shop };
}

const open = async (kit: Kit, id: string) => (await kit.stripe.checkout.sessions.retrieve(id)).status;

test('a good card joins: subscription, paid invoice, card on file, events, and back to the product', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop);
  const page = await kit.get(new URL(session.url ?? '').pathname);
  expect(page.text).toContain('Payment stand-in: no real money moves');
  expect(page.text).toContain('€39.00 each month');
  expect(page.text).toContain('next on 1 Jan 2027');

  const reply = await kit.post(`/pay/${session.id}`, { card: 'succeeds', number: '' });
  expect(reply.status).toBe(303);
  expect(reply.headers.get('location')).toBe(`http://product.test/join/payment?session=${session.id}`);

  const done = await kit.stripe.checkout.sessions.retrieve(session.id, {
    expand: ['subscription.latest_invoice.payments', 'line_items', 'customer'],
  });
  expect(done).toMatchObject({
    status: 'complete',
    payment_status: 'paid',
    amount_total: 3900,
    client_reference_id: 'member-1',
    customer: { email: 'edda@example.test' },
    line_items: { data: [{ quantity: 1, amount_total: 3900 }] },
    subscription: {
      status: 'active',
      trial_end: null,
      items: { data: [{ current_period_start: START, current_period_end: Date.UTC(2027, 0, 1, 12) / 1000 }] },
      latest_invoice: {
        status: 'paid',
        amount_paid: 3900,
        billing_reason: 'subscription_create',
        payments: { data: [{ status: 'paid', payment: { type: 'payment_intent' } }] },
      },
    },
  });
  const customer = await kit.stripe.customers.retrieve(shop.customer.id, {
    expand: ['invoice_settings.default_payment_method'],
  });
  expect(customer).toMatchObject({
    invoice_settings: { default_payment_method: { card: { last4: '4242' } } },
  });

  await kit.payments.idle();
  expect(kit.types()).toEqual(
    expect.arrayContaining([
      'customer.subscription.created',
      'invoice.paid',
      'invoice.payment_succeeded',
      'checkout.session.completed',
    ]),
  );
  const again = await kit.post(`/pay/${session.id}`, { card: 'succeeds' });
  expect(again.headers.get('location')).toContain(session.id);
  expect((await kit.stripe.subscriptions.list({ customer: shop.customer.id })).data).toHaveLength(1);
});

test('a declined card keeps the page open and leaves nothing behind; another card then joins', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop);
  const refused = await kit.post(`/pay/${session.id}`, { number: '4000 0000 0000 0002' });
  expect(refused.status).toBe(422);
  expect(await refused.text()).toContain('The card was declined. Nothing was charged.');
  expect(await open(kit, session.id)).toBe('open');
  expect((await kit.stripe.subscriptions.list({ customer: shop.customer.id, status: 'all' })).data).toEqual(
    [],
  );
  expect((await kit.stripe.invoices.list({ customer: shop.customer.id })).data).toEqual([]);
  await kit.post(`/pay/${session.id}`, { number: '4242424242424242' });
  expect(await open(kit, session.id)).toBe('complete');
});

test('a declined card starts no free trial either', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop, 14);
  expect((await kit.post(`/pay/${session.id}`, { card: 'declined' })).status).toBe(422);
  expect(await open(kit, session.id)).toBe('open');
});

test('a card that needs authentication asks the bank; refused stays open, approved joins', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop, 14);
  const toBank = await kit.post(`/pay/${session.id}`, { card: 'authenticate', number: '' });
  expect(toBank.headers.get('location')).toBe(`/pay/${session.id}/authenticate`);
  expect((await kit.get(`/pay/${session.id}/authenticate`)).text).toContain('Your bank asks: is this you?');

  const no = await kit.post(`/pay/${session.id}/authenticate`, { answer: 'refuse' });
  expect(no.headers.get('location')).toBe(`/pay/${session.id}?said=refused`);
  expect((await kit.get(`/pay/${session.id}?said=refused`)).text).toContain('The bank was told no.');
  expect(await open(kit, session.id)).toBe('open');

  await kit.post(`/pay/${session.id}`, { card: 'authenticate', number: '' });
  const yes = await kit.post(`/pay/${session.id}/authenticate`, { answer: 'approve' });
  expect(yes.headers.get('location')).toContain('http://product.test/join/payment');
  const done = await kit.stripe.checkout.sessions.retrieve(session.id, { expand: ['subscription'] });
  expect(done).toMatchObject({
    payment_status: 'no_payment_required',
    subscription: { status: 'trialing', trial_end: START + 14 * DAY, metadata: { plan: 'month' } },
  });
});

test('a number that is no test card is told so and kept in its field', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop);
  const reply = await kit.post(`/pay/${session.id}`, { number: '1234' });
  expect(reply.status).toBe(422);
  const text = await reply.text();
  expect(text).toContain('This number is not one of the test cards.');
  expect(text).toMatch(/name="number"[^>]*value="1234"/);
});

test('without a customer the page asks for an address and makes one', async () => {
  const { kit, shop } = await setUp();
  const session = await kit.stripe.checkout.sessions.create({
    mode: 'subscription',
    line_items: [{ price: shop.price.id, quantity: 1 }],
    success_url: 'http://product.test/done',
  });
  await kit.post(`/pay/${session.id}`, { card: 'succeeds', email: 'new@example.test' });
  const done = await kit.stripe.checkout.sessions.retrieve(session.id, { expand: ['customer'] });
  expect(done).toMatchObject({ status: 'complete', customer: { email: 'new@example.test' } });
});

test('an expired session can be neither paid nor expired again', async () => {
  const { kit, shop } = await setUp();
  const session = await openSession(kit, shop);
  expect((await kit.stripe.checkout.sessions.expire(session.id)).status).toBe('expired');
  expect((await kit.post(`/pay/${session.id}`, { card: 'succeeds' })).status).toBe(410);
  await expect(kit.stripe.checkout.sessions.expire(session.id)).rejects.toMatchObject({ statusCode: 400 });
  const late = await openSession(kit, shop);
  await shop.moveTo(START + 2 * DAY);
  expect(await open(kit, late.id)).toBe('expired');
  await kit.payments.idle();
  expect(kit.types().filter((type) => type === 'checkout.session.expired')).toHaveLength(2);
});
