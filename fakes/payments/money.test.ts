import { expect, onTestFinished, test } from 'vitest';
import { DAY, join, openKit, openShop, START } from './test-kit.ts';

async function setUp() {
  const kit = await openKit();
  onTestFinished(kit.close);
  const shop = await openShop(kit);
  const year = await kit.stripe.prices.create({
    product: shop.product.id,
    currency: 'eur',
    unit_amount: 39_000,
    recurring: { interval: 'year' },
  });
  return { kit, shop, year };
}

test('a coupon for a free month takes one invoice to nothing and is then used up', async () => {
  const { kit, shop } = await setUp();
  const { id } = await join(kit, shop, '4242424242424242');
  const coupon = await kit.stripe.coupons.create({
    percent_off: 100,
    duration: 'once',
    name: 'A free month',
  });
  const given = await kit.stripe.subscriptions.update(id, { discounts: [{ coupon: coupon.id }] });
  expect(given.discounts).toMatchObject([{ source: { type: 'coupon', coupon: coupon.id } }]);
  await shop.moveTo(START + 63 * DAY);
  const { data } = await kit.stripe.invoices.list({ subscription: id });
  expect(data.map(({ total, amount_paid }) => [total, amount_paid])).toEqual([
    [3900, 3900],
    [0, 0],
    [3900, 3900],
  ]);
  expect((await kit.stripe.subscriptions.retrieve(id)).discounts).toEqual([]);
});

test('a refund goes back to the card in parts, never more than was paid', async () => {
  const { kit, shop } = await setUp();
  const { latest_invoice: invoiceId } = await join(kit, shop, '4242424242424242');
  const invoice = await kit.stripe.invoices.retrieve(String(invoiceId), { expand: ['payments'] });
  const intent = String(invoice.payments?.data[0]?.payment.payment_intent);
  const refund = await kit.stripe.refunds.create({ payment_intent: intent, amount: 1000 });
  expect(refund).toMatchObject({ status: 'succeeded', amount: 1000, currency: 'eur' });
  await expect(kit.stripe.refunds.create({ payment_intent: intent, amount: 2901 })).rejects.toMatchObject({
    param: 'amount',
  });
  await kit.stripe.refunds.create({ payment_intent: intent });
  await expect(kit.stripe.refunds.create({ payment_intent: intent })).rejects.toMatchObject({
    code: 'charge_already_refunded',
  });
  await kit.payments.idle();
  expect(kit.types().filter((type) => type === 'charge.refunded')).toHaveLength(2);
});

test('a preview of a change from month to year says what the change then costs', async () => {
  const { kit, shop, year } = await setUp();
  const joined = await join(kit, shop, '4242424242424242');
  const items = [{ id: joined.items.data[0]?.id ?? '', price: year.id }];
  // Half of 31 days are left: half of €39.00 comes back.
  await shop.moveTo(START + 15.5 * DAY);
  const preview = await kit.stripe.invoices.createPreview({
    subscription: joined.id,
    subscription_details: { items },
  });
  expect(preview.lines.data.map(({ amount }) => amount)).toEqual([-1950, 39_000]);
  expect(preview.amount_due).toBe(37_050);
  const changed = await kit.stripe.subscriptions.update(joined.id, { items, expand: ['latest_invoice'] });
  expect(changed.latest_invoice).toMatchObject({ amount_paid: preview.amount_due, status: 'paid' });
  expect(changed.items.data[0]?.current_period_end).toBe(Date.UTC(2027, 11, 17, 0) / 1000);
});

test('a dearer price in the same rhythm waits for the next invoice, as its preview says', async () => {
  const { kit, shop } = await setUp();
  const dear = await kit.stripe.prices.create({
    product: shop.product.id,
    currency: 'eur',
    unit_amount: 5900,
    recurring: { interval: 'month' },
  });
  const joined = await join(kit, shop, '4242424242424242');
  await shop.moveTo(START + 15.5 * DAY);
  const changed = await kit.stripe.subscriptions.update(joined.id, {
    items: [{ id: joined.items.data[0]?.id ?? '', price: dear.id }],
  });
  expect(changed.items.data[0]?.price.id).toBe(dear.id);
  const preview = await kit.stripe.invoices.createPreview({ subscription: joined.id });
  expect(preview.lines.data.map(({ amount }) => amount)).toEqual([-1950, 2950, 5900]);
  await shop.moveTo(START + 32 * DAY);
  const [next] = (await kit.stripe.invoices.list({ subscription: joined.id })).data;
  expect(next).toMatchObject({ amount_paid: 6900, billing_reason: 'subscription_cycle' });
});

test('what a cheaper plan gives back stays as a balance and pays later invoices', async () => {
  const { kit, shop, year } = await setUp();
  const customer = await kit.stripe.customers.update(shop.customer.id, { name: 'Edda' });
  await kit.stripe.paymentMethods.attach('pm_card_visa', { customer: customer.id });
  const [card] = (await kit.stripe.customers.listPaymentMethods(customer.id)).data;
  const joined = await kit.stripe.subscriptions.create({
    customer: customer.id,
    items: [{ price: year.id }],
    default_payment_method: card?.id ?? '',
  });
  const changed = await kit.stripe.subscriptions.update(joined.id, {
    items: [{ id: joined.items.data[0]?.id ?? '', price: shop.price.id }],
    expand: ['latest_invoice'],
  });
  expect(changed.latest_invoice).toMatchObject({ total: 3900 - 39_000, amount_due: 0, status: 'paid' });
  expect(await kit.stripe.customers.retrieve(customer.id)).toMatchObject({ balance: 3900 - 39_000 });
  await shop.moveTo(START + 32 * DAY);
  expect(await kit.stripe.customers.retrieve(customer.id)).toMatchObject({ balance: 7800 - 39_000 });
});

test('a first payment that fails leaves the plan incomplete, which ends unless it is paid', async () => {
  const { kit, shop } = await setUp();
  await kit.stripe.paymentMethods.attach('pm_card_chargeCustomerFail', { customer: shop.customer.id });
  const [card] = (await kit.stripe.customers.listPaymentMethods(shop.customer.id)).data;
  const asked = {
    customer: shop.customer.id,
    items: [{ price: shop.price.id }],
    default_payment_method: card?.id ?? '',
  };
  await expect(
    kit.stripe.subscriptions.create({ ...asked, payment_behavior: 'error_if_incomplete' }),
  ).rejects.toMatchObject({ code: 'card_declined' });
  expect((await kit.stripe.subscriptions.list({ status: 'all' })).data).toEqual([]);
  const made = await kit.stripe.subscriptions.create(asked);
  expect(made.status).toBe('incomplete');
  await shop.moveTo(START + DAY);
  expect((await kit.stripe.subscriptions.retrieve(made.id)).status).toBe('incomplete_expired');
});

test('deleting a customer ends what runs and leaves a deleted one to be read', async () => {
  const { kit, shop } = await setUp();
  const { id } = await join(kit, shop, '4242424242424242');
  await kit.stripe.customers.del(shop.customer.id);
  expect(await kit.stripe.customers.retrieve(shop.customer.id)).toMatchObject({ deleted: true });
  expect((await kit.stripe.subscriptions.retrieve(id)).status).toBe('canceled');
  await expect(kit.stripe.customers.update(shop.customer.id, { name: 'x' })).rejects.toMatchObject({
    statusCode: 404,
  });
});
