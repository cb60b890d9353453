import { z } from 'zod';
import { periodLines, prorationLine } from '../billing/amounts.ts';
import { planChange } from '../billing/change.ts';
import { draftInvoice, pendingItems, setAside } from '../billing/invoicing.ts';
import { currentPeriod, settle } from '../billing/lifecycle.ts';
import { periodEnd } from '../billing/periods.ts';
import { newItems } from '../billing/start.ts';
import { methodBehind } from '../cards.ts';
import { call, pageOf, type Call } from '../call.ts';
import type { SubscriptionDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, moment, params, text, yesNo } from '../params.ts';
import { subscriptionShape } from '../shapes/subscription.ts';
import { coupons, orDefault, prorationBehaviour, readPrices } from './subscriptions.ts';
import { itemChanges } from './subscription-update.ts';
import { createdRange, isWithin } from './time.ts';

const pay = call(
  'POST',
  '/v1/invoices/:id/pay',
  params({ payment_method: text.optional(), off_session: yesNo.optional() }),
  async (ledger, asked, id) => {
    const invoice = await ledger.need('invoice', id);
    if (invoice.status === 'paid')
      throw badRequest('Invoice is already paid', { code: 'invoice_already_paid' });
    if (invoice.status !== 'open')
      throw badRequest(`An invoice that is ${String(invoice.status)} cannot be paid.`);
    const at = await ledger.time(invoice.test_clock);
    const method = asked.payment_method ? await methodBehind(ledger, asked.payment_method, at) : undefined;
    const present = asked.off_session === false;
    const paid = await settle(ledger, invoice, { at, present, counted: false, method });
    return paid.fault ? { refused: paid.fault } : paid.invoice;
  },
);

const voidInvoice = call('POST', '/v1/invoices/:id/void', params({}), async (ledger, _asked, id) => {
  const invoice = await ledger.need('invoice', id);
  if (invoice.status !== 'open') throw badRequest('Only an open invoice can be voided.');
  return setAside(ledger, invoice, 'void', await ledger.time(invoice.test_clock));
});

const preview = params({
  customer: text.optional(),
  subscription: text.optional(),
  discounts: coupons,
  subscription_details: z
    .strictObject({
      items: itemChanges.optional(),
      proration_behavior: prorationBehaviour,
      proration_date: moment.optional(),
      cancel_at_period_end: yesNo.optional(),
    })
    .optional(),
});

type Preview = z.output<typeof preview>;

/** A subscription that does not exist yet, as its first invoice would see it. */
async function imagined(ledger: Ledger, asked: Preview): Promise<SubscriptionDoc> {
  const customer = await ledger.need('customer', asked.customer ?? '', 'customer');
  const at = await ledger.time(customer.test_clock);
  const items = (asked.subscription_details?.items ?? []).map(({ price = '', quantity }) => ({
    price,
    quantity,
  }));
  if (items.length === 0)
    throw badRequest('No upcoming invoices for customer.', { code: 'invoice_upcoming_none' });
  const prices = await readPrices(ledger, items, 'subscription_details[items]');
  return subscriptionShape({
    id: 'sub_preview',
    at,
    customer: customer.id,
    testClock: customer.test_clock,
    items: newItems(ledger, 'sub_preview', { prices, at, trialEnd: null }),
    currency: prices[0]?.price.currency ?? 'eur',
    anchor: at,
    trialEnd: null,
    metadata: {},
    description: null,
    paymentMethod: null,
    missingCard: 'create_invoice',
  });
}

/** The invoice that will come next, or at once if the change in `subscription_details` is made. Nothing is kept. */
const createPreview = call('POST', '/v1/invoices/create_preview', preview, async (ledger, asked) => {
  const id = `upcoming_${ledger.id('in')}`;
  if (!asked.subscription) {
    const subscription = await imagined(ledger, asked);
    const { created: at } = subscription;
    const lines = await periodLines(ledger, subscription, false);
    return draftInvoice(ledger, id, {
      subscription,
      reason: 'upcoming',
      lines,
      at,
      period: { start: at, end: at },
    });
  }
  const subscription = await ledger.need('subscription', asked.subscription, 'subscription');
  const at = await ledger.time(subscription.test_clock);
  const details = asked.subscription_details;
  const ends = details?.cancel_at_period_end ?? subscription.cancel_at_period_end;
  if (subscription.status === 'canceled' || (ends && !details?.items)) {
    throw badRequest('No upcoming invoices for this subscription.', { code: 'invoice_upcoming_none' });
  }
  const date = details?.proration_date ?? at;
  const behaviour = orDefault(details?.proration_behavior);
  const change = await planChange(ledger, subscription, details?.items ?? [], date, behaviour);
  const atOnce = change.startsAnew || (behaviour === 'always_invoice' && change.prorations.length > 0);
  const period = currentPeriod(subscription);
  const billed = change.startsAnew
    ? change.items
    : change.items.map((item) => ({
        ...item,
        current_period_start: period.end,
        current_period_end: periodEnd(subscription.billing_cycle_anchor, period.end, item.price),
      }));
  const after: SubscriptionDoc = { ...subscription, items: { ...subscription.items, data: billed } };
  const waiting = [...(await pendingItems(ledger, subscription.id)), ...change.prorations];
  const prorations = await Promise.all(waiting.map((item) => prorationLine(ledger, item)));
  const whole = atOnce && !change.startsAnew ? [] : await periodLines(ledger, after, false);
  return draftInvoice(ledger, id, {
    subscription: after,
    reason: 'upcoming',
    lines: [...prorations, ...whole],
    at: atOnce ? at : period.end,
    period,
  });
});

const list = call(
  'GET',
  '/v1/invoices',
  listParams({
    customer: text.optional(),
    subscription: text.optional(),
    status: z.enum(['draft', 'open', 'paid', 'uncollectible', 'void']).optional(),
    created: createdRange,
  }),
  async (ledger, { customer, subscription, status, created, ...paging }) => {
    const all = await ledger.all('invoice', {
      ...(customer && { customer }),
      ...(status && { status }),
      ...(subscription && { parent: { subscription_details: { subscription } } }),
    });
    const found = all.filter((one) => isWithin(one.created, created));
    return pageOf('/v1/invoices', found, paging);
  },
);

export const invoiceCalls: Call[] = [
  createPreview,
  pay,
  voidInvoice,
  list,
  call('GET', '/v1/invoices/:id', params({}), (ledger, _asked, id) => ledger.need('invoice', id)),
];
