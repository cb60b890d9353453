import { attachMethod } from '../cards.ts';
import type { ItemDoc, PaymentMethodDoc, PriceDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest, type Fault } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { itemShape, subscriptionShape, type SubscriptionParts } from '../shapes/subscription.ts';
import { makeDiscounts, periodLines, redeem } from './amounts.ts';
import { billNow, currentPeriod } from './lifecycle.ts';
import { DAY_SECONDS, periodEnd } from './periods.ts';

interface NewSubscription {
  customer: string;
  prices: { price: PriceDoc; quantity: number }[];
  at: number;
  trialDays: number | null;
  trialEnd: number | null;
  metadata: Record<string, string>;
  description: string | null;
  method: PaymentMethodDoc | null;
  missingCard: SubscriptionParts['missingCard'];
  coupons: string[];
  /** The checkout session it comes from, with its owner before the page. */
  session: string | null;
}

/** The items of a period that starts now; a trial's period is the trial. */
export function newItems(
  ledger: Ledger,
  subscription: string,
  { prices, at, trialEnd }: Pick<NewSubscription, 'prices' | 'at' | 'trialEnd'>,
): ItemDoc[] {
  return prices.map(({ price, quantity }) =>
    itemShape({
      id: ledger.id('si'),
      at,
      subscription,
      price,
      quantity,
      periodStart: at,
      periodEnd: trialEnd ?? periodEnd(at, at, price),
    }),
  );
}

/** When a trial asked for in days or as a moment ends; null without one. */
export const trialEndOf = (at: number, days: number | null, moment: number | null): number | null =>
  moment ?? (days ? at + days * DAY_SECONDS : null);

/**
 * Makes a subscription and its first invoice and tries to get it paid.
 * @returns the subscription (incomplete when the card was refused) and the refusal
 */
export async function startSubscription(
  ledger: Ledger,
  asked: NewSubscription,
): Promise<{ subscription: SubscriptionDoc; fault: Fault | null }> {
  const { customer: customerId, at, method, session } = asked;
  const customer = await ledger.need('customer', customerId, 'customer');
  const currency = asked.prices[0]?.price.currency ?? 'eur';
  if (asked.prices.some(({ price }) => price.currency !== currency)) {
    throw badRequest('All prices of a subscription must be in one currency.', { param: 'items' });
  }
  const id = ledger.id('sub');
  const trialEnd = trialEndOf(at, asked.trialDays, asked.trialEnd);
  const made = subscriptionShape({
    id,
    at,
    customer: customerId,
    testClock: customer.test_clock,
    items: newItems(ledger, id, { ...asked, trialEnd }),
    currency,
    anchor: trialEnd ?? at,
    trialEnd,
    metadata: asked.metadata,
    description: asked.description,
    paymentMethod: method?.id ?? null,
    missingCard: asked.missingCard,
  });
  made.discounts = await makeDiscounts(ledger, asked.coupons, {
    customer: customerId,
    subscription: id,
    at,
    session,
  });
  await redeem(ledger, made.discounts);
  if (method) await attachMethod(ledger, method, customerId, at);
  await ledger.save('customer', { ...(await ledger.need('customer', customerId)), currency });
  await ledger.save('subscription', made);
  ledger.emit('customer.subscription.created', made, at);
  const { fault } = await billNow(
    ledger,
    {
      subscription: made,
      reason: 'subscription_create',
      lines: await periodLines(ledger, made, trialEnd !== null),
      at,
      period: { start: at, end: trialEnd === null ? at : currentPeriod(made).end },
    },
    { at, present: session !== null, counted: true },
  );
  return { subscription: await ledger.need('subscription', id), fault };
}
