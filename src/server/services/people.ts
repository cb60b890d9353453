import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { App } from '#server/app';
import { invites, members, users } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { audit } from './audit.ts';
import { requireRole, type Viewer } from './viewer.ts';

const coaches = alias(users, 'coaches');

/** Coaches with the number of their members. Owner only. */
export function listCoaches(app: App, viewer: Viewer) {
  requireRole(viewer, 'owner');
  return app.db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      members: sql<number>`count(${members.userId})::int`,
    })
    .from(users)
    .leftJoin(members, eq(members.coachId, users.id))
    .where(and(eq(users.role, 'coach'), isNull(users.disabledAt)))
    .groupBy(users.id)
    .orderBy(asc(users.name));
}

/** Members and people on the way in, with their coach; no health data. Owner only. */
export function listMembers(app: App, viewer: Viewer) {
  requireRole(viewer, 'owner');
  return app.db
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      joinedAt: members.joinedAt,
      coach: coaches.name,
      coachId: members.coachId,
    })
    .from(members)
    .innerJoin(users, eq(users.id, members.userId))
    .leftJoin(coaches, eq(coaches.id, members.coachId))
    .orderBy(asc(users.name));
}

/** Invitations that nobody has taken up yet. Owner only. */
export function openInvites(app: App, viewer: Viewer) {
  requireRole(viewer, 'owner');
  return app.db.select().from(invites).where(isNull(invites.acceptedAt)).orderBy(asc(invites.createdAt));
}

/** Invites a coach by mail; the invitation is spent at the first sign-in. @throws AppError conflict for a known address */
export async function inviteCoach(
  app: App,
  viewer: Viewer,
  input: { name: string; address: string },
): Promise<void> {
  requireRole(viewer, 'owner');
  const now = app.clock.now();
  await app.transaction(async (tx, enqueue) => {
    const [known] = await tx
      .select({ role: users.role })
      .from(users)
      .where(
        and(sql`lower(${users.email}) = ${input.address}`, inArray(users.role, ['member', 'coach', 'owner'])),
      );
    if (known)
      throw new AppError('conflict', 'This address belongs to somebody in the practice already.', {
        address: 'This address is known already.',
      });
    const fresh = await tx
      .insert(invites)
      .values({ email: input.address, name: input.name, invitedBy: viewer.id, createdAt: now })
      .onConflictDoNothing()
      .returning({ id: invites.id });
    if (fresh.length === 0)
      throw new AppError('conflict', 'This address has an open invitation.', {
        address: 'This address is invited already.',
      });
    await audit(tx, {
      at: now,
      actorId: viewer.id,
      action: 'invited a coach',
      details: { name: input.name },
    });
    await enqueue('mail', {
      letter: 'invite',
      address: input.address,
      data: { inviter: viewer.name ?? 'The practice' },
    });
  });
}

/** Gives a member to another coach, who reads everything from then on; the old one nothing. */
export async function moveMember(
  app: App,
  viewer: Viewer,
  input: { member: string; coach: string },
): Promise<void> {
  requireRole(viewer, 'owner');
  const now = app.clock.now();
  await app.db.transaction(async (tx) => {
    const [coach] = await tx
      .select({ name: users.name })
      .from(users)
      .where(and(eq(users.id, input.coach), eq(users.role, 'coach'), isNull(users.disabledAt)));
    if (!coach) throw notFound();
    const [moved] = await tx
      .update(members)
      .set({ coachId: input.coach })
      .where(eq(members.userId, input.member))
      .returning({ id: members.userId });
    if (!moved) throw notFound();
    await audit(tx, {
      at: now,
      actorId: viewer.id,
      action: 'moved a member',
      subjectId: input.member,
      details: { to: coach.name ?? '' },
    });
  });
}
