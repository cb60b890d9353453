import { and, desc, eq, isNull } from 'drizzle-orm';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { alerts, holds, members, users } from '#server/db/schema/index';
import { AppError } from '#server/errors';
import { audit } from './audit.ts';
import { requireOwnMember } from './members.ts';
import type { Viewer } from './viewer.ts';

type Cause = (typeof holds.$inferSelect)['cause'];

/** Holds a plan from `at` on. A plan that is held already stays held for its first reason; answers whether it is new. */
export async function openHold(
  tx: Transaction,
  hold: { memberId: string; cause: Cause; reason: string; openedBy: string | null; at: Date },
): Promise<boolean> {
  // The member's row is the lock: two reports at once find one hold. It lets inserts that point to the row go on.
  await tx
    .select({ id: members.userId })
    .from(members)
    .where(eq(members.userId, hold.memberId))
    .for('no key update');
  const [running] = await tx
    .select({ id: holds.id })
    .from(holds)
    .where(and(eq(holds.memberId, hold.memberId), isNull(holds.endedAt)));
  if (running) return false;
  const { at, ...rest } = hold;
  await tx.insert(holds).values({ ...rest, startedAt: at });
  await audit(tx, {
    at,
    actorId: hold.openedBy,
    action: 'held a plan',
    subjectId: hold.memberId,
    details: { cause: hold.cause },
  });
  return true;
}

/** A coach holds one of their members' plans, with the reason that the member reads. */
export async function holdPlan(
  app: App,
  viewer: Viewer,
  input: { memberId: string; reason: string },
): Promise<void> {
  const state = await requireOwnMember(app, viewer, input.memberId);
  await app.transaction(async (tx, enqueue) => {
    const opened = await openHold(tx, { ...input, cause: 'coach', openedBy: viewer.id, at: app.clock.now() });
    if (!opened) throw new AppError('conflict', 'This plan is held already.');
    await enqueue('mail', { letter: 'held', userId: state.memberId });
  });
}

/** A coach records the clearance: the hold ends, open alerts are settled, the member is told. */
export async function clearHold(
  app: App,
  viewer: Viewer,
  input: { memberId: string; clearance: string },
): Promise<void> {
  const state = await requireOwnMember(app, viewer, input.memberId);
  const now = app.clock.now();
  await app.transaction(async (tx, enqueue) => {
    const ended = await tx
      .update(holds)
      .set({ endedAt: now, clearedBy: viewer.id, clearance: input.clearance })
      .where(and(eq(holds.memberId, state.memberId), isNull(holds.endedAt)))
      .returning({ id: holds.id });
    if (ended.length === 0) throw new AppError('conflict', 'This plan is not held.');
    await tx
      .update(alerts)
      .set({ settledAt: now, settledBy: viewer.id })
      .where(and(eq(alerts.memberId, state.memberId), isNull(alerts.settledAt)));
    await audit(tx, { at: now, actorId: viewer.id, action: 'cleared a plan', subjectId: state.memberId });
    await enqueue('mail', {
      letter: 'cleared',
      userId: state.memberId,
      data: { coach: viewer.name ?? 'Your coach' },
    });
  });
}

/** Holds of a member, newest first, with the names of who opened and cleared them. */
export const listHolds = (app: App, memberId: string) =>
  app.db
    .select({ hold: holds, clearedBy: users.name })
    .from(holds)
    .leftJoin(users, eq(users.id, holds.clearedBy))
    .where(eq(holds.memberId, memberId))
    .orderBy(desc(holds.startedAt))
    .limit(10);
