import type { Doc } from '../core/doc-store.ts';
import type { PaymentMethod } from './cards.ts';
import { need, timeOf, type Desk } from './kinds.ts';

const DAY = 86_400;
/** Days after a failed charge at which it is tried again; after the last the subscription ends. */
const RETRY_DAYS = [3, 5, 7];

export interface Price extends Doc {
  id: string;
  product: string;
  currency: string;
  unit_amount: number;
  recurring: { interval: 'month' | 'year'; interval_count: number };
}

export interface Subscription extends Doc {
  id: string;
  customer: string;
  status: string;
  cancel_at_period_end: boolean;
  trial_end: number | null;
  items: { object: 'list'; data: Doc[] };
  default_payment_method: string | null;
  latest_invoice: string | null;
  metadata: Record<string, string>;
  _failures?: number;
  _retryAt?: number | null;
  /** The day of the month on which it renews, kept through short months. */
  _anchor: number;
}

interface Item extends Doc {
  price: Price;
  current_period_start: number;
  current_period_end: number;
}

export const itemOf = (subscription: Subscription): Item => subscription.items.data[0] as Item;

/** A month or year later, on the anchor's day where the month has it. */
export function periodEnd(start: number, anchor: number, interval: 'month' | 'year'): number {
  const from = new Date(start * 1000);
  const wanted = new Date(anchor * 1000).getUTCDate();
  const year = from.getUTCFullYear() + (interval === 'year' ? 1 : 0);
  const month = from.getUTCMonth() + (interval === 'month' ? 1 : 0);
  const lastDay = new Date(Date.UTC(year, month + 1, 0)).getUTCDate();
  const time = start - Math.floor(start / DAY) * DAY;
  return Date.UTC(year, month, Math.min(wanted, lastDay)) / 1000 + time;
}

async function save(desk: Desk, subscription: Subscription, event: string): Promise<void> {
  await desk.store.put('subscription', subscription.id, subscription);
  await desk.emit(event, subscription);
}

/** Makes an open invoice for the subscription's price over the period that begins at `at`. */
async function newInvoice(
  desk: Desk,
  subscription: Subscription,
  at: number,
  reason: string,
): Promise<Doc & { id: string; total: number }> {
  const { price, current_period_start, current_period_end } = itemOf(subscription);
  const id = desk.newId('in_');
  const number = (await desk.store.list('invoice')).length + 1;
  const total = price.unit_amount;
  const invoice = {
    id,
    object: 'invoice',
    customer: subscription.customer,
    number: `SK-${String(number).padStart(5, '0')}`,
    status: 'open',
    currency: price.currency,
    total,
    subtotal: total,
    amount_due: total,
    amount_paid: 0,
    amount_remaining: total,
    attempt_count: 0,
    created: at,
    period_start: current_period_start,
    period_end: current_period_end,
    billing_reason: reason,
    hosted_invoice_url: `${desk.origin}/invoices/${id}`,
    invoice_pdf: `${desk.origin}/invoices/${id}`,
    next_payment_attempt: null,
    parent: {
      type: 'subscription_details',
      subscription_details: { subscription: subscription.id, metadata: subscription.metadata },
    },
    status_transitions: { paid_at: null, finalized_at: at },
    lines: {
      object: 'list',
      data: [
        {
          id: desk.newId('il_'),
          amount: total,
          currency: price.currency,
          period: { start: current_period_start, end: current_period_end },
        },
      ],
      has_more: false,
    },
    metadata: {},
  };
  await desk.store.put('invoice', id, invoice);
  await desk.emit('invoice.created', invoice);
  return invoice;
}

/** Charges an open invoice to the card on file. Answers whether it went through; `first` is the payment at the checkout. */
export async function chargeInvoice(
  desk: Desk,
  invoiceId: string,
  at: number,
  first: boolean,
): Promise<boolean> {
  const invoice = await need<
    Doc & { id: string; total: number; attempt_count: number; customer: string; status_transitions: Doc }
  >(desk, 'invoice', invoiceId);
  const customer = await need<Doc & { invoice_settings: { default_payment_method: string | null } }>(
    desk,
    'customer',
    invoice.customer,
  );
  const cardId = customer.invoice_settings.default_payment_method;
  const card = cardId ? await desk.store.get<PaymentMethod>('payment_method', cardId) : null;
  const good =
    card !== null &&
    card._behaviour !== 'is declined' &&
    (first || card._behaviour !== 'fails at the next renewal');
  const after = {
    ...invoice,
    attempt_count: invoice.attempt_count + 1,
    ...(good && {
      status: 'paid',
      amount_paid: invoice.total,
      amount_remaining: 0,
      status_transitions: { ...invoice.status_transitions, paid_at: at },
    }),
  };
  await desk.store.put('invoice', invoice.id, after);
  await desk.emit(good ? 'invoice.paid' : 'invoice.payment_failed', after);
  return good;
}

/** Starts a subscription whose first payment (or trial) was agreed at the checkout. */
export async function startSubscription(
  desk: Desk,
  wish: {
    customer: string;
    price: Price;
    trialDays: number;
    metadata: Record<string, string>;
    paymentMethod: string;
  },
): Promise<Subscription> {
  const at = await timeOf(desk, wish.customer);
  const trialEnd = wish.trialDays > 0 ? at + wish.trialDays * DAY : null;
  const anchor = trialEnd ?? at;
  const id = desk.newId('sub_');
  const subscription: Subscription = {
    id,
    object: 'subscription',
    customer: wish.customer,
    status: trialEnd ? 'trialing' : 'active',
    created: at,
    start_date: at,
    currency: wish.price.currency,
    collection_method: 'charge_automatically',
    billing_cycle_anchor: anchor,
    trial_start: trialEnd ? at : null,
    trial_end: trialEnd,
    cancel_at_period_end: false,
    canceled_at: null,
    cancel_at: null,
    ended_at: null,
    pause_collection: null,
    default_payment_method: wish.paymentMethod,
    latest_invoice: null,
    discounts: [],
    metadata: wish.metadata,
    items: {
      object: 'list',
      data: [
        {
          id: desk.newId('si_'),
          object: 'subscription_item',
          subscription: id,
          quantity: 1,
          price: wish.price,
          current_period_start: at,
          current_period_end: trialEnd ?? periodEnd(at, at, wish.price.recurring.interval),
        },
      ],
    },
    _anchor: anchor,
  };
  await save(desk, subscription, 'customer.subscription.created');
  if (!trialEnd) {
    const invoice = await newInvoice(desk, subscription, at, 'subscription_create');
    await chargeInvoice(desk, invoice.id, at, true);
    subscription.latest_invoice = invoice.id;
    await save(desk, subscription, 'customer.subscription.updated');
  }
  return subscription;
}

export async function endSubscription(
  desk: Desk,
  subscription: Subscription,
  at: number,
): Promise<Subscription> {
  const ended = {
    ...subscription,
    status: 'canceled',
    ended_at: at,
    canceled_at: subscription['canceled_at'] ?? at,
    _retryAt: null,
  };
  await save(desk, ended, 'customer.subscription.deleted');
  return ended;
}

async function renew(desk: Desk, subscription: Subscription, at: number): Promise<void> {
  const item = itemOf(subscription);
  item.current_period_start = at;
  item.current_period_end = periodEnd(at, subscription._anchor, item.price.recurring.interval);
  const invoice = await newInvoice(desk, subscription, at, 'subscription_cycle');
  const paid = await chargeInvoice(desk, invoice.id, at, false);
  const after = {
    ...subscription,
    latest_invoice: invoice.id,
    status: paid ? 'active' : 'past_due',
    _failures: paid ? 0 : 1,
    _retryAt: paid ? null : at + (RETRY_DAYS[0] ?? 3) * DAY,
  };
  await save(desk, after, 'customer.subscription.updated');
}

/** Tries an unpaid invoice again; after the last failed try the subscription ends. */
export async function retry(desk: Desk, subscription: Subscription, at: number): Promise<void> {
  const paid = subscription.latest_invoice
    ? await chargeInvoice(desk, subscription.latest_invoice, at, false)
    : true;
  if (paid) {
    return save(
      desk,
      { ...subscription, status: 'active', _failures: 0, _retryAt: null },
      'customer.subscription.updated',
    );
  }
  const failures = (subscription._failures ?? 1) + 1;
  const nextDays = RETRY_DAYS[failures - 1];
  if (nextDays === undefined) return void (await endSubscription(desk, subscription, at));
  await save(
    desk,
    { ...subscription, _failures: failures, _retryAt: at + nextDays * DAY },
    'customer.subscription.updated',
  );
}

const LIVE = new Set(['trialing', 'active', 'past_due']);

/** What comes next in a subscription's life, and when. */
function nextDue(subscription: Subscription): number | null {
  if (!LIVE.has(subscription.status)) return null;
  if (subscription.status === 'past_due') return subscription._retryAt ?? null;
  return itemOf(subscription).current_period_end;
}

/** Lives one subscription forward to `until`, step by step in order of time. */
export async function liveUntil(desk: Desk, subscriptionId: string, until: number): Promise<void> {
  for (;;) {
    const subscription = await need<Subscription>(desk, 'subscription', subscriptionId);
    const due = nextDue(subscription);
    if (due === null || due > until) return;
    if (subscription.status === 'past_due') await retry(desk, subscription, due);
    else if (subscription.cancel_at_period_end) await endSubscription(desk, subscription, due);
    else await renew(desk, subscription, due);
  }
}
