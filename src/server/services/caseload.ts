import { and, asc, desc, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { Balustrade } from '#domain/charts/balustrade';
import { FLIGHT_WEEKS, localDate, weekOfFlight } from '#domain/flight/calendar';
import type { App } from '#server/app';
import { flights, holds, members, targetOverrides, trainingSessions, users } from '#server/db/schema/index';
import { loadOf, stripOf } from './dossier.ts';
import { pushUpsOf, type PushUps } from './push-up-marks.ts';
import type { SessionRow } from './training.ts';
import { requireRole, type Viewer } from './viewer.ts';

export interface CaseloadRow {
  memberId: string;
  name: string;
  about: string;
  /** Why the plan is held; null when it is not. */
  held: string | null;
  week: number;
  flight: number;
  /** Sessions missed of those asked so far in the flight. */
  missed: number;
  done: number;
  strip: Balustrade | null;
  pushUps: PushUps | null;
}

export type CaseloadOrder = 'slipping' | 'name';

/** So many rows on a page; only their push-ups are judged, which is what takes time. */
export const CASELOAD_PAGE = 40;

/** A page of a coach's members in the order asked for, and how many there are. Four queries. @throws AppError signed-out, forbidden */
export async function caseload(
  app: App,
  viewer: Viewer,
  order: CaseloadOrder = 'slipping',
  page = 1,
): Promise<{ rows: CaseloadRow[]; total: number }> {
  requireRole(viewer, 'coach');
  const now = app.clock.now();
  const people = await app.db
    .selectDistinctOn([members.userId], {
      id: members.userId,
      name: users.name,
      about: members.about,
      zone: users.timeZone,
      holdReason: holds.reason,
      heldSince: holds.startedAt,
      flight: flights,
    })
    .from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .leftJoin(holds, and(eq(holds.memberId, members.userId), isNull(holds.endedAt)))
    .leftJoin(flights, eq(flights.memberId, members.userId))
    .where(eq(members.coachId, viewer.id))
    .orderBy(members.userId, desc(flights.number));
  const ids = people.flatMap(({ flight }) => (flight ? [flight.id] : []));
  const memberIds = people.map(({ id }) => id);
  const [sessions, changes] = await Promise.all([
    ids.length === 0
      ? []
      : app.db
          .select()
          .from(trainingSessions)
          .where(and(inArray(trainingSessions.flightId, ids), isNotNull(trainingSessions.doneAt)))
          .orderBy(asc(trainingSessions.doneAt)),
    memberIds.length === 0
      ? []
      : app.db
          .select({ memberId: targetOverrides.memberId, at: targetOverrides.createdAt })
          .from(targetOverrides)
          .where(inArray(targetOverrides.memberId, memberIds)),
  ]);
  const byFlight = new Map<string, SessionRow[]>();
  for (const session of sessions) {
    const rows = byFlight.get(session.flightId);
    if (rows) rows.push(session);
    else byFlight.set(session.flightId, [session]);
  }
  const changed = new Map<string, Date[]>();
  for (const { memberId, at } of changes) changed.set(memberId, [...(changed.get(memberId) ?? []), at]);
  const most = Math.max(1, ...[...byFlight.values()].flatMap((rows) => weekLoads(rows)));
  const all = people
    .map((person): CaseloadRow => {
      const rows = person.flight ? (byFlight.get(person.flight.id) ?? []) : [];
      const week = person.flight
        ? Math.min(FLIGHT_WEEKS, weekOfFlight(person.flight.startsOn, localDate(now, person.zone)))
        : 0;
      const missed = Math.max(0, (week - 1) * 3 - rows.filter((row) => row.week < week).length);
      const finding = `${rows.length} sessions done, ${missed} missed.`;
      const weekOf = (at: Date) =>
        person.flight ? weekOfFlight(person.flight.startsOn, localDate(at, person.zone)) : 0;
      const strip = person.flight ? stripOf(rows, week, finding, most) : null;
      const heldFrom = person.heldSince ? weekOf(person.heldSince) : Infinity;
      return {
        memberId: person.id,
        name: person.name ?? 'Somebody new',
        about: person.about ?? '',
        held: person.holdReason,
        week,
        flight: person.flight?.number ?? 0,
        missed,
        done: rows.length,
        strip: strip && {
          ...strip,
          weeks: strip.weeks.map((one) => ({ ...one, held: one.index + 1 >= heldFrom })),
          turns: [...new Set((changed.get(person.id) ?? []).map(weekOf))]
            .filter((at) => at >= 1 && at <= week)
            .map((at) => at - 1),
        },
        pushUps: null,
      };
    })
    .sort((a, b) => (order === 'name' ? 0 : slipped(b) - slipped(a)) || a.name.localeCompare(b.name));
  const at = Math.max(1, Math.min(page, Math.ceil(all.length / CASELOAD_PAGE)));
  const rows = all.slice((at - 1) * CASELOAD_PAGE, at * CASELOAD_PAGE);
  const pushUps = await pushUpsOf(
    app,
    rows.map(({ memberId }) => memberId),
  );
  return {
    rows: rows.map((row) => ({ ...row, pushUps: pushUps.get(row.memberId) ?? null })),
    total: all.length,
  };
}

/** Who is held stands first, then who missed the largest share of what was asked. */
const slipped = ({ held, missed, week }: CaseloadRow) =>
  (held === null ? 0 : 1) + missed / Math.max(1, week * 3);

function weekLoads(rows: readonly SessionRow[]): number[] {
  return Array.from({ length: FLIGHT_WEEKS }, (_, index) =>
    loadOf(rows.filter((row) => row.week === index + 1)),
  );
}
