import { and, eq } from 'drizzle-orm';
import type { CheckInInput } from '#contracts/check-in';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { alerts, checkIns, photos } from '#server/db/schema/index';
import { AppError } from '#server/errors';
import { dropDraft } from './drafts.ts';
import type { Viewer } from './viewer.ts';

export const checkInDraftKey = (weekStart: string) => `check-in:${weekStart}`;

/** The member's check-in of the week that began on `weekStart`, or null when it is still due. */
export async function readCheckIn(app: App, memberId: string, weekStart: string) {
  const [row] = await app.db
    .select()
    .from(checkIns)
    .where(and(eq(checkIns.memberId, memberId), eq(checkIns.weekStart, weekStart)));
  return row ?? null;
}

/**
 * Sends the week's check-in, once. Strong pain raises an alert at the coach's desk; the draft goes in the same transaction.
 * @throws AppError conflict when the week's check-in was sent already, not-found for another's picture
 */
export async function sendCheckIn(
  tx: Transaction,
  viewer: Viewer,
  input: CheckInInput,
  { weekStart, now }: { weekStart: string; now: Date },
): Promise<{ id: string }> {
  const { photoId = null, painWhere, ...rest } = input;
  if (photoId) {
    const [mine] = await tx
      .select({ id: photos.id })
      .from(photos)
      .where(and(eq(photos.id, photoId), eq(photos.memberId, viewer.id)));
    if (!mine)
      throw new AppError('invalid', 'That picture did not arrive. Choose it again.', {
        photoId: 'Choose the picture again.',
      });
  }
  const [row] = await tx
    .insert(checkIns)
    .values({ ...rest, photoId, painWhere: painWhere || null, memberId: viewer.id, weekStart, sentAt: now })
    .onConflictDoNothing({ target: [checkIns.memberId, checkIns.weekStart] })
    .returning({ id: checkIns.id });
  if (!row) {
    throw new AppError(
      'conflict',
      'This week’s check-in was sent before. Write a line in the thread instead; it is kept here.',
    );
  }
  if (input.pain === 'strong') {
    await tx
      .insert(alerts)
      .values({ memberId: viewer.id, kind: 'pain', words: `Strong pain: ${painWhere}`, raisedAt: now });
  }
  await dropDraft(tx, viewer.id, checkInDraftKey(weekStart));
  return row;
}
