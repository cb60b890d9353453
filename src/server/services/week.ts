import { and, eq, gte, isNull, sql } from 'drizzle-orm';
import type { Flight, FlightWeek } from '#domain/charts/flight';
import type { Post } from '#domain/charts/posts';
import { addDays, FLIGHT_WEEKS, isLanding, SESSIONS_A_WEEK } from '#domain/flight/calendar';
import { sessionLoad } from '#domain/load/session-load';
import { formatIsoDay } from '#domain/numbers/format';
import type { App } from '#server/app';
import { checkIns, marks } from '#server/db/schema/index';
import { currentFlight, flightPosition, flightSessions, type FlightRow } from './flights.ts';
import type { MemberState } from './members.ts';
import { dueTestDay, type DueTestDay } from './test-days.ts';
import type { SessionRow } from './training.ts';

/** Load of a week that is still to come: what three average sessions weigh; landings are lighter. */
const AHEAD_LOAD = { week: 330, landing: 230 } as const;

/** What a member's week holds, done and due. */
export interface WeekFacts {
  flight: FlightRow | null;
  week: number;
  over: boolean;
  weekStart: string | null;
  done: SessionRow[];
  sessions: SessionRow[];
  checkInSent: boolean;
  markWritten: boolean;
  testDay: DueTestDay;
}

/** The facts of the present week. At most five queries, whatever the member's history. */
export async function weekFacts(app: App, state: MemberState): Promise<WeekFacts> {
  const now = app.clock.now();
  const flight = await currentFlight(app.db, state.memberId);
  if (!flight) {
    const testDay: DueTestDay = { kind: 'baseline', week: 0, flightId: null };
    return {
      flight,
      week: 0,
      over: false,
      weekStart: null,
      done: [],
      sessions: [],
      checkInSent: false,
      markWritten: false,
      testDay,
    };
  }
  const { week, over, weekStart } = flightPosition(flight, now, state.timeZone);
  const [sessions, testDay, [due]] = await Promise.all([
    flightSessions(app.db, flight.id),
    dueTestDay(app.db, state, now),
    app.db
      .select({
        checkInSent: sql<boolean>`exists (select 1 from ${checkIns} where ${checkIns.memberId} = ${state.memberId} and ${checkIns.weekStart} = ${weekStart})`,
        markWritten: sql<boolean>`exists (select 1 from ${marks} where ${and(
          eq(marks.memberId, state.memberId),
          isNull(marks.voidedAt),
          gte(sql`(${marks.takenAt} at time zone ${state.timeZone})::date`, sql`${weekStart}::date`),
        )})`,
      })
      .from(sql`(select 1) as one`),
  ]);
  const rows = sessions.map(({ session }) => session);
  return {
    flight,
    week,
    over,
    weekStart,
    sessions: rows,
    done: rows.filter((session) => session.doneAt && session.week === week),
    checkInSent: due?.checkInSent ?? false,
    markWritten: due?.markWritten ?? false,
    testDay,
  };
}

/** The three posts of a week: share done, missed, or still to come. */
function postsOf(week: number, here: number, sessions: readonly SessionRow[]): Post[] {
  const done: Post[] = sessions
    .filter((one) => one.week === week && one.doneAt)
    .map((one) => one.shareDone ?? 0);
  const rest: Post = week < here ? 'missed' : 'to-come';
  return [
    ...done.slice(0, SESSIONS_A_WEEK),
    ...Array<Post>(Math.max(0, SESSIONS_A_WEEK - done.length)).fill(rest),
  ];
}

/** The flight as it is drawn. `titles` names the weeks by their lessons. */
export function flightPicture(
  facts: WeekFacts,
  titles: ReadonlyMap<number, string>,
  held: boolean,
): Flight | null {
  const { flight, sessions } = facts;
  if (!flight) return null;
  const here = Math.min(facts.week, FLIGHT_WEEKS);
  const weeks = Array.from({ length: FLIGHT_WEEKS }, (_, index): FlightWeek => {
    const week = index + 1;
    const landing = isLanding(week);
    const load = sessions
      .filter((one) => one.week === week && one.doneAt)
      .reduce((sum, one) => sum + (sessionLoad(one.effort ?? 0, one.minutes ?? 0) ?? 0), 0);
    const ahead = landing ? AHEAD_LOAD.landing : AHEAD_LOAD.week;
    return {
      week,
      title: titles.get(week) ?? (landing ? 'Test day' : `Week ${week}`),
      load: week < here ? Math.max(load, 60) : Math.max(load, ahead),
      sessions: week <= here ? postsOf(week, here, sessions) : [],
      ...(landing && { landing: { day: formatIsoDay(addDays(flight.startsOn, (week - 1) * 7)) } }),
    };
  });
  const doneInAll = sessions.filter((one) => one.doneAt).length;
  return {
    finding: `Tread ${here} of flight ${flight.number}. ${doneInAll} sessions done in it.`,
    weeks,
    here,
    hereWords: 'you, this week',
    ...(held && { gateAt: Math.min(FLIGHT_WEEKS, here + 1) }),
  };
}
