import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MOVEMENTS, rungOf, rungsFor, type Kit } from '../movement/ladders.ts';
import { firstTarget, type Baseline, type FirstTargetInput } from './first-target.ts';
import { EMPHASES, GENTLE_EFFORT } from './limits.ts';
import type { Emphasis } from './types.ts';

const ALL: ReadonlySet<Kit> = new Set(['bar', 'chair', 'stairs', 'mat']);

const first = (change: Partial<FirstTargetInput>) =>
  firstTarget({ movement: 'push', emphasis: 'balanced', baseline: {}, kit: ALL, ...change });

describe('the first load (common practice, no source)', () => {
  it.each([
    // 20 × 3.0 × 0.55 = 33; 33 / 3.0 = 11.
    [20, 'floor', 'push-up-floor', 11],
    // 10 × 3.0 × 0.55 = 16.5; 16.5 / 1.9 = 8.7.
    [10, 'floor', 'push-up-stair-2', 8],
    // 10 × 2.2 × 0.55 = 12.1; 12.1 / 1.4 = 8.6.
    [10, 'knees', 'push-up-stair-4', 8],
    // 60 on the floor would make 33; a first set ends at the top of the range.
    [60, 'floor', 'push-up-floor', 15],
    [1, 'floor', 'push-up-wall', 8],
  ] as const)('%i push-ups (%s): %s, %i a set', (pushUps, form, rung, amount) => {
    expect(first({ baseline: { pushUps, form } }).target).toMatchObject({ rung, amount, sets: 3, effort: 6 });
  });

  it('says the test, the share and the target', () => {
    expect(first({ baseline: { pushUps: 20, form: 'floor' } })).toMatchObject({
      rule: 'first',
      why: 'You did 20 push-ups; about 55 % of that is 3 sets of 11 reps here.',
    });
    expect(first({ baseline: { pushUps: 10, form: 'knees' } }).why).toContain('10 push-ups from the knees');
  });

  it('leans to easier rungs for breath and to harder ones for muscle', () => {
    const baseline: Baseline = { pushUps: 20, form: 'floor' };
    expect(first({ emphasis: 'breath', baseline }).target).toMatchObject({
      rung: 'push-up-knees',
      amount: 13,
    });
    expect(first({ emphasis: 'muscle', baseline }).target).toMatchObject({
      rung: 'push-up-floor',
      amount: 10,
      sets: 4,
      effort: 7,
    });
  });

  it('reads stairs in three minutes as flights of the house', () => {
    // 156 stairs are 12 flights of 13; 12 × 0.55 = 6.6.
    const given = first({ movement: 'stairs', baseline: { stairs: 156, stairCount: 13 } });
    expect(given.target).toMatchObject({ rung: 'stairs-walk', amount: 6, unit: 'flights' });
    expect(first({ movement: 'stairs', baseline: { stairs: 156, stairCount: 26 } }).target.amount).toBe(3);
    expect(first({ movement: 'stairs', baseline: { stairs: 156 } }).target.amount).toBe(6);
  });

  it('reads sit-ups, pull-ups and the plank on their own rungs', () => {
    // 40 × 0.55 = 22, which is beyond the range.
    expect(first({ movement: 'sit-up', baseline: { sitUps: 40 } }).target).toMatchObject({
      rung: 'sit-up-tested',
      amount: 15,
    });
    // 15 × 0.55 = 8.25.
    expect(first({ movement: 'pull', baseline: { pullUps: 15 } }).target).toMatchObject({
      rung: 'pull-up',
      amount: 8,
    });
    expect(first({ movement: 'plank', baseline: { plankSeconds: 60 } }).target).toMatchObject({
      rung: 'plank-forearms',
      amount: 33,
      unit: 'seconds',
    });
  });

  it('begins at the foot of the ladder without a test', () => {
    expect(first({ movement: 'squat' })).toMatchObject({
      target: { rung: 'squat-chair', amount: 8 },
      why: 'No test for this yet, so it begins easily: 3 sets of 8 reps.',
    });
    expect(first({ movement: 'squat', emphasis: 'muscle' }).target.rung).toBe('squat-free');
    expect(first({ movement: 'squat', emphasis: 'muscle', gentle: true }).target.rung).toBe('squat-chair');
    expect(first({ movement: 'squat', emphasis: 'muscle', ageYears: 65 }).target.rung).toBe('squat-chair');
    expect(first({ movement: 'squat', emphasis: 'muscle', ageYears: 64 }).target.rung).toBe('squat-free');
  });

  it('asks less of people of 65 and over, and of those who begin gently', () => {
    const baseline: Baseline = { pushUps: 20, form: 'floor' };
    // 60 × 0.55 × 0.85 = 28.05; 28.05 / 3 = 9.4.
    expect(first({ baseline, ageYears: 65 }).target).toMatchObject({ amount: 9, effort: GENTLE_EFFORT });
    // 60 × 0.55 × 0.8 = 26.4; 26.4 / 3 = 8.8.
    expect(first({ baseline, gentle: true }).target).toMatchObject({ amount: 8, effort: GENTLE_EFFORT });
    expect(first({ baseline, ageYears: 64 }).target).toMatchObject({ amount: 11, effort: 6 });
  });

  it.each([NaN, -5, 0, Infinity])('a test of %d is no test', (pushUps) => {
    expect(first({ baseline: { pushUps, form: 'floor' } }).why).toMatch(/^No test/);
  });

  it('says so when the house has nothing for a movement', () => {
    expect(() => first({ movement: 'stairs', kit: new Set() })).toThrow("nothing for 'stairs'");
  });

  it('stays within the range of the emphasis, on a rung the house allows and no harder than the test', () => {
    const kits = fc.subarray<Kit>(['bar', 'chair', 'stairs', 'mat']).map((have) => new Set(have));
    fc.assert(
      fc.property(
        fc.constantFrom(...MOVEMENTS),
        fc.constantFrom<Emphasis>('breath', 'balanced', 'muscle'),
        kits,
        fc.integer({ min: 1, max: 120 }),
        fc.boolean(),
        (movement, emphasis, kit, count, gentle) => {
          fc.pre(rungsFor(movement, kit).length > 0);
          const baseline: Baseline = {
            pushUps: count,
            form: 'floor',
            sitUps: count,
            stairs: count,
            pullUps: count,
          };
          const { target } = firstTarget({ movement, emphasis, kit, gentle, baseline });
          const [low, high] = EMPHASES[emphasis].range[target.unit];
          expect(target.amount).toBeGreaterThanOrEqual(low);
          expect(target.amount).toBeLessThanOrEqual(high);
          expect(rungsFor(movement, kit)).toContain(rungOf(target.rung));
          expect(target.rung).not.toBe('push-up-feet-stair');
          expect(target.rung).not.toBe('chin-up');
        },
      ),
      { numRuns: 1000 },
    );
  });
});
