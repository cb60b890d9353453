import { and, eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { plans, practice, stripeCustomers, subscriptions } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { memberState } from '#server/services/members';
import { ensurePrice } from '#server/services/plans';
import type { Viewer } from '#server/services/viewer';
import { otherLive, syncCustomer } from './sync.ts';

/** The person's customer at the provider, made at the first need. In the demo it lives on the practice's test clock. */
export async function ensureCustomer(
  app: App,
  viewer: { id: string; email: string; name: string | null },
): Promise<string> {
  const [there] = await app.db.select().from(stripeCustomers).where(eq(stripeCustomers.memberId, viewer.id));
  if (there) return there.customerId;
  const [home] = app.env.demo ? await app.db.select({ clock: practice.testClockId }).from(practice) : [];
  const customer = await app.stripe.customers.create(
    {
      email: viewer.email,
      ...(viewer.name && { name: viewer.name }),
      metadata: { member: viewer.id },
      ...(home?.clock && { test_clock: home.clock }),
    },
    { idempotencyKey: `customer-${viewer.id}` },
  );
  await app.db
    .insert(stripeCustomers)
    .values({ memberId: viewer.id, customerId: customer.id, createdAt: app.clock.now() })
    .onConflictDoNothing();
  return customer.id;
}

/**
 * Opens a hosted checkout for a plan.
 * @returns the address to go to
 * @throws AppError held while a clearance is missing, conflict before the readiness questions and when a plan is running
 */
export async function openCheckout(app: App, viewer: Viewer, planId: string): Promise<string> {
  const [found] = await app.db
    .select()
    .from(plans)
    .where(and(eq(plans.id, planId), eq(plans.onSale, true)));
  if (!found) throw notFound();
  const state = await memberState(app, viewer.id);
  if (!state?.screen) throw new AppError('conflict', 'Answer the readiness questions first.');
  if (state.hold) throw new AppError('held', 'Your plan is held. Nothing is charged until you are cleared.');
  if ((await otherLive(app, viewer.id)).length > 0)
    throw new AppError('conflict', 'You have a plan already. Nothing was charged.');
  const plan = await ensurePrice(app, found);
  const customer = await ensureCustomer(app, viewer);
  const before = await app.db
    .select({ id: subscriptions.id })
    .from(subscriptions)
    .where(eq(subscriptions.memberId, viewer.id))
    .limit(1);
  const session = await app.stripe.checkout.sessions.create({
    mode: 'subscription',
    customer,
    client_reference_id: viewer.id,
    line_items: [{ price: plan.stripePriceId ?? '', quantity: 1 }],
    // A trial is for the first time only.
    ...(plan.trialDays > 0 &&
      before.length === 0 && { subscription_data: { trial_period_days: plan.trialDays } }),
    success_url: `${app.env.publicOrigin}/join/payment?session={CHECKOUT_SESSION_ID}`,
    cancel_url: `${app.env.publicOrigin}/join/plan`,
  });
  if (!session.url) throw new Error('the checkout has no address');
  return session.url;
}

/** Opens the provider's portal: card, invoices, cancelling. */
export async function openPortal(app: App, viewer: Viewer): Promise<string> {
  const customer = await ensureCustomer(app, viewer);
  const portal = await app.stripe.billingPortal.sessions.create({
    customer,
    return_url: `${app.env.publicOrigin}/account/membership`,
  });
  return portal.url;
}

/** Ends the plan with its paid period, or takes that back. */
export async function setCancelling(app: App, viewer: Viewer, cancelling: boolean): Promise<void> {
  const [live] = await otherLive(app, viewer.id);
  if (!live) throw new AppError('conflict', 'No plan is running.');
  await app.stripe.subscriptions.update(live.id, { cancel_at_period_end: cancelling });
  await syncMember(app, viewer.id);
}

/** Reads the person's subscriptions anew, if they have a customer. Both the waiting page and the webhook end here. */
export async function syncMember(app: App, memberId: string): Promise<void> {
  const [there] = await app.db.select().from(stripeCustomers).where(eq(stripeCustomers.memberId, memberId));
  if (there) await syncCustomer(app, there.customerId);
}
