import { and, asc, eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { plans } from '#server/db/schema/index';

/** The lowest monthly price on sale, in words (`€29 a month`), or null when nothing is on sale. */
export async function lowestPrice(app: App): Promise<string | null> {
  const [plan] = await app.db
    .select({ amountMinor: plans.amountMinor, currency: plans.currency })
    .from(plans)
    .where(and(eq(plans.onSale, true), eq(plans.interval, 'month')))
    .orderBy(asc(plans.amountMinor))
    .limit(1);
  if (!plan) return null;
  const amount = new Intl.NumberFormat('en-GB', {
    style: 'currency',
    currency: plan.currency.toUpperCase(),
    trailingZeroDisplay: 'stripIfInteger',
  }).format(plan.amountMinor / 100);
  return `${amount} a month`;
}
