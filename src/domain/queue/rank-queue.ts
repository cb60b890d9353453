import { compareReasons, reasonsFor } from './reasons.ts';
import type { QueueEntry, QueueFacts, QueueKind, QueueReason, ReasonCode } from './types.ts';

export type { QueueEntry, QueueFacts } from './types.ts';

const KINDS: Readonly<Record<ReasonCode, QueueKind>> = {
  'warning-sign': 'stop',
  pain: 'caution',
  held: 'caution',
  'held-long': 'caution',
  unanswered: 'caret',
  message: 'caret',
  'real-drop': 'rule',
  missed: 'stair',
  stalled: 'rule',
  'rung-ready': 'stair',
  'test-day': 'stair',
  questions: 'caution',
  'first-week': 'stair',
  payment: 'rule',
};

const HOUR_MS = 3_600_000;

const isWaiting = ({ code }: QueueReason): boolean => code === 'unanswered' || code === 'message';
const isAlert = ({ code }: QueueReason): boolean => code === 'warning-sign' || code === 'pain';

/** When a reason falls due: an alert at once, a wait at the promised hour; null for all others. */
function dueOf(reason: QueueReason, promisedHours: number): number | null {
  if (reason.since === null) return null;
  if (isAlert(reason)) return reason.since.getTime();
  return isWaiting(reason) ? reason.since.getTime() + promisedHours * HOUR_MS : null;
}

function entryOf(facts: QueueFacts, now: Date, promisedHours: number): QueueEntry | null {
  const [first, ...rest] = reasonsFor(facts, now, promisedHours);
  if (first === undefined) return null;
  const dues = [first, ...rest].map((reason) => dueOf(reason, promisedHours)).filter((due) => due !== null);
  return {
    memberId: facts.memberId,
    name: facts.name,
    kind: KINDS[first.code],
    reasons: [first, ...rest],
    dueAt: dues.length === 0 ? null : new Date(Math.min(...dues)),
    score: first.weight,
  };
}

const compareText = (a: string, b: string): number => (a === b ? 0 : a < b ? -1 : 1);

/** The first pair of reasons, one of each, that tells two entries apart; null when all that both have are alike. */
function decidingPair(a: QueueEntry, b: QueueEntry): readonly [QueueReason, QueueReason] | null {
  for (const [i, left] of a.reasons.entries()) {
    const right = b.reasons[i];
    if (right === undefined) return null;
    if (compareReasons(left, right) !== 0) return [left, right];
  }
  return null;
}

/** Reason by reason; whoever has one more is first. Then by name and id, so that the order is always the same. */
function compareEntries(a: QueueEntry, b: QueueEntry): number {
  const pair = decidingPair(a, b);
  if (pair !== null) return compareReasons(...pair);
  return (
    b.reasons.length - a.reasons.length || compareText(a.name, b.name) || compareText(a.memberId, b.memberId)
  );
}

/**
 * Who needs the coach first: members with a reason, heaviest first. Pain and warning signs stand above all; a check-in
 * gains weight with every hour, so that nobody waits for ever. Common practice, no source.
 */
export function rankQueue(facts: readonly QueueFacts[], now: Date, answerWithinHours: number): QueueEntry[] {
  const promisedHours = Math.max(1, answerWithinHours);
  return facts
    .map((member) => entryOf(member, now, promisedHours))
    .filter((entry) => entry !== null)
    .sort(compareEntries);
}

const lowerFirst = (sentence: string): string => sentence.charAt(0).toLowerCase() + sentence.slice(1);

/** Why `a` stands above `b` in the queue, in a sentence. */
export function whyAbove(a: QueueEntry, b: QueueEntry): string {
  const [first, second] = decidingPair(a, b) ?? [a.reasons[0], b.reasons[0]];
  const pair = `${a.name} (${lowerFirst(first.sentence)}) stands above ${b.name} (${lowerFirst(second.sentence)})`;
  if (first.weight > second.weight) {
    const isSameWait = first.code === second.code && isWaiting(first);
    return `${pair}: ${isSameWait ? 'the wait is longer' : 'the reason weighs more'}.`;
  }
  if (compareReasons(first, second) < 0) return `${pair}: the same weight, and it is older.`;
  return a.reasons.length > b.reasons.length
    ? `${pair}: the same, and there are more reasons.`
    : `${pair}: the same, so the order is by name.`;
}
