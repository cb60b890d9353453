import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { accessOf, GRACE_DAYS, type PaidPeriod, type SubscriptionStatus } from './access-of.ts';

const MINUTE = 60_000;
const DAY = 1440 * MINUTE;
const END = new Date('2026-12-24T09:30:00Z');
const at = (offsetMs: number): Date => new Date(END.getTime() + offsetMs);

const paid = (change: Partial<PaidPeriod> = {}): PaidPeriod => ({
  status: 'active',
  currentPeriodEnd: END,
  trialEnd: null,
  cancelAtPeriodEnd: false,
  endedAt: null,
  pastDueSince: null,
  ...change,
});

const access = (subscription: PaidPeriod | null, now: Date, held = false) =>
  accessOf({ subscription, held, now });

describe('access follows what was paid, to the minute', () => {
  it('is none without a subscription, or with one that was never paid', () => {
    for (const subscription of [null, paid({ status: 'incomplete' }), paid({ status: 'incomplete_expired' })])
      expect(access(subscription, at(-DAY))).toEqual({
        state: 'none',
        held: false,
        until: null,
        mayRead: false,
        mayTrain: false,
        sentence: 'No plan yet. Nothing has been charged.',
      });
  });

  it('is active to the last moment of the paid period', () => {
    expect(access(paid(), at(-1))).toMatchObject({
      state: 'active',
      until: END,
      mayRead: true,
      mayTrain: true,
      sentence: 'Your plan is paid until 24 Dec.',
    });
  });

  it.each([
    [-1, 'cancelling', true],
    [0, 'cancelled', false],
    [MINUTE, 'cancelled', false],
  ] as const)('cancelled at the end of the period, %i ms from it: %s', (offset, state, mayRead) => {
    expect(access(paid({ cancelAtPeriodEnd: true }), at(offset))).toMatchObject({
      state,
      mayRead,
      mayTrain: mayRead,
    });
  });

  it.each([
    [-1, 'cancelling', true],
    [0, 'cancelled', false],
  ] as const)('ended, %i ms from that moment: %s', (offset, state, mayRead) => {
    expect(access(paid({ status: 'canceled', endedAt: END }), at(offset))).toMatchObject({ state, mayRead });
  });

  it('ended without a moment is ended', () => {
    expect(access(paid({ status: 'canceled' }), at(-DAY))).toMatchObject({
      state: 'cancelled',
      until: null,
      sentence: 'Your plan has ended. Everything you wrote is kept and can be taken home.',
    });
  });

  it('a trial runs to its own end', () => {
    const trial = paid({ status: 'trialing', trialEnd: at(-2 * DAY) });
    expect(access(trial, at(-2 * DAY - 1))).toMatchObject({
      state: 'trial',
      until: at(-2 * DAY),
      mayTrain: true,
    });
    expect(access({ ...trial, cancelAtPeriodEnd: true }, at(-2 * DAY))).toMatchObject({ state: 'cancelled' });
    expect(access(paid({ status: 'trialing' }), at(-1))).toMatchObject({ state: 'trial', until: END });
  });

  it.each([
    [0, 'past-due', true],
    [GRACE_DAYS * DAY - 1, 'past-due', true],
    [GRACE_DAYS * DAY, 'lapsed', false],
  ] as const)('a failed card, %i ms after it failed: %s', (offset, state, mayTrain) => {
    const given = access(
      paid({ status: 'past_due', pastDueSince: END, currentPeriodEnd: at(30 * DAY) }),
      at(offset),
    );
    expect(given).toMatchObject({
      state,
      mayTrain,
      mayRead: mayTrain,
      until: at(GRACE_DAYS * DAY),
    });
  });

  it('the grace is seven days, the rule of the practice (common practice, no source)', () => {
    expect(GRACE_DAYS).toBe(7);
  });

  it('a failed card without a moment counts to the end of the period at most', () => {
    expect(access(paid({ status: 'past_due' }), at(-1)).state).toBe('past-due');
    expect(access(paid({ status: 'past_due' }), at(0)).state).toBe('lapsed');
  });

  it('a renewal nobody has heard of counts as failed at the end of the period', () => {
    expect(access(paid(), at(0))).toMatchObject({ state: 'past-due', until: at(GRACE_DAYS * DAY) });
    expect(access(paid(), at(GRACE_DAYS * DAY))).toMatchObject({ state: 'lapsed', mayRead: false });
  });

  it.each(['unpaid', 'paused'] as const)('%s is lapsed', (status) => {
    expect(access(paid({ status }), at(-DAY))).toMatchObject({ state: 'lapsed', mayRead: false });
  });
});

describe('a held plan', () => {
  it('may be read and not trained', () => {
    expect(access(paid(), at(-DAY), true)).toMatchObject({
      state: 'active',
      held: true,
      mayRead: true,
      mayTrain: false,
      sentence:
        'Your plan is paid until 24 Dec. Your plan is held: you can read everything, and training waits for clearance.',
    });
  });

  it('costs nothing before it is paid for', () => {
    expect(access(null, END, true)).toMatchObject({
      state: 'none',
      mayRead: false,
      sentence: 'Your plan is held until a doctor has cleared you. Nothing is charged while it is held.',
    });
  });
});

it('prints the day where the reader lives', () => {
  const late = paid({ currentPeriodEnd: new Date('2026-12-24T23:30:00Z') });
  const { sentence } = accessOf({ subscription: late, held: false, now: at(0), timeZone: 'Europe/Berlin' });
  expect(sentence).toBe('Your plan is paid until 25 Dec.');
});

describe('whatever the mirror holds', () => {
  const moment = fc.integer({ min: -60, max: 60 }).map((days) => at(days * DAY));
  const subscription: fc.Arbitrary<PaidPeriod> = fc.record({
    status: fc.constantFrom<SubscriptionStatus>(
      'incomplete',
      'incomplete_expired',
      'trialing',
      'active',
      'past_due',
      'canceled',
      'unpaid',
      'paused',
    ),
    currentPeriodEnd: moment,
    trialEnd: fc.option(moment),
    cancelAtPeriodEnd: fc.boolean(),
    endedAt: fc.option(moment),
    pastDueSince: fc.option(moment),
  });

  it('open access always ends in the future, closed access never does, and held people never train', () => {
    fc.assert(
      fc.property(subscription, fc.boolean(), moment, (mirror, held, now) => {
        const given = accessOf({ subscription: mirror, held, now });
        expect(given.mayRead).toBe(given.until !== null && given.until > now);
        expect(given.mayTrain).toBe(given.mayRead && !held);
        expect(given.sentence).toMatch(/^[A-Z].*\.$/u);
      }),
      { numRuns: 1000 },
    );
  });
});
