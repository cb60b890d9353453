import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { alerts, members, users } from '#server/db/schema/index';
import { openHold } from './holds.ts';
import type { Viewer } from './viewer.ts';

/**
 * A warning sign: the alert, the held plan and the letters to coach and member, in one transaction. Pressed twice, the
 * second report is kept too; the plan is held once.
 */
export async function reportWarningSign(app: App, viewer: Viewer, words: string): Promise<void> {
  const now = app.clock.now();
  await app.transaction(async (tx, enqueue) => {
    await tx.insert(alerts).values({ memberId: viewer.id, kind: 'warning-sign', words, raisedAt: now });
    await openHold(tx, {
      memberId: viewer.id,
      cause: 'warning-sign',
      reason: words,
      openedBy: viewer.id,
      at: now,
    });
    const [row] = await tx
      .select({ coachId: members.coachId, name: users.name })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .where(eq(members.userId, viewer.id));
    if (row?.coachId) {
      const data = { member: row.name ?? 'a member', path: `/desk/${viewer.id}` };
      await enqueue('mail', { letter: 'stop-alert', userId: row.coachId, data });
    }
  });
}
