import { and, asc, desc, eq } from 'drizzle-orm';
import { addDays, FLIGHT_WEEKS, localDate, weekOfFlight, weekStart } from '#domain/flight/calendar';
import type { Queryable, Transaction } from '#server/db/client';
import { flights, sessionItems, trainingSessions } from '#server/db/schema/index';
import { AppError } from '#server/errors';

export type FlightRow = typeof flights.$inferSelect;

/** The member's newest flight, or null before the baseline. */
export async function currentFlight(at: Queryable, memberId: string): Promise<FlightRow | null> {
  const [row] = await at
    .select()
    .from(flights)
    .where(eq(flights.memberId, memberId))
    .orderBy(desc(flights.number))
    .limit(1);
  return row ?? null;
}

/** Where in the flight a member stands today, in their own zone. Over is true once its twelve weeks have passed. */
export function flightPosition(flight: FlightRow, now: Date, timeZone: string) {
  const today = localDate(now, timeZone);
  const week = weekOfFlight(flight.startsOn, today);
  return { today, week, over: week > FLIGHT_WEEKS, weekStart: weekStart(flight.startsOn, today) };
}

/**
 * The first local day of the member's present week: the flight's week, or Monday's before the first flight. Check-ins
 * and marks are counted by it.
 */
export async function currentWeekStart(
  at: Queryable,
  person: { id: string; timeZone: string },
  now: Date,
): Promise<string> {
  const flight = await currentFlight(at, person.id);
  if (flight) return flightPosition(flight, now, person.timeZone).weekStart;
  const today = localDate(now, person.timeZone);
  const weekday = (new Date(`${today}T00:00:00Z`).getUTCDay() + 6) % 7;
  return addDays(today, -weekday);
}

/** Starts the next flight today. @throws AppError conflict while one is still running */
export async function startFlight(
  tx: Transaction,
  memberId: string,
  { emphasis, now, timeZone }: { emphasis: FlightRow['emphasis']; now: Date; timeZone: string },
): Promise<FlightRow> {
  const last = await currentFlight(tx, memberId);
  if (last && !flightPosition(last, now, timeZone).over) {
    throw new AppError('conflict', 'The present flight is still running.');
  }
  const [row] = await tx
    .insert(flights)
    .values({
      memberId,
      number: (last?.number ?? 0) + 1,
      startsOn: localDate(now, timeZone),
      emphasis,
      createdAt: now,
    })
    .returning();
  if (!row) throw new Error('the flight was not written');
  return row;
}

/** Sessions of one flight with their items, oldest first. Two queries. */
export async function flightSessions(at: Queryable, flightId: string) {
  const rows = await at
    .select({ session: trainingSessions, item: sessionItems })
    .from(trainingSessions)
    .leftJoin(sessionItems, eq(sessionItems.sessionId, trainingSessions.id))
    .where(and(eq(trainingSessions.flightId, flightId)))
    .orderBy(asc(trainingSessions.plannedAt), asc(sessionItems.position));
  const byId = new Map<
    string,
    { session: (typeof rows)[number]['session']; items: NonNullable<(typeof rows)[number]['item']>[] }
  >();
  for (const { session, item } of rows) {
    const entry = byId.get(session.id) ?? { session, items: [] };
    if (item) entry.items.push(item);
    byId.set(session.id, entry);
  }
  return [...byId.values()];
}
