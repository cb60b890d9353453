import { daysBetween } from '../flight/calendar.ts';
import { formatIsoDay } from '../numbers/format.ts';
import type { QueueFacts, QueueReason, ReasonCode } from './types.ts';

/** Weights of the reasons: pain and warning signs first. Common practice, no source. Waiting gains weight on top. */
export const WEIGHTS: Readonly<Record<ReasonCode, number>> = {
  'warning-sign': 1000,
  pain: 900,
  held: 800,
  unanswered: 450,
  message: 440,
  'real-drop': 500,
  missed: 400,
  stalled: 300,
  'held-long': 250,
  'rung-ready': 240,
  'test-day': 200,
  questions: 180,
  'first-week': 150,
  payment: 120,
};

/** What a wait gains on its way to the promised hour; beyond it, and in the days after. It never reaches pain. */
const WAIT_GAIN = 200;
const OVERDUE_GAIN = 250;
const OVERDUE_LATE_GAIN = 180;
const OVERDUE_HOURS = 48;

/** Days a hold counts as news; after that it waits for the doctor, not for the coach. */
export const HOLD_FRESH_DAYS = 3;
/** Days without a session that count as missed. */
export const MISSED_DAYS = 9;
/** Landings without a real gain that are worth a word. */
const STALLED_LANDINGS = 3;
/** Days ahead that the yearly questions are announced. */
const QUESTIONS_AHEAD_DAYS = 14;

const HOUR_MS = 3_600_000;

const hoursSince = (since: Date, now: Date): number =>
  Math.max(0, (now.getTime() - since.getTime()) / HOUR_MS);

/** The weight of something that waits: it rises with every hour, and stays below pain. */
export function waitingWeight(code: 'unanswered' | 'message', hours: number, promisedHours: number): number {
  const base = WEIGHTS[code];
  if (hours <= promisedHours) return base + WAIT_GAIN * (hours / promisedHours);
  const late = hours - promisedHours;
  return base + OVERDUE_GAIN + OVERDUE_LATE_GAIN * (late / (late + OVERDUE_HOURS));
}

function waitWords(hours: number, promisedHours: number): string {
  const waited = Math.floor(hours);
  const left = Math.ceil(promisedHours - hours);
  return hours > promisedHours
    ? `waits ${waited} h, ${Math.ceil(hours - promisedHours)} h beyond the promise`
    : `waits ${waited} h, ${left} h left`;
}

const reason = (code: ReasonCode, sentence: string, since: Date | null = null): QueueReason => ({
  code,
  weight: WEIGHTS[code],
  sentence,
  since,
});

function urgentReasons({ openAlerts, hold }: QueueFacts, now: Date): QueueReason[] {
  const alerts = openAlerts.map(({ kind, words, at }) =>
    reason(kind, kind === 'pain' ? `Pain: ${words}` : `Stop pressed: ${words}`, at),
  );
  if (hold === null) return alerts;
  const days = Math.floor(hoursSince(hold.since, now) / 24);
  const isFresh = days < HOLD_FRESH_DAYS;
  const sentence = isFresh ? `Plan held: ${hold.reason}` : `Held for ${days} days: ${hold.reason}`;
  return [...alerts, reason(isFresh ? 'held' : 'held-long', sentence, hold.since)];
}

function waitingReasons(
  { unanswered, unreadMessages }: QueueFacts,
  now: Date,
  promisedHours: number,
): QueueReason[] {
  const waiting = (code: 'unanswered' | 'message', what: string, since: Date): QueueReason => {
    const hours = hoursSince(since, now);
    return {
      code,
      weight: waitingWeight(code, hours, promisedHours),
      sentence: `${what} ${waitWords(hours, promisedHours)}`,
      since,
    };
  };
  return [
    ...(unanswered === null
      ? []
      : [
          waiting(
            'unanswered',
            `Check-in of the week of ${formatIsoDay(unanswered.weekStart)}`,
            unanswered.sentAt,
          ),
        ]),
    ...(unreadMessages === null ? [] : [waiting('message', 'A message', unreadMessages.since)]),
  ];
}

function missedReason({
  hold,
  firstWeek,
  daysSinceSession,
  sessionsLastWeek,
}: QueueFacts): QueueReason | null {
  // While a plan is held, or has only begun, nothing is missed.
  if (hold !== null || firstWeek) return null;
  if (daysSinceSession !== null && daysSinceSession >= MISSED_DAYS)
    return reason('missed', `No session for ${daysSinceSession} days`);
  return sessionsLastWeek === 0 ? reason('missed', 'No session last week') : null;
}

function questionsReason({ questionsDueOn }: QueueFacts, today: string): QueueReason | null {
  if (questionsDueOn === null) return null;
  const days = daysBetween(today, questionsDueOn);
  if (days > QUESTIONS_AHEAD_DAYS) return null;
  const day = formatIsoDay(questionsDueOn);
  return reason(
    'questions',
    days < 0 ? `Yearly questions ran out on ${day}` : `Yearly questions due on ${day}`,
  );
}

function noticedReasons(facts: QueueFacts, today: string): QueueReason[] {
  const { realDrop, stalledLandings, rungReady, testDayDue, firstWeek, payment } = facts;
  const found = [
    realDrop && reason('real-drop', `${realDrop.test}: ${realDrop.sentence}`),
    missedReason(facts),
    stalledLandings >= STALLED_LANDINGS
      ? reason('stalled', `${stalledLandings} landings without a real gain`)
      : null,
    rungReady && reason('rung-ready', `${rungReady.movement}: ready for the next rung`),
    testDayDue ? reason('test-day', 'Test day is due') : null,
    questionsReason(facts, today),
    firstWeek ? reason('first-week', 'First week') : null,
    payment === 'ok'
      ? null
      : reason(
          'payment',
          payment === 'lapsed' ? 'Plan stopped: a payment is open' : 'Last payment did not go through',
        ),
  ];
  return found.filter((entry) => entry !== null);
}

/** Every reason to look at a member, heaviest first; equal weights in the order of age, then of the code. */
export function reasonsFor(facts: QueueFacts, now: Date, promisedHours: number): QueueReason[] {
  const all = [
    ...urgentReasons(facts, now),
    ...waitingReasons(facts, now, promisedHours),
    ...noticedReasons(facts, now.toISOString().slice(0, 10)),
  ];
  return all.sort(compareReasons);
}

const sinceOf = ({ since }: QueueReason): number => since?.getTime() ?? Infinity;

/** Heavier first, then the older; 0 when neither tells them apart. */
export function compareReasons(a: QueueReason, b: QueueReason): number {
  if (a.weight !== b.weight) return b.weight - a.weight;
  const [first, second] = [sinceOf(a), sinceOf(b)];
  return first === second ? 0 : first < second ? -1 : 1;
}
