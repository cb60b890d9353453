import { and, desc, eq, isNull } from 'drizzle-orm';
import type { ThreadEntry } from '#contracts/check-in';
import type { App } from '#server/app';
import type { Queryable } from '#server/db/client';
import { checkIns, messages, users } from '#server/db/schema/index';

const THREAD_LENGTH = 60;

/** Adds a line to a member's thread. The caller has checked that `authorId` may write there. */
export async function writeMessage(
  at: Queryable,
  message: {
    memberId: string;
    authorId: string;
    byCoach: boolean;
    words: string;
    at: Date;
    checkInId?: string | null;
    lessonSlug?: string | null;
    lessonPlace?: string | null;
  },
): Promise<string> {
  const { at: sentAt, ...rest } = message;
  const [row] = await at
    .insert(messages)
    .values({ ...rest, sentAt })
    .returning({ id: messages.id });
  if (!row) throw new Error('the message was not written');
  return row.id;
}

/** The newest part of a member's thread, oldest first: check-ins and messages in one line. Two queries. */
export async function readThread(app: App, memberId: string): Promise<ThreadEntry[]> {
  const [weekly, lines] = await Promise.all([
    app.db
      .select({ checkIn: checkIns, author: users.name })
      .from(checkIns)
      .innerJoin(users, eq(users.id, checkIns.memberId))
      .where(eq(checkIns.memberId, memberId))
      .orderBy(desc(checkIns.sentAt))
      .limit(THREAD_LENGTH),
    app.db
      .select({ message: messages, author: users.name })
      .from(messages)
      .leftJoin(users, eq(users.id, messages.authorId))
      .where(eq(messages.memberId, memberId))
      .orderBy(desc(messages.sentAt))
      .limit(THREAD_LENGTH),
  ]);
  return [
    ...weekly.map(({ checkIn, author }): ThreadEntry => ({
      id: checkIn.id,
      kind: 'check-in',
      byCoach: false,
      author: author ?? 'A member',
      sentAt: checkIn.sentAt.toISOString(),
      words: checkIn.words,
      scales: {
        went: checkIn.went,
        sleep: checkIn.sleep,
        soreness: checkIn.soreness,
        effort: checkIn.effort,
      },
      pain: { level: checkIn.pain, where: checkIn.painWhere },
      photoId: checkIn.photoId,
      unread: false,
    })),
    ...lines.map(({ message, author }): ThreadEntry => ({
      id: message.id,
      kind: 'message',
      byCoach: message.byCoach,
      author: author ?? 'Somebody who has left',
      sentAt: message.sentAt.toISOString(),
      words: message.words,
      unread: message.readAt === null,
      ...(message.lessonSlug && { lesson: { slug: message.lessonSlug, place: message.lessonPlace } }),
    })),
  ]
    .sort((a, b) => a.sentAt.localeCompare(b.sentAt))
    .slice(-THREAD_LENGTH);
}

/** The coach's newest line that the member has not read, or the newest of all. */
export async function latestAnswer(app: App, memberId: string) {
  const [row] = await app.db
    .select({
      id: messages.id,
      words: messages.words,
      sentAt: messages.sentAt,
      readAt: messages.readAt,
      author: users.name,
    })
    .from(messages)
    .leftJoin(users, eq(users.id, messages.authorId))
    .where(and(eq(messages.memberId, memberId), eq(messages.byCoach, true)))
    .orderBy(desc(messages.sentAt))
    .limit(1);
  return row ?? null;
}

/** Marks what the other side wrote as read. */
export async function markThreadRead(
  at: Queryable,
  memberId: string,
  reader: 'member' | 'coach',
  now: Date,
): Promise<void> {
  await at
    .update(messages)
    .set({ readAt: now })
    .where(
      and(
        eq(messages.memberId, memberId),
        eq(messages.byCoach, reader === 'member'),
        isNull(messages.readAt),
      ),
    );
}
