import type { InvoiceItemDoc, ItemDoc, PriceDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest, missing } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { itemShape } from '../shapes/subscription.ts';
import { periodEnd, sameRhythm } from './periods.ts';

interface ItemChange {
  id?: string | undefined;
  price?: string | undefined;
  quantity?: number | undefined;
  deleted?: boolean | undefined;
}

export type ProrationBehaviour = 'create_prorations' | 'always_invoice' | 'none';

export interface Change {
  items: ItemDoc[];
  /** Credits for what was paid and not used, and charges for the rest of the period. */
  prorations: InvoiceItemDoc[];
  /** The rhythm changed: a new period begins now and is billed in full at once. */
  startsAnew: boolean;
}

function proration(
  ledger: Ledger,
  subscription: SubscriptionDoc,
  item: ItemDoc,
  at: number,
  { sign, end }: { sign: 1 | -1; end: number },
): InvoiceItemDoc {
  const { current_period_start: start, current_period_end: periodEnds } = item;
  const share = Math.max(0, periodEnds - at) / (periodEnds - start);
  const day = new Date(at * 1000).toISOString().slice(0, 10);
  return {
    id: ledger.id('ii'),
    object: 'invoiceitem',
    amount: sign * Math.round(item.price.unit_amount * item.quantity * share),
    currency: item.price.currency,
    customer: subscription.customer,
    customer_account: null,
    date: at,
    description: `${sign < 0 ? 'Unused' : 'Remaining'} time on ${item.price.nickname ?? item.price.id} after ${day}`,
    discountable: false,
    discounts: [],
    invoice: null,
    livemode: false,
    metadata: {},
    parent: {
      type: 'subscription_details',
      subscription_details: { subscription: subscription.id, subscription_item: item.id },
    },
    period: { start: at, end },
    pricing: {
      type: 'price_details',
      price_details: { price: item.price.id, product: item.price.product },
      unit_amount_decimal: String(item.price.unit_amount),
    },
    proration: true,
    proration_details: { credited_items: null, discount_amounts: [] },
    quantity: item.quantity,
    quantity_decimal: String(item.quantity),
    tax_rates: [],
    test_clock: subscription.test_clock,
  };
}

/** @throws Fault when it is unknown, not for sale or not paid again and again */
export async function recurringPrice(ledger: Ledger, id: string, param: string): Promise<PriceDoc> {
  const price = await ledger.need('price', id, param);
  if (!price.active) throw badRequest(`The price specified is inactive: ${id}`, { param });
  if (!price.recurring) throw badRequest(`The price specified is not recurring: ${id}`, { param });
  return price;
}

/** The items after a change, as ids, prices and quantities say; nothing is kept here. */
async function changedItems(
  ledger: Ledger,
  subscription: SubscriptionDoc,
  changes: ItemChange[],
  at: number,
): Promise<ItemDoc[]> {
  const items = new Map(subscription.items.data.map((item) => [item.id, item]));
  for (const [index, { id, price: priceId, quantity, deleted }] of changes.entries()) {
    const old = id ? items.get(id) : undefined;
    if (id && !old) throw missing('subscription_item', id, `items[${index}][id]`);
    if (id && deleted) {
      items.delete(id);
      continue;
    }
    const price = priceId ? await recurringPrice(ledger, priceId, `items[${index}][price]`) : old?.price;
    if (!price)
      throw badRequest('An item needs a price.', { code: 'parameter_missing', param: `items[${index}]` });
    const period = old ?? subscription.items.data[0];
    const item = itemShape({
      id: id ?? ledger.id('si'),
      at: old?.created ?? at,
      subscription: subscription.id,
      price,
      quantity: quantity ?? old?.quantity ?? 1,
      periodStart: period?.current_period_start ?? at,
      periodEnd: period?.current_period_end ?? periodEnd(at, at, price),
    });
    items.set(item.id, item);
  }
  if (items.size === 0) throw badRequest('A subscription needs an item.', { param: 'items' });
  return [...items.values()];
}

const same = (one: ItemDoc | undefined, other: ItemDoc | undefined) =>
  one?.price.id === other?.price.id && one?.quantity === other?.quantity;

/** Works out a change of what is bought, and what it costs or gives back; nothing is kept here. */
export async function planChange(
  ledger: Ledger,
  subscription: SubscriptionDoc,
  changes: ItemChange[],
  at: number,
  behaviour: ProrationBehaviour,
): Promise<Change> {
  const before = subscription.items.data;
  const after = await changedItems(ledger, subscription, changes, at);
  const price = before[0]?.price;
  const newRhythm = after.some((item) => price && !sameRhythm(item.price, price));
  const startsAnew = newRhythm && subscription.status !== 'trialing';
  const items = startsAnew
    ? after.map((item) => ({
        ...item,
        current_period_start: at,
        current_period_end: periodEnd(at, at, item.price),
      }))
    : after;
  const prorations: InvoiceItemDoc[] = [];
  if (behaviour !== 'none' && subscription.status !== 'trialing') {
    const afterById = new Map(after.map((item) => [item.id, item]));
    const beforeById = new Map(before.map((item) => [item.id, item]));
    for (const item of before) {
      if (!startsAnew && same(item, afterById.get(item.id))) continue;
      prorations.push(proration(ledger, subscription, item, at, { sign: -1, end: item.current_period_end }));
    }
    for (const item of startsAnew ? [] : after) {
      if (same(item, beforeById.get(item.id))) continue;
      prorations.push(proration(ledger, subscription, item, at, { sign: 1, end: item.current_period_end }));
    }
  }
  return { items, prorations, startsAnew };
}
