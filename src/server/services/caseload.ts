import { and, asc, desc, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { Balustrade } from '#domain/charts/balustrade';
import { FLIGHT_WEEKS, localDate, weekOfFlight } from '#domain/flight/calendar';
import type { App } from '#server/app';
import { flights, holds, members, trainingSessions, users } from '#server/db/schema/index';
import { loadOf, stripOf } from './dossier.ts';
import type { SessionRow } from './training.ts';
import { requireRole, type Viewer } from './viewer.ts';

export interface CaseloadRow {
  memberId: string;
  name: string;
  about: string;
  held: boolean;
  week: number;
  flight: number;
  /** Sessions missed of those asked so far in the flight. */
  missed: number;
  strip: Balustrade | null;
}

/** All members of a coach, those who slipped most first. Two queries. @throws AppError signed-out, forbidden */
export async function caseload(app: App, viewer: Viewer): Promise<CaseloadRow[]> {
  requireRole(viewer, 'coach');
  const now = app.clock.now();
  const people = await app.db
    .selectDistinctOn([members.userId], {
      id: members.userId,
      name: users.name,
      about: members.about,
      zone: users.timeZone,
      hold: holds.id,
      flight: flights,
    })
    .from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .leftJoin(holds, and(eq(holds.memberId, members.userId), isNull(holds.endedAt)))
    .leftJoin(flights, eq(flights.memberId, members.userId))
    .where(eq(members.coachId, viewer.id))
    .orderBy(members.userId, desc(flights.number));
  const ids = people.flatMap(({ flight }) => (flight ? [flight.id] : []));
  const sessions =
    ids.length === 0
      ? []
      : await app.db
          .select()
          .from(trainingSessions)
          .where(and(inArray(trainingSessions.flightId, ids), isNotNull(trainingSessions.doneAt)))
          .orderBy(asc(trainingSessions.doneAt));
  const byFlight = new Map<string, SessionRow[]>();
  for (const session of sessions)
    byFlight.set(session.flightId, [...(byFlight.get(session.flightId) ?? []), session]);
  const most = Math.max(1, ...[...byFlight.values()].flatMap((rows) => weekLoads(rows)));
  return people
    .map((person): CaseloadRow => {
      const rows = person.flight ? (byFlight.get(person.flight.id) ?? []) : [];
      const week = person.flight
        ? Math.min(FLIGHT_WEEKS, weekOfFlight(person.flight.startsOn, localDate(now, person.zone)))
        : 0;
      const missed = Math.max(0, (week - 1) * 3 - rows.filter((row) => row.week < week).length);
      const finding = `${rows.length} sessions done, ${missed} missed.`;
      return {
        memberId: person.id,
        name: person.name ?? 'Somebody new',
        about: person.about ?? '',
        held: person.hold !== null,
        week,
        flight: person.flight?.number ?? 0,
        missed,
        strip: person.flight ? stripOf(rows, week, finding, most) : null,
      };
    })
    .sort(
      (a, b) =>
        b.missed / Math.max(1, b.week) - a.missed / Math.max(1, a.week) || a.name.localeCompare(b.name),
    );
}

function weekLoads(rows: readonly SessionRow[]): number[] {
  return Array.from({ length: FLIGHT_WEEKS }, (_, index) =>
    loadOf(rows.filter((row) => row.week === index + 1)),
  );
}
