import { and, eq, ne, sql } from 'drizzle-orm';
import type Stripe from 'stripe';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { invoices, plans, stripeCustomers, subscriptions } from '#server/db/schema/index';
import { finishJoin } from '#server/services/join';

const moment = (seconds: number) => new Date(seconds * 1000);
const momentOrNull = (seconds: number | null | undefined) => (seconds ? moment(seconds) : null);
const LIVE = new Set(['trialing', 'active', 'past_due', 'unpaid', 'paused']);

/** When the open invoice of a past-due subscription was first left unpaid. */
function pastDueSince(subscription: Stripe.Subscription, list: Stripe.Invoice[]): Date | null {
  if (subscription.status !== 'past_due') return null;
  const open = list.filter((invoice) => invoice.status === 'open').map((invoice) => invoice.created);
  return open.length > 0 ? moment(Math.min(...open)) : null;
}

async function writeSubscription(
  tx: Transaction,
  memberId: string,
  subscription: Stripe.Subscription,
  list: Stripe.Invoice[],
  now: Date,
) {
  const item = subscription.items.data[0];
  if (!item) return;
  const [plan] = await tx
    .select({ id: plans.id })
    .from(plans)
    .where(eq(plans.stripeProductId, String(item.price.product)));
  const values = {
    memberId,
    planId: plan?.id ?? null,
    status: subscription.status as (typeof subscriptions.$inferInsert)['status'],
    startedAt: moment(subscription.start_date),
    trialEnd: momentOrNull(subscription.trial_end),
    currentPeriodStart: moment(item.current_period_start),
    currentPeriodEnd: moment(item.current_period_end),
    cancelAtPeriodEnd: subscription.cancel_at_period_end,
    endedAt: momentOrNull(subscription.ended_at),
    pastDueSince: pastDueSince(subscription, list),
    syncedAt: now,
  };
  await tx
    .insert(subscriptions)
    .values({ id: subscription.id, ...values })
    .onConflictDoUpdate({ target: subscriptions.id, set: values });
}

async function writeInvoice(tx: Transaction, memberId: string, invoice: Stripe.Invoice): Promise<void> {
  const parent = invoice.parent?.subscription_details?.subscription;
  const values = {
    memberId,
    subscriptionId: typeof parent === 'string' ? parent : (parent?.id ?? null),
    number: invoice.number,
    status: (invoice.status ?? 'draft') as (typeof invoices.$inferInsert)['status'],
    amountMinor: invoice.total,
    paidMinor: invoice.amount_paid,
    currency: invoice.currency,
    issuedAt: moment(invoice.created),
    paidAt: momentOrNull(invoice.status_transitions.paid_at),
    pageUrl: invoice.hosted_invoice_url ?? null,
  };
  await tx
    .insert(invoices)
    .values({ id: invoice.id ?? '', ...values })
    .onConflictDoUpdate({ target: invoices.id, set: values });
}

/**
 * Reads a customer's subscriptions and invoices anew and rewrites the mirror: the provider is the truth, an event only a
 * reason to look. Events that come late, twice or in another order therefore end in the same state. One customer at a time.
 */
export async function syncCustomer(app: App, customerId: string): Promise<void> {
  const [list, subs] = await Promise.all([
    app.stripe.invoices.list({ customer: customerId, limit: 24 }),
    app.stripe.subscriptions.list({ customer: customerId, status: 'all', limit: 10 }),
  ]);
  const now = app.clock.now();
  await app.transaction(async (tx, enqueue) => {
    await tx.execute(sql`select pg_advisory_xact_lock(hashtext(${customerId}))`);
    const [owner] = await tx
      .select({ memberId: stripeCustomers.memberId })
      .from(stripeCustomers)
      .where(eq(stripeCustomers.customerId, customerId));
    if (!owner) return;
    const ended = subs.data.filter(({ status }) => !LIVE.has(status));
    const live = subs.data.filter(({ status }) => LIVE.has(status));
    // Ended ones first, so that the rule 'one live subscription' holds at every moment.
    for (const subscription of [...ended, ...live]) {
      await writeSubscription(tx, owner.memberId, subscription, list.data, now);
    }
    for (const invoice of list.data) await writeInvoice(tx, owner.memberId, invoice);
    if (live.some(({ status }) => status === 'active' || status === 'trialing')) {
      await finishJoin(tx, enqueue, owner.memberId, now);
    }
  });
}

/** Members' other live subscriptions, for a guard before a second checkout. */
export const otherLive = (app: App, memberId: string, than = '') =>
  app.db
    .select({ id: subscriptions.id })
    .from(subscriptions)
    .where(
      and(
        eq(subscriptions.memberId, memberId),
        ne(subscriptions.id, than),
        sql`${subscriptions.status} in ('trialing','active','past_due')`,
      ),
    );
