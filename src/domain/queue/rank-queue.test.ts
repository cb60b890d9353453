import { describe, expect, it } from 'vitest';
import { rankQueue, whyAbove, type QueueFacts } from './rank-queue.ts';
import { HOLD_FRESH_DAYS, MISSED_DAYS, WEIGHTS } from './reasons.ts';

const NOW = new Date('2026-12-06T15:40:00Z');
const PROMISE = 24;
const hoursAgo = (hours: number): Date => new Date(NOW.getTime() - hours * 3_600_000);

const facts = (name: string, change: Partial<QueueFacts> = {}): QueueFacts => ({
  memberId: name.toLowerCase(),
  name,
  openAlerts: [],
  hold: null,
  unanswered: null,
  unreadMessages: null,
  daysSinceSession: 2,
  sessionsLastWeek: 3,
  realDrop: null,
  testDayDue: false,
  stalledLandings: 0,
  rungReady: null,
  firstWeek: false,
  payment: 'ok',
  questionsDueOn: null,
  ...change,
});

const rank = (...members: QueueFacts[]) => rankQueue(members, NOW, PROMISE);
const only = (change: Partial<QueueFacts>) => rank(facts('Edda', change))[0];
const checkIn = (hours: number) => ({ sentAt: hoursAgo(hours), weekStart: '2026-11-30' });

describe('the order of the queue (common practice, no source)', () => {
  it('puts pain and warning signs first, then the rest as issued', () => {
    const members = [
      facts('Payment', { payment: 'lapsed' }),
      facts('First week', { firstWeek: true }),
      facts('Test day', { testDayDue: true }),
      facts('Rung', { rungReady: { movement: 'Push-up' } }),
      facts('Stalled', { stalledLandings: 3 }),
      facts('Missed', { daysSinceSession: 9 }),
      facts('Drop', { realDrop: { test: 'Push-ups', sentence: 'really lower, down six' } }),
      facts('Overdue', { unanswered: checkIn(25) }),
      facts('Held', { hold: { since: hoursAgo(5), cause: 'screen', reason: 'a doctor first' } }),
      facts('Pain', { openAlerts: [{ kind: 'pain', words: 'right wrist', at: hoursAgo(1) }] }),
      facts('Stop', { openAlerts: [{ kind: 'warning-sign', words: 'tight chest', at: hoursAgo(1) }] }),
      facts('Nothing'),
    ];
    expect(rank(...members).map(({ name }) => name)).toEqual(
      members
        .map(({ name }) => name)
        .filter((name) => name !== 'Nothing')
        .toReversed(),
    );
  });

  it('leaves out who has no reason', () => {
    expect(rank(facts('Edda'))).toEqual([]);
    expect(rank()).toEqual([]);
  });

  it('says each reason with its numbers', () => {
    expect(only({ unanswered: checkIn(10) })).toMatchObject({
      kind: 'caret',
      dueAt: new Date('2026-12-07T05:40:00Z'),
      reasons: [{ code: 'unanswered', sentence: 'Check-in of the week of 30 Nov waits 10 h, 14 h left' }],
    });
    expect(only({ unanswered: checkIn(26) })?.reasons[0].sentence).toBe(
      'Check-in of the week of 30 Nov waits 26 h, 2 h beyond the promise',
    );
    expect(
      only({ openAlerts: [{ kind: 'warning-sign', words: 'tight chest', at: hoursAgo(1) }] }),
    ).toMatchObject({
      kind: 'stop',
      dueAt: hoursAgo(1),
      reasons: [{ sentence: 'Stop pressed: tight chest' }],
    });
    expect(only({ unreadMessages: { since: hoursAgo(3) } })?.reasons[0].sentence).toBe(
      'A message waits 3 h, 21 h left',
    );
    expect(only({ payment: 'past-due' })).toMatchObject({ kind: 'rule', dueAt: null });
  });

  it.each([
    [10.4, 'waits 10 h, 14 h left'],
    [24, 'waits 24 h, 0 h left'],
    [24.1, 'waits 24 h, 1 h beyond the promise'],
  ])('after %d hours it %s', (hours, words) => {
    expect(only({ unanswered: checkIn(hours) })?.reasons[0].sentence).toContain(words);
  });

  it('gives the earliest of what falls due', () => {
    const both = only({ unanswered: checkIn(2), unreadMessages: { since: hoursAgo(20) } });
    expect(both?.dueAt).toEqual(new Date(hoursAgo(20).getTime() + PROMISE * 3_600_000));
  });

  it.each([
    [MISSED_DAYS - 1, 3, false],
    [MISSED_DAYS, 3, true],
    [2, 0, true],
    [null, null, false],
  ] as const)(
    '%s days since a session, %s last week: missed %s',
    (daysSinceSession, sessionsLastWeek, isMissed) => {
      expect(rank(facts('Edda', { daysSinceSession, sessionsLastWeek })).length === 1).toBe(isMissed);
    },
  );

  it('misses nothing while a plan is held or has only begun', () => {
    const held = only({ hold: { since: hoursAgo(1), cause: 'coach', reason: 'rest' }, daysSinceSession: 30 });
    expect(held?.reasons.map(({ code }) => code)).toEqual(['held']);
    const first = only({ firstWeek: true, sessionsLastWeek: 0 });
    expect(first?.reasons.map(({ code }) => code)).toEqual(['first-week']);
  });

  it('lets a hold be news for three days and then a reminder', () => {
    const after = (hours: number) =>
      only({ hold: { since: hoursAgo(hours), cause: 'screen', reason: 'a doctor first' } })?.reasons[0];
    expect(after(HOLD_FRESH_DAYS * 24 - 0.1)).toMatchObject({ code: 'held', weight: WEIGHTS.held });
    expect(after(HOLD_FRESH_DAYS * 24)).toMatchObject({
      code: 'held-long',
      sentence: 'Held for 3 days: a doctor first',
    });
  });

  it.each([
    ['2026-12-21', null],
    ['2026-12-20', 'Yearly questions due on 20 Dec'],
    ['2026-12-06', 'Yearly questions due on 6 Dec'],
    ['2026-12-05', 'Yearly questions ran out on 5 Dec'],
  ])('yearly questions due on %s: %s', (questionsDueOn, sentence) => {
    expect(only({ questionsDueOn })?.reasons[0].sentence ?? null).toBe(sentence);
  });

  it('tells equal weights apart by the next reason, then age, then name', () => {
    const names = (...members: QueueFacts[]) => rank(...members).map(({ name }) => name);
    expect(
      names(facts('Ann', { testDayDue: true }), facts('Bea', { testDayDue: true, payment: 'lapsed' })),
    ).toEqual(['Bea', 'Ann']);
    const pain = (hours: number) => ({
      openAlerts: [{ kind: 'pain' as const, words: 'knee', at: hoursAgo(hours) }],
    });
    expect(names(facts('Ann', pain(1)), facts('Bea', pain(2)))).toEqual(['Bea', 'Ann']);
    expect(names(facts('Bea', { firstWeek: true }), facts('Ann', { firstWeek: true }))).toEqual([
      'Ann',
      'Bea',
    ]);
  });
});

describe('why one is above another', () => {
  const why = (...members: QueueFacts[]) => {
    const [first, second] = rank(...members);
    if (!first || !second) throw new Error('Two are needed.');
    return whyAbove(first, second);
  };

  it('names both reasons', () => {
    expect(why(facts('Ann', { testDayDue: true }), facts('Bea', { payment: 'lapsed' }))).toBe(
      'Ann (test day is due) stands above Bea (plan stopped: a payment is open): the reason weighs more.',
    );
    expect(why(facts('Ann', { unanswered: checkIn(3) }), facts('Bea', { unanswered: checkIn(1) }))).toMatch(
      /: the wait is longer\.$/,
    );
  });

  it('says how equal weights were told apart', () => {
    const pain = (hours: number) => ({
      openAlerts: [{ kind: 'pain' as const, words: 'knee', at: hoursAgo(hours) }],
    });
    expect(why(facts('Ann', pain(1)), facts('Bea', pain(2)))).toMatch(/the same weight, and it is older\.$/);
    expect(why(facts('Ann', { firstWeek: true }), facts('Bea', { firstWeek: true }))).toMatch(/by name\.$/);
    expect(
      why(facts('Ann', { testDayDue: true }), facts('Bea', { testDayDue: true, payment: 'lapsed' })),
    ).toMatch(/there are more reasons\.$/);
  });
});
