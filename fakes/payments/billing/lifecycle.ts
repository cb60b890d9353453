import type { InvoiceDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest, type Fault } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { periodLines } from './amounts.ts';
import { cardOnFile, collect, type Attempt } from './collect.ts';
import { issueInvoice, setAside, type NewInvoice } from './invoicing.ts';
import { periodEnd } from './periods.ts';

type Change = Partial<SubscriptionDoc>;

/** Until when the subscription's present period runs. */
export function currentPeriod({ items, created }: SubscriptionDoc): { start: number; end: number } {
  const [item] = items.data;
  return { start: item?.current_period_start ?? created, end: item?.current_period_end ?? created };
}

/** Keeps a changed subscription and tells of it, with what the changed fields were before. */
export async function changeSubscription(
  ledger: Ledger,
  id: string,
  change: Change,
  at: number,
): Promise<SubscriptionDoc> {
  const before = await ledger.need('subscription', id);
  const after = { ...before, ...change };
  const differs = Object.keys(change).filter(
    (name) => JSON.stringify(Reflect.get(before, name)) !== JSON.stringify(Reflect.get(after, name)),
  );
  if (differs.length === 0) return before;
  const previous = Object.fromEntries(differs.map((name) => [name, Reflect.get(before, name) as unknown]));
  await ledger.save('subscription', after);
  ledger.emit('customer.subscription.updated', after, at, previous);
  return after;
}

/** Ends a subscription at once. What is open stays open and is not tried again. */
export async function endSubscription(
  ledger: Ledger,
  id: string,
  reason: 'cancellation_requested' | 'payment_failed',
  at: number,
): Promise<SubscriptionDoc> {
  const before = await ledger.need('subscription', id);
  if (before.status === 'canceled' || before.status === 'incomplete_expired') {
    throw badRequest('A canceled subscription can only update its cancellation_details and metadata.');
  }
  const ended: SubscriptionDoc = {
    ...before,
    status: before.status === 'incomplete' ? 'incomplete_expired' : 'canceled',
    canceled_at: before.canceled_at ?? at,
    ended_at: at,
    cancel_at_period_end: false,
    cancellation_details: { comment: null, feedback: null, feedback_option: null, reason },
  };
  await ledger.save('subscription', ended);
  for (const invoice of await openInvoices(ledger, id)) {
    await ledger.save('invoice', { ...invoice, auto_advance: false, next_payment_attempt: null });
  }
  ledger.emit('customer.subscription.deleted', ended, at);
  return ended;
}

/** Newest first. */
export const openInvoices = (ledger: Ledger, subscription: string): Promise<InvoiceDoc[]> =>
  ledger.all('invoice', { status: 'open', parent: { subscription_details: { subscription } } });

/** Tries an open invoice and lets the subscription follow: paid brings it back, a last failed try ends it. */
export async function settle(
  ledger: Ledger,
  invoice: InvoiceDoc,
  attempt: Attempt,
): Promise<{ invoice: InvoiceDoc; fault: Fault | null }> {
  const id = invoice.parent.subscription_details.subscription;
  const subscription = await ledger.need('subscription', id);
  const result = await collect(ledger, invoice, subscription, attempt);
  const live = ['incomplete', 'active', 'past_due', 'trialing'].includes(subscription.status);
  if (!live) return result;
  if (result.fault) {
    if (subscription.status !== 'incomplete') {
      await changeSubscription(ledger, id, { status: 'past_due' }, attempt.at);
      if (attempt.counted && result.invoice.next_payment_attempt === null) {
        await endSubscription(ledger, id, 'payment_failed', attempt.at);
      }
    }
  } else if (subscription.status !== 'trialing' && (await openInvoices(ledger, id)).length === 0) {
    await changeSubscription(ledger, id, { status: 'active' }, attempt.at);
  }
  const customer = await ledger.need('customer', subscription.customer);
  const delinquent = (await openInvoices(ledger, id)).length > 0;
  if (customer.delinquent !== delinquent) await ledger.save('customer', { ...customer, delinquent });
  return result;
}

/** Issues an invoice and tries it at once, unless collection is paused. */
export async function billNow(
  ledger: Ledger,
  asked: NewInvoice,
  attempt: Attempt,
): Promise<{ invoice: InvoiceDoc; fault: Fault | null }> {
  const invoice = await issueInvoice(ledger, asked);
  const paused = asked.subscription.pause_collection;
  if (!paused || asked.reason === 'subscription_create') return settle(ledger, invoice, attempt);
  return { invoice: await setAside(ledger, invoice, paused.behavior, attempt.at), fault: null };
}

/** What happens at a trial's end without a card, where the product asked for something else than an invoice. */
async function endTrialWithoutCard(
  ledger: Ledger,
  subscription: SubscriptionDoc,
  at: number,
): Promise<boolean> {
  const wanted = subscription.trial_settings?.end_behavior.missing_payment_method;
  if (wanted !== 'cancel' && wanted !== 'pause') return false;
  if (await cardOnFile(ledger, subscription)) return false;
  if (wanted === 'cancel') await endSubscription(ledger, subscription.id, 'cancellation_requested', at);
  else await changeSubscription(ledger, subscription.id, { status: 'paused' }, at);
  return true;
}

/** The present period is over: the next begins and is billed, or the subscription ends as asked. */
export async function renew(ledger: Ledger, subscription: SubscriptionDoc, at: number): Promise<void> {
  if (subscription.cancel_at_period_end) {
    await endSubscription(ledger, subscription.id, 'cancellation_requested', at);
    return;
  }
  const trialEnds = subscription.status === 'trialing';
  if (trialEnds && (await endTrialWithoutCard(ledger, subscription, at))) return;
  const data = subscription.items.data.map((item) => ({
    ...item,
    current_period_start: at,
    current_period_end: periodEnd(subscription.billing_cycle_anchor, at, item.price),
  }));
  const next = await changeSubscription(
    ledger,
    subscription.id,
    { items: { ...subscription.items, data }, ...(trialEnds && { status: 'active' }) },
    at,
  );
  await billNow(
    ledger,
    {
      subscription: next,
      reason: 'subscription_cycle',
      lines: await periodLines(ledger, next, false),
      at,
      period: currentPeriod(subscription),
    },
    { at, present: false, counted: true },
  );
}
