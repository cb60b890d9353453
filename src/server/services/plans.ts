import { asc, eq } from 'drizzle-orm';
import type { PlanInput } from '#contracts/plans';
import type { App } from '#server/app';
import { plans } from '#server/db/schema/index';
import { notFound } from '#server/errors';
import { audit } from './audit.ts';
import { requireRole, type Viewer } from './viewer.ts';

export type Plan = typeof plans.$inferSelect;

/** Plans that a visitor may buy, in the owner's order. */
export const plansOnSale = (app: App): Promise<Plan[]> =>
  app.db
    .select()
    .from(plans)
    .where(eq(plans.onSale, true))
    .orderBy(asc(plans.position), asc(plans.amountMinor));

export const allPlans = (app: App): Promise<Plan[]> =>
  app.db.select().from(plans).orderBy(asc(plans.position), asc(plans.amountMinor));

/** `€29` or `€29.50`. */
export function formatMoney(amountMinor: number, currency: string): string {
  return new Intl.NumberFormat('en-GB', {
    style: 'currency',
    currency: currency.toUpperCase(),
    trailingZeroDisplay: 'stripIfInteger',
  }).format(amountMinor / 100);
}

/** Gives a plan its product and price at the provider, once: the provider's reply is kept under the plan's own key. */
export async function ensurePrice(app: App, plan: Plan): Promise<Plan> {
  if (plan.stripePriceId) return plan;
  const productId =
    plan.stripeProductId ??
    (
      await app.stripe.products.create(
        { name: plan.name, metadata: { plan: plan.id } },
        { idempotencyKey: `product-${plan.id}` },
      )
    ).id;
  const price = await app.stripe.prices.create(
    {
      product: productId,
      currency: plan.currency,
      unit_amount: plan.amountMinor,
      recurring: { interval: plan.interval },
      metadata: { plan: plan.id },
    },
    { idempotencyKey: `price-${plan.id}-${plan.amountMinor}-${plan.interval}` },
  );
  const [row] = await app.db
    .update(plans)
    .set({ stripeProductId: productId, stripePriceId: price.id })
    .where(eq(plans.id, plan.id))
    .returning();
  if (!row) throw notFound();
  return row;
}

const slugOf = (name: string) =>
  name
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '');

/** Adds a plan and makes it payable. Owner only. */
export async function addPlan(app: App, viewer: Viewer, input: PlanInput): Promise<void> {
  requireRole(viewer, 'owner');
  const { id: _new, ...values } = input;
  const now = app.clock.now();
  const slug = `${slugOf(input.name)}-${app.random.token(3)}`;
  const [row] = await app.db
    .insert(plans)
    .values({ ...values, slug, createdAt: now })
    .returning();
  if (!row) throw new Error('the plan was not written');
  await ensurePrice(app, row);
  await audit(app.db, { at: now, actorId: viewer.id, action: 'added a plan', details: { plan: row.name } });
}

/** Changes a plan. A new amount or interval is a new price; members who have the old one keep it. Owner only. */
export async function changePlan(app: App, viewer: Viewer, input: PlanInput): Promise<void> {
  requireRole(viewer, 'owner');
  const { id, ...values } = input;
  const [before] = await app.db.select().from(plans).where(eq(plans.id, id));
  if (!before) throw notFound();
  const repriced = before.amountMinor !== values.amountMinor || before.interval !== values.interval;
  const [row] = await app.db
    .update(plans)
    .set({ ...values, ...(repriced && { stripePriceId: null }) })
    .where(eq(plans.id, id))
    .returning();
  if (!row) throw notFound();
  if (repriced && before.stripePriceId)
    await app.stripe.prices.update(before.stripePriceId, { active: false });
  await ensurePrice(app, row);
  await audit(app.db, {
    at: app.clock.now(),
    actorId: viewer.id,
    action: 'changed a plan',
    details: { plan: row.name, from: before.amountMinor, to: row.amountMinor },
  });
}
