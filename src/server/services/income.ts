import { sql } from 'drizzle-orm';
import { accessOf, type AccessState } from '#domain/access/access-of';
import type { PaidStretch } from '#domain/money/peg-columns';
import type { App } from '#server/app';
import { subscriptions } from '#server/db/schema/index';
import { requireRole, type Viewer } from './viewer.ts';

export interface MonthIncome extends Record<string, unknown> {
  /** First day of the month, ISO, in the practice's zone. */
  month: string;
  currency: string;
  /** What came in during the month, whenever it was asked for. */
  paidMinor: number;
  /** What was asked for in the month and is still open. */
  openMinor: number;
  invoices: number;
  /** Members with a plan at any time of the month. */
  members: number;
  /** Plans that ended in the month. */
  ended: number;
}

export const LEDGER_MONTHS = 12;
/** A checkout that was never finished is no plan. */
const BEGUN = sql`status not in ('incomplete', 'incomplete_expired')`;
/** Every stretch of a plan. The first of a member reaches back to what they paid before the provider's books begin. */
const STRETCHES = sql`(select s.*, least(started_at, case when started_at = min(started_at) over (partition by member_id)
  then (select min(issued_at) from invoices i where i.member_id = s.member_id) end) as began_at
  from subscriptions s where ${BEGUN})`;

/** Money, members and leavings month by month, newest first, summed by the database. Owner only. */
export async function incomeByMonth(app: App, viewer: Viewer): Promise<MonthIncome[]> {
  requireRole(viewer, 'owner');
  const now = app.clock.now().toISOString();
  const { rows } = await app.db.execute<MonthIncome>(sql`
    with home as (select coalesce((select time_zone from practice where id = 1), 'Europe/London') as zone),
    stretches as materialized ${STRETCHES},
    months as (select first, first at time zone zone as opens, (first + interval '1 month') at time zone zone as closes
      from home, generate_series(date_trunc('month', ${now}::timestamptz at time zone zone)
        - make_interval(months => ${LEDGER_MONTHS - 1}),
        date_trunc('month', ${now}::timestamptz at time zone zone), interval '1 month') as first)
    select to_char(first, 'YYYY-MM-DD') as month,
      coalesce((select min(currency) from invoices), 'gbp') as currency,
      (select coalesce(sum(paid_minor), 0)::float8 from invoices where paid_at >= opens and paid_at < closes) as "paidMinor",
      (select coalesce(sum(amount_minor - paid_minor), 0)::float8 from invoices
        where status = 'open' and issued_at >= opens and issued_at < closes) as "openMinor",
      (select count(*)::int from invoices
        where status <> 'draft' and issued_at >= opens and issued_at < closes) as invoices,
      (select count(distinct member_id)::int from stretches
        where began_at < least(closes, ${now}::timestamptz) and (ended_at is null or ended_at >= opens)) as members,
      (select count(*)::int from stretches where ended_at >= opens and ended_at < closes) as ended
    from months order by first desc`);
  return rows;
}

/** Members by the state of their plan, from the one rule that decides access. Owner only. */
export async function membersByState(app: App, viewer: Viewer): Promise<Map<AccessState, number>> {
  requireRole(viewer, 'owner');
  const now = app.clock.now();
  const rows = await app.db
    .selectDistinctOn([subscriptions.memberId])
    .from(subscriptions)
    .where(BEGUN)
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

export interface PlanStretch extends PaidStretch, Record<string, unknown> {
  name: string;
  amountMinor: number | null;
  currency: string | null;
  failedOn: string | null;
}

/** Every stretch of a plan that reached into the ledger's months, with the member's name. Owner only. */
export async function planStretches(app: App, viewer: Viewer): Promise<PlanStretch[]> {
  requireRole(viewer, 'owner');
  const now = app.clock.now().toISOString();
  const { rows } = await app.db.execute<PlanStretch>(sql`
    with home as (select coalesce((select time_zone from practice where id = 1), 'Europe/London') as zone)
    select s.member_id as "memberId", coalesce(u.name, u.email) as name,
      to_char(s.began_at at time zone zone, 'YYYY-MM-DD') as "from",
      to_char(s.trial_end at time zone zone, 'YYYY-MM-DD') as "trialUntil",
      to_char(s.ended_at at time zone zone, 'YYYY-MM-DD') as "endedOn",
      to_char(s.past_due_since at time zone zone, 'YYYY-MM-DD') as "failedOn",
      s.past_due_since is not null and s.ended_at is null as failed,
      p.amount_minor as "amountMinor", p.currency
    from home, ${STRETCHES} s join users u on u.id = s.member_id left join plans p on p.id = s.plan_id
    where s.began_at <= ${now}::timestamptz
      and (s.ended_at is null or s.ended_at >= ${now}::timestamptz - make_interval(months => ${LEDGER_MONTHS}))
    order by s.began_at, s.id`);
  return rows;
}
