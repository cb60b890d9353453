import type { CheckoutDoc, SubscriptionDoc } from '../docs.ts';
import type { Ledger } from '../ledger.ts';
import {
  changeSubscription,
  currentPeriod,
  endSubscription,
  openInvoices,
  renew,
  settle,
} from './lifecycle.ts';
import { DAY_SECONDS } from './periods.ts';

/** A subscription whose first invoice is not paid by then never begins (memory: 23 hours). */
const INCOMPLETE_SECONDS = 23 * 3600;
const TRIAL_NOTICE_SECONDS = 3 * DAY_SECONDS;

interface Due {
  at: number;
  act: (at: number) => Promise<unknown>;
}

/** What time will do next to one subscription. */
async function nextDue(ledger: Ledger, id: string, since: number): Promise<Due | null> {
  const subscription = await ledger.need('subscription', id);
  const { status, cancel_at: cancelAt, pause_collection: pause, trial_end: trialEnd } = subscription;
  const dues: Due[] = [];
  if (status === 'incomplete') {
    const at = subscription.created + INCOMPLETE_SECONDS;
    dues.push({ at, act: (now) => endSubscription(ledger, id, 'payment_failed', now) });
  }
  if (['trialing', 'active', 'past_due'].includes(status)) {
    for (const invoice of await openInvoices(ledger, id)) {
      if (!invoice.next_payment_attempt) continue;
      const attempt = { present: false, counted: true };
      dues.push({
        at: invoice.next_payment_attempt,
        act: (at) => settle(ledger, invoice, { at, ...attempt }),
      });
    }
    if (cancelAt)
      dues.push({ at: cancelAt, act: (at) => endSubscription(ledger, id, 'cancellation_requested', at) });
    if (pause?.resumes_at) {
      dues.push({
        at: pause.resumes_at,
        act: (at) => changeSubscription(ledger, id, { pause_collection: null }, at),
      });
    }
    const notice = (trialEnd ?? 0) - TRIAL_NOTICE_SECONDS;
    if (status === 'trialing' && notice > since) {
      dues.push({
        at: notice,
        act: async (at) => ledger.emit('customer.subscription.trial_will_end', subscription, at),
      });
    }
    dues.push({ at: currentPeriod(subscription).end, act: (at) => renew(ledger, subscription, at) });
  }
  return dues.reduce<Due | null>((first, due) => (!first || due.at < first.at ? due : first), null);
}

/** A checkout page that was never finished closes. */
export async function expireCheckout(ledger: Ledger, session: CheckoutDoc, at: number): Promise<CheckoutDoc> {
  const expired: CheckoutDoc = { ...session, status: 'expired', url: null };
  await ledger.save('checkout.session', expired);
  ledger.emit('checkout.session.expired', expired, at);
  return expired;
}

async function expireCheckouts(ledger: Ledger, clock: string | null, until: number): Promise<void> {
  for (const session of await ledger.all('checkout.session', { status: 'open' })) {
    const customer = session.customer ? await ledger.find('customer', session.customer) : null;
    if ((customer?.test_clock ?? null) === clock && session.expires_at <= until) {
      await expireCheckout(ledger, session, session.expires_at);
    }
  }
}

const OVER: readonly SubscriptionDoc['status'][] = ['canceled', 'incomplete_expired'];

/**
 * Lets time pass for everyone who lives by one clock, one event after the other in the order of their moments.
 * @param clock the test clock, null for those who live in real time
 * @param since up to when time has passed already
 * @param setTime told each moment before what happens in it
 */
export async function passTime(
  ledger: Ledger,
  clock: string | null,
  { since, until, setTime }: { since: number; until: number; setTime?: (at: number) => Promise<void> },
): Promise<void> {
  const dues = new Map<string, Due>();
  for (const { id, status } of (await ledger.all('subscription', { test_clock: clock })).reverse()) {
    const due = OVER.includes(status) ? null : await nextDue(ledger, id, since);
    if (due) dues.set(id, due);
  }
  for (;;) {
    const [first] = [...dues].filter(([, { at }]) => at <= until).sort(([, a], [, b]) => a.at - b.at);
    if (!first) break;
    const [id, { at, act }] = first;
    await setTime?.(at);
    await act(at);
    const next = await nextDue(ledger, id, at);
    if (next) dues.set(id, next);
    else dues.delete(id);
  }
  await setTime?.(until);
  await expireCheckouts(ledger, clock, until);
}
