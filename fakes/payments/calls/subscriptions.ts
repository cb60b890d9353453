import { z } from 'zod';
import { makeDiscounts, redeem } from '../billing/amounts.ts';
import { recurringPrice, type ProrationBehaviour } from '../billing/change.ts';
import { endSubscription } from '../billing/lifecycle.ts';
import { startSubscription } from '../billing/start.ts';
import { methodBehind } from '../cards.ts';
import { call, pageOf, type Call } from '../call.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, mergeMetadata, metadata, moment, params, text, whole } from '../params.ts';
import { createdRange, isWithin } from './time.ts';
import { liveCustomer } from './customers.ts';

export const quantity = whole.refine((count) => count >= 0, 'not below 0').optional();
export const prorationBehaviour = z.enum(['create_prorations', 'always_invoice', 'none']).optional();
export const coupons = z.union([z.literal(''), z.array(z.strictObject({ coupon: text }))]).optional();
export const missingCard = z.enum(['cancel', 'pause', 'create_invoice']);

export const trialSettings = z
  .strictObject({ end_behavior: z.strictObject({ missing_payment_method: missingCard }) })
  .optional();

/** The prices asked for. @throws Fault for one that cannot be subscribed to */
export function readPrices(
  ledger: Ledger,
  items: { price: string; quantity?: number | undefined }[],
  list: string,
) {
  return Promise.all(
    items.map(async (item, index) => ({
      price: await recurringPrice(ledger, item.price, `${list}[${index}][price]`),
      quantity: item.quantity ?? 1,
    })),
  );
}

/** @throws Fault when a trial would end before it begins */
export function checkTrialEnd(end: number | null, at: number): void {
  if (end !== null && end <= at) throw badRequest('The trial end must lie ahead.', { param: 'trial_end' });
}

const create = call(
  'POST',
  '/v1/subscriptions',
  params({
    customer: text,
    items: z.array(z.strictObject({ price: text, quantity })).min(1),
    trial_period_days: whole.refine((days) => days >= 1 && days <= 730, 'from 1 to 730').optional(),
    trial_end: moment.optional(),
    trial_settings: trialSettings,
    default_payment_method: text.optional(),
    payment_behavior: z.enum(['allow_incomplete', 'error_if_incomplete', 'default_incomplete']).optional(),
    discounts: coupons,
    description: text.optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked) => {
    const customer = await liveCustomer(ledger, asked.customer);
    const at = await ledger.time(customer.test_clock);
    checkTrialEnd(asked.trial_end ?? null, at);
    const { subscription, fault } = await startSubscription(ledger, {
      customer: customer.id,
      prices: await readPrices(ledger, asked.items, 'items'),
      at,
      trialDays: asked.trial_period_days ?? null,
      trialEnd: asked.trial_end ?? null,
      metadata: mergeMetadata({}, asked.metadata),
      description: asked.description ?? null,
      method: asked.default_payment_method
        ? await methodBehind(ledger, asked.default_payment_method, at)
        : null,
      missingCard: asked.trial_settings?.end_behavior.missing_payment_method ?? 'create_invoice',
      coupons: (asked.discounts || []).map(({ coupon }) => coupon),
      session: null,
    });
    if (fault && asked.payment_behavior === 'error_if_incomplete') throw fault;
    return subscription;
  },
);

const cancel = call(
  'DELETE',
  '/v1/subscriptions/:id',
  params({
    prorate: z.enum(['true', 'false']).optional(),
    invoice_now: z.enum(['true', 'false']).optional(),
    cancellation_details: z
      .strictObject({ comment: z.string().optional(), feedback: text.optional() })
      .optional(),
  }),
  async (ledger, asked, id) => {
    const { test_clock: clock } = await ledger.need('subscription', id);
    if (asked.prorate === 'true' || asked.invoice_now === 'true') {
      throw badRequest('This stand-in gives no money back on cancelling; make a refund.', {
        param: 'prorate',
      });
    }
    return endSubscription(ledger, id, 'cancellation_requested', await ledger.time(clock));
  },
);

/** Newest first; without a wish those that have not ended. */
const list = call(
  'GET',
  '/v1/subscriptions',
  listParams({
    customer: text.optional(),
    price: text.optional(),
    status: z
      .enum([
        'all',
        'ended',
        'incomplete',
        'incomplete_expired',
        'trialing',
        'active',
        'past_due',
        'unpaid',
        'canceled',
        'paused',
      ])
      .optional(),
    test_clock: text.optional(),
    created: createdRange,
  }),
  async (ledger, { customer, price, status, test_clock: clock, created, ...paging }) => {
    const ended = ['canceled', 'incomplete_expired'];
    const all = await ledger.all('subscription', {
      ...(customer && { customer }),
      ...(clock && { test_clock: clock }),
    });
    const found = all.filter(
      (one) =>
        (status === 'all' ||
          (status === undefined && one.status !== 'canceled') ||
          (status === 'ended' && ended.includes(one.status)) ||
          one.status === status) &&
        (!price || one.items.data.some((item) => item.price.id === price)) &&
        isWithin(one.created, created),
    );
    return pageOf('/v1/subscriptions', found, paging);
  },
);

/** The discounts a change of `discounts` leaves: none for the empty text, the given ones otherwise. */
export async function changedDiscounts(
  ledger: Ledger,
  asked: z.output<typeof coupons>,
  given: { customer: string; subscription: string; at: number },
) {
  const ids = (asked || []).map(({ coupon }) => coupon);
  const discounts = await makeDiscounts(ledger, ids, { ...given, session: null });
  await redeem(ledger, discounts);
  return discounts;
}

export const orDefault = (behaviour: ProrationBehaviour | undefined): ProrationBehaviour =>
  behaviour ?? 'create_prorations';

export const subscriptionCalls: Call[] = [
  create,
  cancel,
  list,
  call('GET', '/v1/subscriptions/:id', params({}), (ledger, _asked, id) => ledger.need('subscription', id)),
];
