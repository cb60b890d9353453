import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { accessOf, type Access } from '#domain/access/access-of';
import type { App } from '#server/app';
import { holds, houses, members, readinessScreens, subscriptions, users } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { requireRole, type Viewer } from './viewer.ts';

type Row<T extends { $inferSelect: unknown }> = T['$inferSelect'];

/** What nearly every page about a member needs, read by two queries. */
export interface MemberState {
  memberId: string;
  name: string;
  timeZone: string;
  member: Row<typeof members>;
  coachName: string | null;
  house: Row<typeof houses> | null;
  hold: Row<typeof holds> | null;
  subscription: Row<typeof subscriptions> | null;
  screen: Row<typeof readinessScreens> | null;
  access: Access;
}

const coaches = alias(users, 'coaches');

/** The subscription that counts: the live one, else the newest. */
const newestSubscription = sql`case when ${subscriptions.status} in ('trialing','active','past_due','unpaid','paused') then 0 else 1 end`;

/** Everything about one member's standing with the practice. Null when there is no member row yet. */
export async function memberState(app: App, memberId: string): Promise<MemberState | null> {
  const [[row], [paid], [screen]] = await Promise.all([
    app.db
      .select({ member: members, user: users, coachName: coaches.name, house: houses, hold: holds })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .leftJoin(coaches, eq(coaches.id, members.coachId))
      .leftJoin(houses, eq(houses.memberId, members.userId))
      .leftJoin(holds, and(eq(holds.memberId, members.userId), isNull(holds.endedAt)))
      .where(eq(members.userId, memberId)),
    app.db
      .select()
      .from(subscriptions)
      .where(
        and(
          eq(subscriptions.memberId, memberId),
          sql`${subscriptions.status} not in ('incomplete', 'incomplete_expired')`,
        ),
      )
      .orderBy(newestSubscription, desc(subscriptions.startedAt))
      .limit(1),
    app.db
      .select()
      .from(readinessScreens)
      .where(eq(readinessScreens.memberId, memberId))
      .orderBy(desc(readinessScreens.answeredAt))
      .limit(1),
  ]);
  if (!row) return null;
  const { user, ...rest } = row;
  return {
    memberId,
    name: user.name ?? 'A member',
    timeZone: user.timeZone,
    ...rest,
    subscription: paid ?? null,
    screen: screen ?? null,
    access: accessOf({
      subscription: paid ?? null,
      held: row.hold !== null,
      now: app.clock.now(),
      timeZone: user.timeZone,
    }),
  };
}

/** The member who is signed in, with their state. @throws AppError signed-out, forbidden; not-found before joining */
export async function requireMemberState(
  app: App,
  viewer: Viewer | null,
): Promise<MemberState & { viewer: Viewer }> {
  const person = requireRole(viewer, 'member');
  const state = await memberState(app, person.id);
  if (!state) throw notFound();
  return { ...state, viewer: person };
}

/** The same, for what needs a paid plan and no hold. @throws AppError payment-needed, held */
export async function requireTraining(
  app: App,
  viewer: Viewer | null,
): Promise<MemberState & { viewer: Viewer }> {
  const state = await requireMemberState(app, viewer);
  if (state.hold) throw new AppError('held', 'Your plan is held. Training waits for the clearance.');
  if (!state.access.mayTrain) throw new AppError('payment-needed', state.access.sentence);
  return state;
}

/** A member of the coach who asks. @throws AppError not-found for every other member, absent or not */
export async function requireOwnMember(
  app: App,
  viewer: Viewer | null,
  memberId: string,
): Promise<MemberState> {
  const coach = requireRole(viewer, 'coach');
  const state = /^[0-9a-f-]{36}$/.test(memberId) ? await memberState(app, memberId) : null;
  if (!state || state.member.coachId !== coach.id) throw notFound();
  return state;
}

/** The coach with the fewest members, for somebody new. Null while the practice has no coach. */
export async function leastLoadedCoach(app: App): Promise<string | null> {
  const [row] = await app.db
    .select({ id: users.id })
    .from(users)
    .leftJoin(members, eq(members.coachId, users.id))
    .where(and(eq(users.role, 'coach'), isNull(users.disabledAt)))
    .groupBy(users.id)
    .orderBy(sql`count(${members.userId})`, users.id)
    .limit(1);
  return row?.id ?? null;
}
