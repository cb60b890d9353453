import { desc, eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { invoices, plans } from '#server/db/schema/index';
import type { Plan } from './plans.ts';

const SHOWN = 24;

/** The member's own invoices, newest first. */
export const listInvoices = (app: App, memberId: string) =>
  app.db
    .select()
    .from(invoices)
    .where(eq(invoices.memberId, memberId))
    .orderBy(desc(invoices.issuedAt))
    .limit(SHOWN);

export async function planOf(app: App, planId: string | null): Promise<Plan | null> {
  if (!planId) return null;
  const [row] = await app.db.select().from(plans).where(eq(plans.id, planId));
  return row ?? null;
}
