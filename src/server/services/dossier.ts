import { and, eq, isNull } from 'drizzle-orm';
import type { Balustrade } from '#domain/charts/balustrade';
import type { Post } from '#domain/charts/posts';
import { FLIGHT_WEEKS, SESSIONS_A_WEEK } from '#domain/flight/calendar';
import { sessionLoad } from '#domain/load/session-load';
import type { App } from '#server/app';
import { alerts } from '#server/db/schema/index';
import { currentFlight, flightPosition, flightSessions } from './flights.ts';
import { marksBoard } from './marks-board.ts';
import type { MemberState } from './members.ts';
import { readThread } from './messages.ts';
import { plannedSession, type SessionRow } from './training.ts';

/** Load of a week from its sessions. */
export const loadOf = (sessions: readonly Pick<SessionRow, 'effort' | 'minutes'>[]): number =>
  sessions.reduce((sum, one) => sum + (sessionLoad(one.effort ?? 0, one.minutes ?? 0) ?? 0), 0);

/** A flight's done sessions as one strip of posts. */
export function stripOf(
  sessions: readonly SessionRow[],
  here: number,
  finding: string,
  mostLoad?: number,
): Balustrade {
  const weeks = Array.from({ length: Math.min(here, FLIGHT_WEEKS) }, (_, index) => {
    const mine = sessions.filter((one) => one.week === index + 1 && one.doneAt);
    const rest: Post = index + 1 < here ? 'missed' : 'to-come';
    const posts: Post[] = [
      ...mine.slice(0, SESSIONS_A_WEEK).map((one): Post => one.shareDone ?? 0),
      ...Array<Post>(Math.max(0, SESSIONS_A_WEEK - mine.length)).fill(rest),
    ];
    return { index, label: String(index + 1), posts, load: loadOf(mine) };
  });
  return {
    finding,
    weeks,
    span: FLIGHT_WEEKS,
    mostLoad: mostLoad ?? Math.max(1, ...weeks.map(({ load }) => load)),
  };
}

export type Dossier = Awaited<ReturnType<typeof readDossier>>;

/** One member on one screen: thread, marks, sessions, what is asked next, open alerts. */
export async function readDossier(app: App, state: MemberState) {
  const flight = await currentFlight(app.db, state.memberId);
  const [thread, boards, planned, sessions, open] = await Promise.all([
    readThread(app, state.memberId),
    marksBoard(app, state),
    plannedSession(app.db, state.memberId),
    flight ? flightSessions(app.db, flight.id) : Promise.resolve([]),
    app.db
      .select()
      .from(alerts)
      .where(and(eq(alerts.memberId, state.memberId), isNull(alerts.settledAt))),
  ]);
  const week = flight ? flightPosition(flight, app.clock.now(), state.timeZone).week : 0;
  const rows = sessions.map(({ session }) => session);
  const done = rows.filter((session) => session.doneAt).length;
  const strip = flight
    ? stripOf(
        rows,
        week,
        `${done} sessions in flight ${flight.number}, now in week ${Math.min(week, FLIGHT_WEEKS)}.`,
      )
    : null;
  const newest = sessions
    .filter(({ session }) => session.doneAt)
    .slice(-3)
    .reverse();
  return { flight, week, thread, boards, planned, strip, newest, open };
}
