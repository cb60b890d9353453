import { expect, onTestFinished, test } from 'vitest';
import type Stripe from 'stripe';
import { DAY, join, openKit, openShop, START } from './test-kit.ts';

async function setUp() {
  const kit = await openKit();
  onTestFinished(kit.close);
  const shop = await openShop(kit);
  const read = (id: string) => kit.stripe.subscriptions.retrieve(id, { expand: ['latest_invoice'] });
  return { kit, shop, read };
}

const endOf = (subscription: Stripe.Subscription) => subscription.items.data[0]?.current_period_end ?? 0;
const iso = (seconds: number) => new Date(seconds * 1000).toISOString();

test('the clock renews at every period end, on the same day of the month, and bills each', async () => {
  const { kit, shop, read } = await setUp();
  const { id } = await join(kit, shop, '4242424242424242');
  await shop.moveTo(START + 95 * DAY);
  const now = await read(id);
  expect(iso(endOf(now))).toBe('2027-04-01T12:00:00.000Z');
  const invoices = await kit.stripe.invoices.list({ subscription: id });
  expect(
    invoices.data.map((one) => [iso(one.created).slice(0, 10), one.billing_reason, one.amount_paid]),
  ).toEqual([
    ['2027-03-01', 'subscription_cycle', 3900],
    ['2027-02-01', 'subscription_cycle', 3900],
    ['2027-01-01', 'subscription_cycle', 3900],
    ['2026-12-01', 'subscription_create', 3900],
  ]);
  expect(new Set(invoices.data.map(({ number }) => number)).size).toBe(4);
  expect(invoices.data[0]?.parent?.subscription_details?.subscription).toBe(id);
});

test('a month that began on the 31st ends on the last day of a shorter one and comes back to the 31st', async () => {
  const { kit, shop, read } = await setUp();
  await shop.moveTo(Date.UTC(2027, 0, 31, 9) / 1000);
  const joined = await join(kit, shop, '4242424242424242');
  expect(iso(endOf(joined))).toBe('2027-02-28T09:00:00.000Z');
  await shop.moveTo(Date.UTC(2027, 2, 1) / 1000);
  expect(iso(endOf(await read(joined.id)))).toBe('2027-03-31T09:00:00.000Z');
});

test('a trial costs nothing, is announced three days before its end, and then bills', async () => {
  const { kit, shop, read } = await setUp();
  const { id } = await join(kit, shop, '4242424242424242', 14);
  expect(await read(id)).toMatchObject({
    status: 'trialing',
    latest_invoice: { amount_due: 0, status: 'paid' },
  });
  await shop.moveTo(START + 12 * DAY);
  await kit.payments.idle();
  expect(kit.types().filter((type) => type === 'customer.subscription.trial_will_end')).toHaveLength(1);
  await shop.moveTo(START + 14 * DAY);
  expect(await read(id)).toMatchObject({
    status: 'active',
    latest_invoice: { amount_paid: 3900, created: START + 14 * DAY, status: 'paid' },
  });
});

test('a card that fails at renewal is tried again after 3, 5 and 7 days, then the plan ends', async () => {
  const { kit, shop, read } = await setUp();
  const joined = await join(kit, shop, '4000000000000341');
  expect(joined.status).toBe('active');
  const due = endOf(joined);
  await shop.moveTo(due);
  expect(await read(joined.id)).toMatchObject({
    status: 'past_due',
    latest_invoice: {
      status: 'open',
      attempt_count: 1,
      amount_remaining: 3900,
      next_payment_attempt: due + 3 * DAY,
    },
  });
  const attempts = async (day: number) => {
    await shop.moveTo(due + day * DAY);
    const { status, latest_invoice: invoice } = await read(joined.id);
    return [status, typeof invoice === 'object' ? invoice?.attempt_count : null];
  };
  expect(await attempts(2)).toEqual(['past_due', 1]);
  expect(await attempts(3)).toEqual(['past_due', 2]);
  expect(await attempts(5)).toEqual(['past_due', 3]);
  expect(await attempts(6)).toEqual(['past_due', 3]);
  expect(await attempts(7)).toEqual(['canceled', 4]);
  expect(await read(joined.id)).toMatchObject({
    ended_at: due + 7 * DAY,
    cancellation_details: { reason: 'payment_failed' },
    latest_invoice: { status: 'open', next_payment_attempt: null },
  });
  await kit.payments.idle();
  expect(kit.types().filter((type) => type === 'invoice.payment_failed')).toHaveLength(4);
  expect(kit.types().at(-2)).toBe('customer.subscription.deleted');
});

test('a new card in the portal and a push of Pay now bring a late plan back; a failed push changes no retry', async () => {
  const { kit, shop, read } = await setUp();
  const joined = await join(kit, shop, '4000000000000341');
  await shop.moveTo(endOf(joined));
  const [invoice] = (await kit.stripe.invoices.list({ customer: shop.customer.id, status: 'open' })).data;
  if (!invoice) throw new Error('no invoice is open');
  await expect(kit.stripe.invoices.pay(invoice.id)).rejects.toMatchObject({
    type: 'StripeCardError',
    code: 'card_declined',
  });
  const after = await kit.stripe.invoices.retrieve(invoice.id);
  expect(after.attempt_count).toBe(1);
  expect(after.next_payment_attempt).toBe(invoice.next_payment_attempt);

  const portal = await kit.stripe.billingPortal.sessions.create({
    customer: shop.customer.id,
    return_url: 'http://product.test/account',
  });
  const path = new URL(portal.url).pathname;
  await kit.post(path, { act: 'card', number: '4242424242424242' });
  const paid = await kit.post(path, { act: 'pay', invoice: invoice.id });
  expect(paid.headers.get('location')).toBe(`${path}?said=paid`);
  expect(await read(joined.id)).toMatchObject({ status: 'active', latest_invoice: { status: 'paid' } });
  expect((await kit.get(path)).text).toContain('Visa ending in 4242');
  expect((await kit.get(`/invoice/${invoice.id}`)).text).toContain(`Invoice ${invoice.number ?? ''}`);
});

test('cancelled at the period end it runs until then; kept after all it goes on', async () => {
  const { kit, shop, read } = await setUp();
  const { id, ...joined } = await join(kit, shop, '4242424242424242');
  const end = joined.items.data[0]?.current_period_end ?? 0;
  const portal = await kit.stripe.billingPortal.sessions.create({ customer: shop.customer.id });
  const path = new URL(portal.url).pathname;
  await kit.post(path, { act: 'cancel', subscription: id });
  expect(await read(id)).toMatchObject({ status: 'active', cancel_at_period_end: true, cancel_at: end });
  await kit.post(path, { act: 'keep', subscription: id });
  expect(await read(id)).toMatchObject({ cancel_at_period_end: false, cancel_at: null, canceled_at: null });

  await kit.stripe.subscriptions.update(id, { cancel_at_period_end: true });
  await shop.moveTo(end - 1);
  expect((await read(id)).status).toBe('active');
  await shop.moveTo(end);
  expect(await read(id)).toMatchObject({ status: 'canceled', ended_at: end });
  expect((await kit.stripe.invoices.list({ subscription: id })).data).toHaveLength(1);
});

test('cancelled at once it ends now, and cannot be changed any more', async () => {
  const { kit, shop } = await setUp();
  const { id } = await join(kit, shop, '4242424242424242');
  expect(await kit.stripe.subscriptions.cancel(id)).toMatchObject({ status: 'canceled', ended_at: START });
  await expect(kit.stripe.subscriptions.update(id, { cancel_at_period_end: true })).rejects.toMatchObject({
    statusCode: 400,
  });
  expect((await kit.stripe.subscriptions.list({ customer: shop.customer.id })).data).toEqual([]);
});

test('while collection is paused invoices are withdrawn, and it resumes by itself', async () => {
  const { kit, shop, read } = await setUp();
  const joined = await join(kit, shop, '4242424242424242');
  await kit.stripe.subscriptions.update(joined.id, {
    pause_collection: { behavior: 'void', resumes_at: endOf(joined) + DAY },
  });
  await shop.moveTo(endOf(joined));
  expect(await read(joined.id)).toMatchObject({ status: 'active', latest_invoice: { status: 'void' } });
  await shop.moveTo(endOf(joined) + DAY);
  expect((await read(joined.id)).pause_collection).toBeNull();
});

test('without a test clock real time does the same', async () => {
  const { kit, shop } = await setUp();
  const customer = await kit.stripe.customers.create({
    email: 'real@example.test',
    payment_method: 'pm_card_visa',
    invoice_settings: { default_payment_method: 'pm_card_visa' },
  });
  const { id } = await kit.stripe.subscriptions.create({
    customer: customer.id,
    items: [{ price: shop.price.id }],
  });
  kit.time.now = new Date((START + 40 * DAY) * 1000);
  await kit.payments.tick();
  expect((await kit.stripe.invoices.list({ subscription: id })).data).toHaveLength(2);
});
