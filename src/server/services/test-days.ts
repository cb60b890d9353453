import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { BENCHMARKS, REQUIRED_TESTS, TEST_IDS, type TestId } from '#domain/benchmark/tests';
import { FLIGHT_WEEKS, isLanding, localDate } from '#domain/flight/calendar';
import type { Queryable, Transaction } from '#server/db/client';
import { marks, testDays } from '#server/db/schema/index';
import { AppError } from '#server/errors';
import { currentFlight, flightPosition, startFlight } from './flights.ts';
import type { MemberState } from './members.ts';
import { planNextSession } from './training.ts';

/** What today's test day is: the baseline before the first flight, a landing, or none. */
export type DueTestDay =
  | { kind: 'baseline'; week: 0; flightId: null }
  | { kind: 'landing'; week: number; flightId: string }
  | { kind: 'none' };

/** Whether a test day is due now, and which. A landing may be taken until the next one comes. */
export async function dueTestDay(at: Queryable, state: MemberState, now: Date): Promise<DueTestDay> {
  const flight = await currentFlight(at, state.memberId);
  const finished = await at
    .select({ flightId: testDays.flightId, week: testDays.week })
    .from(testDays)
    .where(and(eq(testDays.memberId, state.memberId), sql`${testDays.finishedAt} is not null`));
  if (!flight) return { kind: 'baseline', week: 0, flightId: null };
  const { week } = flightPosition(flight, now, state.timeZone);
  const landing = Math.min(week, FLIGHT_WEEKS);
  const due = isLanding(landing) || week > FLIGHT_WEEKS ? landing : null;
  const done = finished.some((day) => day.flightId === flight.id && day.week === due);
  return due === null || done ? { kind: 'none' } : { kind: 'landing', week: due, flightId: flight.id };
}

/** The open test day and its marks so far, or null. */
export async function openTestDay(at: Queryable, memberId: string) {
  const rows = await at
    .select({ day: testDays, test: marks.test, value: marks.value, form: marks.form })
    .from(testDays)
    .leftJoin(marks, and(eq(marks.testDayId, testDays.id), isNull(marks.voidedAt)))
    .where(and(eq(testDays.memberId, memberId), isNull(testDays.finishedAt)))
    .orderBy(asc(marks.takenAt));
  const [first] = rows;
  if (!first) return null;
  const done = new Map(
    rows.flatMap(({ test, value, form }) => (test ? [[test as TestId, { value: value ?? 0, form }]] : [])),
  );
  return { day: first.day, done };
}

/** The open test day's id, begun now when it is due. @throws AppError conflict when none is due */
export async function ensureTestDay(tx: Transaction, state: MemberState, now: Date): Promise<string> {
  const open = await openTestDay(tx, state.memberId);
  if (open) return open.day.id;
  const due = await dueTestDay(tx, state, now);
  if (due.kind === 'none') throw new AppError('conflict', 'No test day is due. Write a weekly mark instead.');
  const [row] = await tx
    .insert(testDays)
    .values({
      memberId: state.memberId,
      flightId: due.flightId,
      week: due.week,
      takenOn: localDate(now, state.timeZone),
      createdAt: now,
    })
    .returning({ id: testDays.id });
  if (!row) throw new Error('the test day was not written');
  return row.id;
}

/** The tests of a test day in their order: the required ones, then what the member has done before or asked for. */
export function testsOfDay(state: MemberState): { required: TestId[]; optional: TestId[] } {
  const optional = TEST_IDS.filter((id) => {
    const test = BENCHMARKS[id];
    if (test.baseline === 'required') return false;
    if (test.offUntilAsked && !state.member.measuresBody) return false;
    return id !== 'pull-ups' || state.house?.bar === true;
  });
  const hasStairs = (state.house?.stairCount ?? 0) > 0;
  return { required: REQUIRED_TESTS.filter((id) => id !== 'stairs' || hasStairs), optional };
}

/**
 * Ends the test day. After the baseline the first flight begins today; either way the next session is planned anew.
 * @throws AppError invalid while a required test is missing
 */
export async function finishTestDay(
  tx: Transaction,
  state: MemberState,
  now: Date,
): Promise<{ week: number }> {
  const open = await openTestDay(tx, state.memberId);
  if (!open) throw new AppError('conflict', 'This test day is finished already.');
  const missing = testsOfDay(state).required.filter((id) => !open.done.has(id));
  if (missing.length > 0) {
    const names = missing.map((id) => BENCHMARKS[id].name.toLowerCase()).join(', ');
    throw new AppError('invalid', `Still missing: ${names}. They set the load of every session.`);
  }
  const { day } = open;
  const flightId =
    day.week === 0
      ? (
          await startFlight(tx, state.memberId, {
            emphasis: state.member.emphasis,
            now,
            timeZone: state.timeZone,
          })
        ).id
      : day.flightId;
  await tx.update(testDays).set({ finishedAt: now, flightId }).where(eq(testDays.id, day.id));
  if (day.week === 0) await planNextSession(tx, state, now);
  return { week: day.week };
}
