import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { members, users } from '#server/db/schema/index';
import type { Enqueue } from '#server/jobs/boss';
import { memberState, type MemberState } from './members.ts';
import type { Viewer } from './viewer.ts';

/** Where somebody stands on the way in; every step can be left and found again on another device. */
export interface JoinFacts {
  state: MemberState | null;
  signedIn: boolean;
  screened: boolean;
  held: boolean;
  house: boolean;
  paid: boolean;
}

export async function joinFacts(app: App, viewer: Viewer | null): Promise<JoinFacts> {
  const state = viewer ? await memberState(app, viewer.id) : null;
  return {
    state,
    signedIn: viewer !== null,
    screened: state?.screen != null,
    held: state?.hold != null,
    house: state?.house != null,
    paid: state?.access.mayRead ?? false,
  };
}

/** Makes a visitor a member once the first payment (or trial) stands. Doing it twice changes nothing. */
export async function finishJoin(
  tx: Transaction,
  enqueue: Enqueue,
  memberId: string,
  at: Date,
): Promise<void> {
  const [joined] = await tx
    .update(users)
    .set({ role: 'member' })
    .where(eq(users.id, memberId))
    .returning({ id: users.id, role: users.role });
  const [member] = await tx
    .select({ joinedAt: members.joinedAt, coachId: members.coachId })
    .from(members)
    .where(eq(members.userId, memberId));
  if (!joined || !member || member.joinedAt) return;
  await tx.update(members).set({ joinedAt: at }).where(eq(members.userId, memberId));
  const [coach] = member.coachId
    ? await tx.select({ name: users.name }).from(users).where(eq(users.id, member.coachId))
    : [];
  await enqueue('mail', {
    letter: 'welcome',
    userId: memberId,
    data: { coach: coach?.name ?? 'Somebody at the practice' },
  });
}
