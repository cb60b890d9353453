import { sql } from 'drizzle-orm';
import { accessOf, type AccessState } from '#domain/access/access-of';
import type { App } from '#server/app';
import { subscriptions } from '#server/db/schema/index';

export interface MonthIncome extends Record<string, unknown> {
  /** First day of the month, ISO. */
  month: string;
  currency: string;
  paidMinor: number;
  openMinor: number;
  invoices: number;
  ended: number;
}

const MONTHS = 10;

/** Income and ended plans month by month, newest first, summed by the database. */
export async function incomeByMonth(app: App): Promise<MonthIncome[]> {
  const now = app.clock.now().toISOString();
  const { rows } = await app.db.execute<MonthIncome>(sql`
    with months as (select generate_series(date_trunc('month', ${now}::timestamptz) - make_interval(months => ${MONTHS - 1}),
      date_trunc('month', ${now}::timestamptz), interval '1 month') as month)
    select to_char(m.month, 'YYYY-MM-DD') as month, coalesce(max(i.currency), 'gbp') as currency,
      coalesce(sum(i.paid_minor), 0)::int as "paidMinor",
      coalesce(sum(i.amount_minor - i.paid_minor) filter (where i.status = 'open'), 0)::int as "openMinor",
      count(i.id)::int as invoices,
      (select count(*)::int from subscriptions s where s.ended_at >= m.month and s.ended_at < m.month + interval '1 month') as ended
    from months m left join invoices i on i.issued_at >= m.month and i.issued_at < m.month + interval '1 month'
    group by m.month order by m.month desc`);
  return rows;
}

/** Members by the state of their plan, from the one rule that decides access. */
export async function membersByState(app: App): Promise<Map<AccessState, number>> {
  const now = app.clock.now();
  const rows = await app.db
    .selectDistinctOn([subscriptions.memberId])
    .from(subscriptions)
    .orderBy(
      subscriptions.memberId,
      sql`(${subscriptions.status} in ('trialing', 'active', 'past_due')) desc`,
      sql`${subscriptions.startedAt} desc`,
    );
  const counts = new Map<AccessState, number>();
  for (const row of rows) {
    const { state } = accessOf({ subscription: row, held: false, now });
    counts.set(state, (counts.get(state) ?? 0) + 1);
  }
  return counts;
}
