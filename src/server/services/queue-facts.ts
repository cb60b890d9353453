import { and, gte, inArray, isNull, sql } from 'drizzle-orm';
import { accessOf } from '#domain/access/access-of';
import { BENCHMARKS, isTestId, type TestId } from '#domain/benchmark/tests';
import { judgeChange } from '#domain/change/judge-change';
import { priorTypicalError } from '#domain/change/test-errors';
import { daysBetween, FLIGHT_WEEKS, isLanding, localDate, weekOfFlight } from '#domain/flight/calendar';
import type { QueueFacts } from '#domain/queue/rank-queue';
import type { App } from '#server/app';
import { alerts, marks } from '#server/db/schema/index';

const DAY_MS = 86_400_000;
/** How far back a drop is looked for. */
const MARKS_DAYS = 150;

/** One row a member, as the query below gives it. */
interface BaseRow extends Record<string, unknown> {
  member_id: string;
  name: string | null;
  time_zone: string;
  joined_at: Date | null;
  hold_since: Date | null;
  hold_cause: string | null;
  hold_reason: string | null;
  unanswered_at: Date | null;
  unanswered_week: string | null;
  unread_since: Date | null;
  last_session: Date | null;
  flight_start: string | null;
  sessions_last_week: number | null;
  tested_weeks: number[] | null;
  rung_ready: string | null;
  questions_due: string | null;
  sub_status: 'active' | null;
  sub_end: Date | null;
  sub_trial: Date | null;
  sub_cancel: boolean | null;
  sub_ended: Date | null;
  sub_past_due: Date | null;
}

/** Every member of a coach with what the queue needs, in one statement: laterals over indexes, no loop. */
const baseRows = (app: App, coachId: string) =>
  app.db.execute<BaseRow>(sql`
    select m.user_id as member_id, u.name, u.time_zone, m.joined_at,
      h.started_at as hold_since, h.cause as hold_cause, h.reason as hold_reason,
      c.sent_at as unanswered_at, c.week_start::text as unanswered_week, msg.since as unread_since,
      s.last_session, f.starts_on::text as flight_start, s.sessions_last_week, t.weeks as tested_weeks,
      p.movement as rung_ready, q.valid_until::text as questions_due,
      sub.status as sub_status, sub.current_period_end as sub_end, sub.trial_end as sub_trial,
      sub.cancel_at_period_end as sub_cancel, sub.ended_at as sub_ended, sub.past_due_since as sub_past_due
    from members m
    join users u on u.id = m.user_id
    left join holds h on h.member_id = m.user_id and h.ended_at is null
    left join lateral (select sent_at, week_start from check_ins where member_id = m.user_id and answered_at is null
      order by sent_at limit 1) c on true
    left join lateral (select min(sent_at) as since from messages where member_id = m.user_id and read_at is null
      and not by_coach) msg on true
    left join lateral (select id, starts_on from flights where member_id = m.user_id order by number desc limit 1) f on true
    left join lateral (select max(done_at) as last_session,
      count(*) filter (where flight_id = f.id and week = ((${app.clock.now().toISOString()}::timestamptz at time zone u.time_zone)::date - f.starts_on) / 7)::int as sessions_last_week
      from training_sessions where member_id = m.user_id and done_at is not null) s on true
    left join lateral (select array_agg(week) as weeks from test_days where flight_id = f.id and finished_at is not null) t on true
    left join lateral (select i.movement from training_sessions ts join session_items i on i.session_id = ts.id
      where ts.member_id = m.user_id and ts.done_at is null and i.rule = 'up-rung' and i.overridden_by is null limit 1) p on true
    left join lateral (select valid_until from readiness_screens where member_id = m.user_id order by answered_at desc limit 1) q on true
    left join lateral (select * from subscriptions where member_id = m.user_id and status not in ('incomplete', 'incomplete_expired')
      order by (status in ('trialing', 'active', 'past_due')) desc, started_at desc limit 1) sub on true
    where m.coach_id = ${coachId}`);

type MarkRow = {
  memberId: string;
  test: string;
  form: string | null;
  value: number;
  takenAt: Date;
  testDayId: string | null;
};

/** Whether the last mark lies below by the test's own error; only then is the model asked, which takes a millisecond. */
function fellByError(test: TestId, before: number, now: number): boolean {
  const fall = BENCHMARKS[test].better === 'less' ? now - before : before - now;
  return fall >= priorTypicalError(test, before);
}

/** The first test that really dropped against the test day before, in words. */
function dropOf(rows: readonly MarkRow[]): QueueFacts['realDrop'] {
  for (const test of new Set(rows.map((row) => row.test))) {
    if (!isTestId(test) || BENCHMARKS[test].better === 'neither') continue;
    const mine = rows.filter((row) => row.test === test);
    const days = mine.filter((row) => row.testDayId !== null);
    const [since, last] = [days.at(-2) ?? mine[0], mine.at(-1)];
    if (mine.length < 3 || !since || !last || !fellByError(test, since.value, last.value)) continue;
    const { verdict, sentence } = judgeChange({
      testId: test,
      better: BENCHMARKS[test].better === 'less' ? 'less' : 'more',
      marks: mine.map((row) => ({
        atDays: row.takenAt.getTime() / DAY_MS,
        value: row.value,
        form: row.form,
      })),
      since: since.takenAt.getTime() / DAY_MS,
    });
    if (verdict === 'really lower') return { test: BENCHMARKS[test].name.toLowerCase(), sentence };
  }
  return null;
}

/** Three test days running whose best test stayed within a tenth of the one before. */
function stalledLandings(rows: readonly MarkRow[]): number {
  const values = rows
    .filter((row) => row.test === 'push-ups' && row.testDayId !== null)
    .map((row) => row.value);
  const last = values.slice(-4);
  return last.length === 4 && Math.max(...last.slice(1)) <= (last[0] ?? 0) * 1.1 ? 3 : 0;
}

const soonDays = 14;

function factsOf(
  row: BaseRow,
  now: Date,
  open: QueueFacts['openAlerts'],
  rows: readonly MarkRow[],
): QueueFacts {
  const today = localDate(now, row.time_zone);
  const week = row.flight_start ? weekOfFlight(row.flight_start, today) : 0;
  const moment = (value: Date | null) => (value ? new Date(value) : null);
  const access = accessOf({
    subscription:
      row.sub_status && row.sub_end
        ? {
            status: row.sub_status,
            currentPeriodEnd: new Date(row.sub_end),
            trialEnd: moment(row.sub_trial),
            cancelAtPeriodEnd: row.sub_cancel ?? false,
            endedAt: moment(row.sub_ended),
            pastDueSince: moment(row.sub_past_due),
          }
        : null,
    held: row.hold_since !== null,
    now,
  });
  const training = access.mayTrain;
  const landing = Math.min(week, FLIGHT_WEEKS);
  const lastSession = moment(row.last_session);
  return {
    memberId: row.member_id,
    name: row.name ?? 'Somebody new',
    openAlerts: open,
    hold: row.hold_since
      ? { since: new Date(row.hold_since), cause: row.hold_cause ?? '', reason: row.hold_reason ?? '' }
      : null,
    unanswered: row.unanswered_at
      ? { sentAt: new Date(row.unanswered_at), weekStart: row.unanswered_week ?? today }
      : null,
    unreadMessages: row.unread_since ? { since: new Date(row.unread_since) } : null,
    daysSinceSession:
      training && lastSession ? daysBetween(localDate(lastSession, row.time_zone), today) : null,
    sessionsLastWeek: training && week > 1 && week <= FLIGHT_WEEKS ? (row.sessions_last_week ?? 0) : null,
    realDrop: dropOf(rows),
    testDayDue: training && isLanding(landing) && !(row.tested_weeks ?? []).includes(landing),
    stalledLandings: training ? stalledLandings(rows) : 0,
    rungReady: training && row.rung_ready ? { movement: row.rung_ready } : null,
    firstWeek:
      training &&
      (week === 1 || row.flight_start === null) &&
      row.joined_at !== null &&
      now.getTime() - new Date(row.joined_at).getTime() < 10 * DAY_MS,
    payment: access.state === 'past-due' ? 'past-due' : access.state === 'lapsed' ? 'lapsed' : 'ok',
    questionsDueOn:
      row.questions_due && daysBetween(today, row.questions_due) <= soonDays ? row.questions_due : null,
  };
}

/** The facts of all members of a coach: three queries, whatever their number. */
export async function queueFacts(app: App, coachId: string): Promise<QueueFacts[]> {
  const now = app.clock.now();
  const { rows } = await baseRows(app, coachId);
  const ids = rows.map((row) => row.member_id);
  if (ids.length === 0) return [];
  const [open, recent] = await Promise.all([
    app.db
      .select()
      .from(alerts)
      .where(and(inArray(alerts.memberId, ids), isNull(alerts.settledAt))),
    app.db
      .select({
        memberId: marks.memberId,
        test: marks.test,
        form: marks.form,
        value: marks.value,
        takenAt: marks.takenAt,
        testDayId: marks.testDayId,
      })
      .from(marks)
      .where(
        and(
          inArray(marks.memberId, ids),
          isNull(marks.voidedAt),
          gte(marks.takenAt, new Date(now.getTime() - MARKS_DAYS * DAY_MS)),
        ),
      )
      .orderBy(marks.takenAt),
  ]);
  const alertsOf = groupBy(open, (alert) => alert.memberId);
  const marksOf = groupBy(recent, (mark) => mark.memberId);
  return rows.map((row) =>
    factsOf(
      row,
      now,
      (alertsOf.get(row.member_id) ?? []).map(({ kind, words, raisedAt }) => ({ kind, words, at: raisedAt })),
      marksOf.get(row.member_id) ?? [],
    ),
  );
}

function groupBy<T>(rows: readonly T[], key: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(key(row));
    if (group) group.push(row);
    else groups.set(key(row), [row]);
  }
  return groups;
}
