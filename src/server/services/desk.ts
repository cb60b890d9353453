import { and, asc, eq, isNull } from 'drizzle-orm';
import type { RackLetter } from '#contracts/desk';
import { formatDay, formatTime } from '#domain/numbers/format';
import { rankQueue, whyAbove, type QueueEntry } from '#domain/queue/rank-queue';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { alerts, checkIns, members, practice } from '#server/db/schema/index';
import { notFound } from '#server/errors';
import type { Enqueue } from '#server/jobs/boss';
import { audit } from './audit.ts';
import { dropDraft } from './drafts.ts';
import { markThreadRead, writeMessage } from './messages.ts';
import { queueFacts } from './queue-facts.ts';
import { requireOwnMember } from './members.ts';
import { requireRole, type Viewer } from './viewer.ts';

const PROMISE_HOURS = 24;

/** Who needs this coach first, and why. Four queries, however many members. @throws AppError signed-out, forbidden */
export async function queueFor(app: App, viewer: Viewer): Promise<QueueEntry[]> {
  requireRole(viewer, 'coach');
  const [facts, [home]] = await Promise.all([
    queueFacts(app, viewer.id),
    app.db.select({ hours: practice.answerWithinHours }).from(practice),
  ]);
  return rankQueue(facts, app.clock.now(), home?.hours ?? PROMISE_HOURS);
}

/** The queue as the rack shows it: the first reason in words, when it falls due, and why it lies above the next. */
export function rackOf(queue: readonly QueueEntry[], timeZone: string): RackLetter[] {
  return queue.map((entry, index) => {
    const next = queue[index + 1];
    const due = entry.dueAt
      ? `by ${formatDay(entry.dueAt, timeZone)}, ${formatTime(entry.dueAt, timeZone)}`
      : '';
    const others = entry.reasons.length - 1;
    return {
      memberId: entry.memberId,
      name: entry.name,
      kind: entry.kind,
      reason: entry.reasons[0].sentence,
      due: [due, others > 0 && `and ${others} more`].filter(Boolean).join(', '),
      why: next ? whyAbove(entry, next) : '',
    };
  });
}

/**
 * Sends the coach's answer: it stamps every check-in that waits, marks the thread as read, tells the member by mail, and
 * the letter leaves the rack.
 * @throws AppError not-found for a member who is not this coach's
 */
export async function answerMember(
  tx: Transaction,
  enqueue: Enqueue,
  viewer: Viewer,
  input: { memberId: string; words: string },
  now: Date,
): Promise<{ answered: boolean }> {
  const [mine] = await tx
    .select({ id: members.userId })
    .from(members)
    .where(and(eq(members.userId, input.memberId), eq(members.coachId, viewer.id)));
  if (!mine) throw notFound();
  const waiting = await tx
    .select({ id: checkIns.id })
    .from(checkIns)
    .where(and(eq(checkIns.memberId, mine.id), isNull(checkIns.answeredAt)))
    .orderBy(asc(checkIns.sentAt));
  await tx
    .update(checkIns)
    .set({ answeredAt: now, answeredBy: viewer.id })
    .where(and(eq(checkIns.memberId, mine.id), isNull(checkIns.answeredAt)));
  await writeMessage(tx, {
    memberId: mine.id,
    authorId: viewer.id,
    byCoach: true,
    words: input.words,
    checkInId: waiting.at(-1)?.id ?? null,
    at: now,
  });
  await markThreadRead(tx, mine.id, 'coach', now);
  await dropDraft(tx, viewer.id, `answer:${mine.id}`);
  const action = 'answered a check-in';
  if (waiting.length > 0) await audit(tx, { at: now, actorId: viewer.id, action, subjectId: mine.id });
  await enqueue('mail', {
    letter: 'answer',
    userId: mine.id,
    data: { coach: viewer.name?.split(' ')[0] ?? 'Your coach' },
  });
  return { answered: waiting.length > 0 };
}

/** Takes a member's open alerts off the desk. @throws AppError not-found for a member who is not this coach's */
export async function settleAlerts(app: App, viewer: Viewer, memberId: string): Promise<void> {
  await requireOwnMember(app, viewer, memberId);
  const now = app.clock.now();
  await app.db.transaction(async (tx) => {
    const settled = await tx
      .update(alerts)
      .set({ settledAt: now, settledBy: viewer.id })
      .where(and(eq(alerts.memberId, memberId), isNull(alerts.settledAt)))
      .returning({ id: alerts.id });
    if (settled.length === 0) return;
    await audit(tx, { at: now, actorId: viewer.id, action: 'settled an alert', subjectId: memberId });
  });
}
