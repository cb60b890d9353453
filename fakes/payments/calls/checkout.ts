import { z } from 'zod';
import { discountAmounts, makeDiscounts, periodLines } from '../billing/amounts.ts';
import { newItems, trialEndOf } from '../billing/start.ts';
import { expireCheckout } from '../billing/time.ts';
import { call, listOf, pageOf, type Call } from '../call.ts';
import { checkoutTime } from '../checkout.ts';
import type { CheckoutDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, mergeMetadata, metadata, moment, params, text, whole, yesNo } from '../params.ts';
import { checkoutShape } from '../shapes/checkout.ts';
import { subscriptionShape } from '../shapes/subscription.ts';
import { checkTrialEnd, coupons, quantity, readPrices, trialSettings } from './subscriptions.ts';
import { liveCustomer } from './customers.ts';

const DAY_SECONDS = 86_400;

const schema = params({
  mode: z.enum(['subscription', 'payment', 'setup']),
  line_items: z.array(z.strictObject({ price: text, quantity })).min(1),
  success_url: z.url(),
  cancel_url: z.url().optional(),
  customer: text.optional(),
  customer_email: z.email().optional(),
  client_reference_id: text.optional(),
  payment_method_collection: z.literal('always').optional(),
  payment_method_types: z.array(z.literal('card')).optional(),
  allow_promotion_codes: z.enum(['false']).optional(),
  locale: text.optional(),
  ui_mode: z.literal('hosted_page').optional(),
  expires_at: moment.optional(),
  discounts: coupons,
  metadata: metadata.optional(),
  subscription_data: z
    .strictObject({
      trial_period_days: whole.refine((days) => days >= 1 && days <= 730, 'from 1 to 730').optional(),
      trial_end: moment.optional(),
      trial_settings: trialSettings,
      description: text.optional(),
      metadata: metadata.optional(),
    })
    .optional(),
  customer_update: z
    .strictObject({ name: z.literal('auto').optional(), address: z.literal('auto').optional() })
    .optional(),
  saved_payment_method_options: z.strictObject({ payment_method_save: yesNo.optional() }).optional(),
});

type Asked = z.output<typeof schema>;

const couponsOf = (asked: Asked) => (asked.discounts || []).map(({ coupon }) => coupon);

/** What leaves the card today: nothing in a trial, else the first period less its discounts. */
async function priceToday(
  ledger: Ledger,
  asked: Asked,
  prices: Awaited<ReturnType<typeof readPrices>>,
  at: number,
) {
  const trialEnd = trialEndOf(
    at,
    asked.subscription_data?.trial_period_days ?? null,
    asked.subscription_data?.trial_end ?? null,
  );
  if (trialEnd !== null) return { dueMinor: 0, discountMinor: 0 };
  const imagined = subscriptionShape({
    id: 'sub_imagined',
    at,
    customer: '',
    testClock: null,
    items: newItems(ledger, 'sub_imagined', { prices, at, trialEnd }),
    currency: prices[0]?.price.currency ?? 'eur',
    anchor: at,
    trialEnd,
    metadata: {},
    description: null,
    paymentMethod: null,
    missingCard: 'create_invoice',
  });
  const lines = await periodLines(ledger, imagined, false);
  const given = { customer: '', subscription: imagined.id, at, session: null };
  const taken = await discountAmounts(ledger, await makeDiscounts(ledger, couponsOf(asked), given), lines);
  const discountMinor = taken.reduce((sum, { amount }) => sum + amount, 0);
  const dueMinor = lines.reduce((sum, { amount }) => sum + amount, 0) - discountMinor;
  return { dueMinor, discountMinor };
}

/** @throws Fault for combinations that the provider refuses, or that this stand-in has not learnt */
function checkAsked(asked: Asked): void {
  if (asked.mode !== 'subscription') {
    throw badRequest('This stand-in sells subscriptions only.', { param: 'mode' });
  }
  if (asked.customer && asked.customer_email) {
    throw badRequest('You may only specify one of these parameters: customer, customer_email.', {
      param: 'customer_email',
    });
  }
}

const create = call('POST', '/v1/checkout/sessions', schema, async (ledger, asked) => {
  checkAsked(asked);
  const customer = asked.customer ? await liveCustomer(ledger, asked.customer) : null;
  const at = await ledger.time(customer?.test_clock ?? null);
  const data = asked.subscription_data;
  checkTrialEnd(data?.trial_end ?? null, at);
  const prices = await readPrices(ledger, asked.line_items, 'line_items');
  const id = ledger.id('cs_test');
  const lines = await Promise.all(
    prices.map(async ({ price, quantity: count }) => {
      const product = await ledger.need('product', price.product);
      return { id: ledger.id('li'), price, name: product.name, quantity: count };
    }),
  );
  const session = checkoutShape({
    id,
    at,
    expiresAt: asked.expires_at ?? at + DAY_SECONDS,
    url: `${ledger.origin}/pay/${id}`,
    customer: customer?.id ?? null,
    customerEmail: asked.customer_email ?? null,
    clientReference: asked.client_reference_id ?? null,
    metadata: mergeMetadata({}, asked.metadata),
    successUrl: asked.success_url,
    cancelUrl: asked.cancel_url ?? null,
    lines,
    ...(await priceToday(ledger, asked, prices, at)),
  });
  await ledger.save('checkout.session', session);
  await ledger.save('checkout_plan', {
    id,
    trial_end_days: data?.trial_period_days ?? null,
    trial_end: data?.trial_end ?? null,
    metadata: mergeMetadata({}, data?.metadata),
    description: data?.description ?? null,
    missing_card: data?.trial_settings?.end_behavior.missing_payment_method ?? 'create_invoice',
    coupons: couponsOf(asked),
  });
  return session;
});

/** The session, closed if its time is over. */
export async function freshSession(ledger: Ledger, id: string): Promise<CheckoutDoc> {
  const session = await ledger.need('checkout.session', id);
  const at = await checkoutTime(ledger, session);
  return session.status === 'open' && session.expires_at <= at
    ? expireCheckout(ledger, session, session.expires_at)
    : session;
}

export const checkoutCalls: Call[] = [
  create,
  call('POST', '/v1/checkout/sessions/:id/expire', params({}), async (ledger, _asked, id) => {
    const session = await freshSession(ledger, id);
    if (session.status !== 'open') {
      throw badRequest('Only Checkout Sessions with a status in ["open"] can be expired.');
    }
    return expireCheckout(ledger, session, await checkoutTime(ledger, session));
  }),
  call(
    'GET',
    '/v1/checkout/sessions',
    listParams({
      customer: text.optional(),
      subscription: text.optional(),
      status: z.enum(['open', 'complete', 'expired']).optional(),
    }),
    async (ledger, { customer, subscription, status, ...paging }) =>
      pageOf(
        '/v1/checkout/sessions',
        await ledger.all('checkout.session', {
          ...(customer && { customer }),
          ...(subscription && { subscription }),
          ...(status && { status }),
        }),
        paging,
      ),
  ),
  call('GET', '/v1/checkout/sessions/:id', params({}), (ledger, _asked, id) => freshSession(ledger, id)),
  call('GET', '/v1/checkout/sessions/:id/line_items', listParams({}), async (ledger, _asked, id) => {
    const { line_items: items } = await ledger.need('checkout.session', id);
    return listOf(items.url, items.data);
  }),
];
