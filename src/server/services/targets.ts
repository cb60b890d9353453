import { and, eq, isNull } from 'drizzle-orm';
import type { TargetInput } from '#contracts/desk';
import { isRung, movementOf, rungOf } from '#domain/movement/ladders';
import type { App } from '#server/app';
import { sessionItems, targetOverrides, trainingSessions } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { audit } from './audit.ts';
import type { MemberState } from './members.ts';
import { requireRole, type Viewer } from './viewer.ts';

/**
 * A coach's own target, in red, with why. It changes the session that is planned; when the movement is not in that one, it
 * waits for the next that has it. What the rule said is kept beside it.
 * @throws AppError not-found for a member who is not this coach's, invalid for a variant that is not of the movement
 */
export async function changeTarget(
  app: App,
  viewer: Viewer,
  state: MemberState,
  input: TargetInput,
): Promise<void> {
  requireRole(viewer, 'coach');
  if (state.member.coachId !== viewer.id) throw notFound();
  if (!isRung(input.rung) || movementOf(input.rung) !== input.movement) {
    throw new AppError('invalid', 'Choose a variant of this movement.', {
      rung: 'Choose a variant of this movement.',
    });
  }
  const now = app.clock.now();
  const { movement, rung, sets, amount, effort, why } = input;
  await app.db.transaction(async (tx) => {
    const [item] = await tx
      .select({ item: sessionItems })
      .from(sessionItems)
      .innerJoin(trainingSessions, eq(trainingSessions.id, sessionItems.sessionId))
      .where(
        and(
          eq(trainingSessions.memberId, state.memberId),
          isNull(trainingSessions.doneAt),
          eq(sessionItems.movement, movement),
        ),
      );
    // A newer wish for a movement takes the place of one that still waits.
    await tx
      .update(targetOverrides)
      .set({ takenAt: now })
      .where(
        and(
          eq(targetOverrides.memberId, state.memberId),
          eq(targetOverrides.movement, movement),
          isNull(targetOverrides.takenAt),
        ),
      );
    await tx.insert(targetOverrides).values({
      memberId: state.memberId,
      movement,
      rung,
      sets,
      amount,
      effort,
      why,
      coachId: viewer.id,
      createdAt: now,
      takenAt: item ? now : null,
    });
    if (item) {
      const before = item.item;
      await tx
        .update(sessionItems)
        .set({
          rung,
          sets,
          amount,
          unit: rungOf(rung).unit,
          effortAsked: effort,
          overriddenBy: viewer.id,
          overrideWhy: why,
          ruledRung: before.ruledRung ?? before.rung,
          ruledSets: before.ruledSets ?? before.sets,
          ruledAmount: before.ruledAmount ?? before.amount,
        })
        .where(eq(sessionItems.id, before.id));
    }
    await audit(tx, {
      at: now,
      actorId: viewer.id,
      action: 'changed a target',
      subjectId: state.memberId,
      details: { movement, sets, amount },
    });
  });
}
