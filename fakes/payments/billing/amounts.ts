import type { CouponDoc, DiscountDoc, InvoiceItemDoc, ItemDoc, LineDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { lineShape } from '../shapes/invoice.ts';
import { addMonths, rhythmOf } from './periods.ts';

/** 3900, 'eur' → '€39.00'. */
export const money = (amountMinor: number, currency: string) =>
  new Intl.NumberFormat('en-GB', { style: 'currency', currency }).format(amountMinor / 100);

/** `1 × Flight with a coach (at €39.00 / month)` */
async function describe(ledger: Ledger, { price, quantity }: ItemDoc): Promise<string> {
  const product = await ledger.find('product', price.product);
  return `${quantity} × ${product?.name ?? price.product} (at ${money(price.unit_amount, price.currency)} / ${rhythmOf(price)})`;
}

/** One line an item for its present period; nothing to pay while `free`. */
export function periodLines(
  ledger: Ledger,
  subscription: SubscriptionDoc,
  free: boolean,
): Promise<LineDoc[]> {
  return Promise.all(
    subscription.items.data.map(async (item) =>
      lineShape(ledger.id('il'), {
        description: free ? `Trial: ${await describe(ledger, item)}` : await describe(ledger, item),
        amountMinor: free ? 0 : item.price.unit_amount * item.quantity,
        price: item.price,
        quantity: item.quantity,
        period: { start: item.current_period_start, end: item.current_period_end },
        subscription: subscription.id,
        subscriptionItem: item.id,
        invoiceItem: null,
      }),
    ),
  );
}

/** A waiting proration as a line of an invoice. */
export async function prorationLine(ledger: Ledger, pending: InvoiceItemDoc): Promise<LineDoc> {
  const price = await ledger.need('price', pending.pricing.price_details.price);
  return lineShape(ledger.id('il'), {
    description: pending.description ?? '',
    amountMinor: pending.amount,
    price,
    quantity: pending.quantity,
    period: pending.period,
    subscription: pending.parent.subscription_details.subscription,
    subscriptionItem: pending.parent.subscription_details.subscription_item,
    invoiceItem: pending.id,
  });
}

const discountOf = (coupon: CouponDoc, amountMinor: number) =>
  Math.min(
    amountMinor,
    coupon.percent_off === null
      ? (coupon.amount_off ?? 0)
      : Math.round((amountMinor * coupon.percent_off) / 100),
  );

/** What each discount takes off, one after the other; never below nothing. Prorations are not discounted. */
export async function discountAmounts(
  ledger: Ledger,
  discounts: DiscountDoc[],
  lines: LineDoc[],
): Promise<{ amount: number; discount: string }[]> {
  let left = lines.filter(({ discountable }) => discountable).reduce((sum, { amount }) => sum + amount, 0);
  const taken: { amount: number; discount: string }[] = [];
  for (const { id, source } of discounts) {
    const amount = discountOf(await ledger.need('coupon', source.coupon), Math.max(0, left));
    left -= amount;
    taken.push({ amount, discount: id });
  }
  return taken;
}

/** Coupons as discounts of a subscription; nothing is kept here. @throws Fault for one that is unknown or used up */
export async function makeDiscounts(
  ledger: Ledger,
  coupons: string[],
  given: { customer: string; subscription: string; at: number; session: string | null },
): Promise<DiscountDoc[]> {
  const discounts: DiscountDoc[] = [];
  for (const id of coupons) {
    const coupon = await ledger.need('coupon', id, 'coupon');
    if (coupon.max_redemptions !== null && coupon.times_redeemed >= coupon.max_redemptions) {
      throw badRequest(`This coupon is used up: ${id}`, { param: 'coupon' });
    }
    discounts.push({
      id: ledger.id('di'),
      object: 'discount',
      checkout_session: given.session,
      customer: given.customer,
      customer_account: null,
      end: coupon.duration_in_months === null ? null : addMonths(given.at, coupon.duration_in_months),
      invoice: null,
      invoice_item: null,
      promotion_code: null,
      source: { type: 'coupon', coupon: id },
      start: given.at,
      subscription: given.subscription,
      subscription_item: null,
    });
  }
  return discounts;
}

/** Counts a use of each discount's coupon. */
export async function redeem(ledger: Ledger, discounts: DiscountDoc[]): Promise<void> {
  for (const { source } of discounts) {
    const coupon = await ledger.need('coupon', source.coupon);
    const used = coupon.times_redeemed + 1;
    await ledger.save('coupon', { ...coupon, times_redeemed: used, valid: used !== coupon.max_redemptions });
  }
}
