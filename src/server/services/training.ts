import { and, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { SessionInput } from '#contracts/session';
import type { App } from '#server/app';
import type { Queryable, Transaction } from '#server/db/client';
import { alerts, sessionItems, targetOverrides, trainingSessions } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { isLanding } from '#domain/flight/calendar';
import { currentFlight, flightPosition } from './flights.ts';
import type { MemberState } from './members.ts';
import { planItems, type PlannedItem } from './plan-items.ts';

export type SessionRow = typeof trainingSessions.$inferSelect;
export type ItemRow = typeof sessionItems.$inferSelect;
export interface SessionWithItems {
  session: SessionRow;
  items: ItemRow[];
}

const HISTORY_ITEMS = 80;

const DONE_ALREADY =
  'This session is written down already, in another window or on another device. Nothing was changed.';

/** The newest done items of a member, newest first: what the load rule looks back on. */
export function doneItems(at: Queryable, memberId: string) {
  return at
    .select({ item: sessionItems, doneAt: trainingSessions.doneAt, sessionPain: trainingSessions.pain })
    .from(sessionItems)
    .innerJoin(trainingSessions, eq(trainingSessions.id, sessionItems.sessionId))
    .where(and(eq(trainingSessions.memberId, memberId), isNotNull(trainingSessions.doneAt)))
    .orderBy(desc(trainingSessions.doneAt), sessionItems.position)
    .limit(HISTORY_ITEMS);
}

/** One session with its items, of this member only. @throws AppError not-found */
export async function readSession(
  at: Queryable,
  memberId: string,
  sessionId: string,
): Promise<SessionWithItems> {
  const rows = await at
    .select({ session: trainingSessions, item: sessionItems })
    .from(trainingSessions)
    .innerJoin(sessionItems, eq(sessionItems.sessionId, trainingSessions.id))
    .where(and(eq(trainingSessions.id, sessionId), eq(trainingSessions.memberId, memberId)))
    .orderBy(sessionItems.position);
  const [first] = rows;
  if (!first) throw notFound();
  return { session: first.session, items: rows.map(({ item }) => item) };
}

/** The one planned session, or null. */
export async function plannedSession(at: Queryable, memberId: string): Promise<SessionWithItems | null> {
  const rows = await at
    .select({ session: trainingSessions, item: sessionItems })
    .from(trainingSessions)
    .innerJoin(sessionItems, eq(sessionItems.sessionId, trainingSessions.id))
    .where(and(eq(trainingSessions.memberId, memberId), isNull(trainingSessions.doneAt)))
    .orderBy(sessionItems.position);
  const [first] = rows;
  return first ? { session: first.session, items: rows.map(({ item }) => item) } : null;
}

/** Writes a planned session with its items; a coach's wish that it takes up is marked as taken. */
async function writePlan(
  tx: Transaction,
  session: typeof trainingSessions.$inferInsert,
  items: PlannedItem[],
  now: Date,
): Promise<SessionWithItems> {
  const [row] = await tx.insert(trainingSessions).values(session).returning();
  if (!row) throw new Error('the session was not written');
  const written = await tx
    .insert(sessionItems)
    .values(items.map(({ overrideId: _taken, ...item }) => ({ ...item, sessionId: row.id })))
    .returning();
  const taken = items.flatMap(({ overrideId }) => (overrideId ? [overrideId] : []));
  if (taken.length > 0) {
    await tx
      .update(targetOverrides)
      .set({ takenAt: now })
      .where(sql`${targetOverrides.id} in ${taken}`);
  }
  return { session: row, items: written.sort((a, b) => a.position - b.position) };
}

/** Plans the next session from tests, history and the coach's wishes. Null before the baseline and between flights. */
export async function planNextSession(
  tx: Transaction,
  state: MemberState,
  now: Date,
): Promise<SessionWithItems | null> {
  const flight = await currentFlight(tx, state.memberId);
  if (!flight) return null;
  const { week, over } = flightPosition(flight, now, state.timeZone);
  if (over || week < 1) return null;
  const [count] = await tx
    .select({ done: sql<number>`count(*)::int` })
    .from(trainingSessions)
    .where(
      and(
        eq(trainingSessions.flightId, flight.id),
        eq(trainingSessions.week, week),
        isNotNull(trainingSessions.doneAt),
      ),
    );
  const ordinal = Math.min(14, (count?.done ?? 0) + 1);
  const { title, items } = await planItems(tx, state, {
    flight,
    week,
    ordinal,
    landing: isLanding(week),
    now,
  });
  const session = { memberId: state.memberId, flightId: flight.id, week, ordinal, title, plannedAt: now };
  return writePlan(tx, session, items, now);
}

/**
 * The session that comes next. One planned for a week that is over is planned anew, since a landing or a gap changes what
 * it asks.
 */
export async function ensurePlanned(app: App, state: MemberState): Promise<SessionWithItems | null> {
  const now = app.clock.now();
  const [planned, flight] = await Promise.all([
    plannedSession(app.db, state.memberId),
    currentFlight(app.db, state.memberId),
  ]);
  if (!flight) return null;
  const { week, over } = flightPosition(flight, now, state.timeZone);
  if (planned && planned.session.flightId === flight.id && planned.session.week === week) return planned;
  if (over && !planned) return null;
  return app.db.transaction(async (tx) => {
    await tx.execute(sql`select pg_advisory_xact_lock(hashtext(${`plan:${state.memberId}`}))`);
    await tx
      .delete(trainingSessions)
      .where(and(eq(trainingSessions.memberId, state.memberId), isNull(trainingSessions.doneAt)));
    return planNextSession(tx, state, now);
  });
}

/** Done over asked of a whole session in per cent, each movement capped so that one cannot hide another. */
export function shareDone(items: readonly { asked: number; done: number }[]): number {
  if (items.length === 0) return 0;
  const shares = items.map(({ asked, done }) => Math.min(1.5, done / asked));
  return Math.round((shares.reduce((sum, share) => sum + share, 0) / shares.length) * 100);
}

/**
 * Writes down what was done and plans what follows. Strong pain alerts the coach.
 * @throws AppError not-found for another's session or one that was logged before
 */
export async function logSession(
  tx: Transaction,
  state: MemberState,
  sessionId: string,
  input: SessionInput,
  now: Date,
): Promise<{ id: string; next: SessionWithItems | null }> {
  const { items } = await readSession(tx, state.memberId, sessionId);
  const done = new Map(input.items.map((item) => [item.id, item]));
  const told = items.map((item) => ({ item, told: done.get(item.id) }));
  if (told.some((entry) => !entry.told) || input.items.length !== items.length) throw notFound();
  const share = shareDone(
    told.map(({ item, told: t }) => ({ asked: item.sets * item.amount, done: t?.doneTotal ?? 0 })),
  );
  const [row] = await tx
    .update(trainingSessions)
    .set({
      doneAt: now,
      minutes: input.minutes,
      effort: input.effort,
      pain: input.pain,
      painWhere: input.painWhere || null,
      note: input.note || null,
      shareDone: share,
    })
    .where(
      and(
        eq(trainingSessions.id, sessionId),
        eq(trainingSessions.memberId, state.memberId),
        isNull(trainingSessions.doneAt),
      ),
    )
    .returning({ id: trainingSessions.id });
  if (!row) throw new AppError('conflict', DONE_ALREADY);
  // Pain without a movement to its name counts for each of them: better one too light than one too heavy.
  const isNamed = input.items.some(({ pain }) => pain !== 'none');
  const values = told.map(
    ({ item, told: t }) =>
      sql`(${item.id}::uuid, ${t?.doneTotal ?? 0}::smallint, ${(isNamed ? t?.pain : input.pain) ?? 'none'})`,
  );
  await tx.execute(sql`update ${sessionItems} set done_total = v.done, pain = v.pain, effort_done = ${input.effort}
    from (values ${sql.join(values, sql`, `)}) as v(id, done, pain) where ${sessionItems.id} = v.id`);
  if (input.pain === 'strong') {
    const words = `Strong pain in a session: ${input.painWhere}`;
    await tx.insert(alerts).values({ memberId: state.memberId, kind: 'pain', words, raisedAt: now });
  }
  return { id: row.id, next: await planNextSession(tx, state, now) };
}
