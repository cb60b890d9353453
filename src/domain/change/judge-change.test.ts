import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ChangeInputError, judgeChange, type ChangeMark } from './judge-change.ts';
import { SMALLEST_CHANGE_80, SMALLEST_CHANGE_95 } from './typical-error.ts';

function weekly(values: readonly number[], stepDays = 7): ChangeMark[] {
  return values.map((value, i) => ({ atDays: i * stepDays, value }));
}

const sitUps = (values: readonly number[], stepDays = 7) =>
  judgeChange({ testId: 'sit-ups', better: 'more', marks: weekly(values, stepDays) });

describe('verdicts', () => {
  test('a rise that every week bears out is real', () => {
    const judged = sitUps([28, 30, 30, 32, 33, 33, 35, 35, 37]);
    expect(judged.verdict).toBe('really better');
    expect(judged.difference?.marks).toBe(9);
    expect(judged.difference?.low).toBeGreaterThan(0);
    expect(judged.sentence).toMatch(/^Nine more; the error of this test on you is [34](\.\d)?\.$/);
  });

  test('up and down about one place is no real change yet', () => {
    const judged = sitUps([30, 31, 29, 31, 30, 32, 29, 32]);
    expect(judged.verdict).toBe('no real change yet');
    expect(judged.sentence).toMatch(
      /^Two more; the error of this test on you is \d(\.\d)?, so this may be the day and not you\.$/,
    );
  });

  test('a fall that every week bears out is really lower', () => {
    expect(sitUps([37, 36, 35, 33, 32, 31, 30, 28]).verdict).toBe('really lower');
  });

  test('between the two it is only probable, either way', () => {
    expect(sitUps([30, 30, 32, 33, 34, 34, 35]).verdict).toBe('probably better');
    expect(sitUps([34, 33, 32, 32, 31, 31, 30]).verdict).toBe('probably lower');
  });

  test('for a pulse lower is better, and the numbers keep their own sign', () => {
    const judged = judgeChange({
      testId: 'step-test',
      better: 'less',
      marks: weekly([124, 121, 120, 116, 115, 112, 109, 106]),
    });
    expect(judged.verdict).toBe('really better');
    expect(judged.difference?.value).toBeLessThan(0);
    expect(judged.slopePer4Weeks?.value).toBeLessThan(0);
    expect(judged.sentence).toMatch(/^18 beats lower; /);
  });

  test('one wild last day is named and does not make a verdict', () => {
    const judged = sitUps([30, 31, 30, 29, 31, 30, 29, 44]);
    expect(judged.verdict).toBe('no real change yet');
    expect(judged.outliers).toEqual([{ atDays: 49, value: 44 }]);
    expect(judged.sentence).toMatch(/^14 more on the last day; the other marks do not say so yet/);
  });

  test('one wild day in the middle hardly moves the level', () => {
    const without = sitUps([30, 31, 30, 29, 31, 30, 29, 30]);
    const withWild = sitUps([30, 31, 30, 12, 31, 30, 29, 30]);
    expect(withWild.outliers).toEqual([{ atDays: 21, value: 12 }]);
    expect(Math.abs((withWild.level?.value ?? 0) - (without.level?.value ?? 0))).toBeLessThan(0.6);
  });

  test('a last day that falls behind a real rise is told as such', () => {
    const judged = sitUps([28, 30, 32, 33, 35, 36, 37, 38, 28]);
    expect(judged.verdict).toMatch(/better$/);
    expect(judged.sentence).toMatch(/^The same as before on the last day, but over nine marks \S+ more/);
  });
});

describe('few marks', () => {
  test('none, one, and two that differ little are too early', () => {
    expect(sitUps([])).toMatchObject({
      verdict: 'too early',
      level: null,
      difference: null,
      points: [],
      sentence: 'No marks yet.',
    });
    expect(sitUps([30]).verdict).toBe('too early');
    expect(sitUps([30]).chanceBetter).toBeCloseTo(0.5, 6);
    expect(sitUps([30]).sentence).toBe(
      'One mark so far. Two more and a change can be told from a good day; the error of this test on you is 5.',
    );
    expect(sitUps([30, 32], 28).verdict).toBe('too early');
  });

  test('two marks that differ by the error are probable, by clearly more are real', () => {
    expect(sitUps([30, 35], 28).verdict).toBe('probably better');
    expect(sitUps([30, 38], 28).verdict).toBe('really better');
    expect(sitUps([38, 30], 28).verdict).toBe('really lower');
  });

  test('two marks do not change their verdict as days pass', () => {
    const marks = weekly([30, 38], 28);
    const later = judgeChange({ testId: 'sit-ups', better: 'more', marks, today: 60 });
    expect(later).toEqual(judgeChange({ testId: 'sit-ups', better: 'more', marks }));
  });

  test('marks within a week are too early, however far apart', () => {
    expect(sitUps([30, 38, 39], 2).verdict).toBe('too early');
    expect(sitUps([20, 30, 40, 50], 0).verdict).toBe('too early');
  });
});

describe('what the numbers are', () => {
  test('smallest real changes are 2.772 and 1.812 typical errors', () => {
    const judged = sitUps([30, 31, 29, 33]);
    expect(judged.smallestRealChange95).toBeCloseTo(judged.typicalError * SMALLEST_CHANGE_95, 12);
    expect(judged.smallestRealChange80).toBeCloseTo(judged.typicalError * SMALLEST_CHANGE_80, 12);
  });

  test('a steady member’s error shrinks from the prior, a jumpy member’s grows', () => {
    const prior = sitUps([30]).typicalError;
    expect(sitUps([30, 30, 31, 30, 30, 31, 30, 30, 30, 31]).typicalError).toBeLessThan(0.8 * prior);
    expect(sitUps([30, 24, 35, 26, 34, 25, 36, 27, 33, 24]).typicalError).toBeGreaterThan(1.3 * prior);
  });

  test('the base of the comparison can be a later day', () => {
    const marks = weekly([20, 24, 28, 31, 33, 33, 33, 33, 33, 33, 33, 33]);
    const all = judgeChange({ testId: 'sit-ups', better: 'more', marks });
    const late = judgeChange({ testId: 'sit-ups', better: 'more', marks, since: 49 });
    expect(all.verdict).toBe('really better');
    expect(late.verdict).toBe('no real change yet');
    expect(late.before).toMatchObject({ atDays: 49, mark: 33 });
    expect(late.level).toEqual(all.level);
  });

  test('a base between two marks is the last mark before it; one before the first is the first', () => {
    const marks = weekly([30, 31, 32, 33, 34]);
    const base = (since: number) =>
      judgeChange({ testId: 'sit-ups', better: 'more', marks, since }).before?.atDays;
    expect(base(10)).toBe(7);
    expect(base(-50)).toBe(0);
    expect(base(500)).toBe(28);
  });

  test('missing weeks widen the level, and the curve goes on to today', () => {
    const marks = weekly([30, 31, 32, 33, 33, 34]);
    const now = judgeChange({ testId: 'sit-ups', better: 'more', marks });
    const later = judgeChange({ testId: 'sit-ups', better: 'more', marks, today: 35 + 42 });
    const width = (judged: typeof now) => (judged.level?.high ?? 0) - (judged.level?.low ?? 0);
    expect(width(later)).toBeGreaterThan(1.2 * width(now));
    expect(later.points.at(-1)).toEqual({ atDays: 77, ...later.level });
    expect(later.points).toHaveLength(7);
  });

  test('the end of the curve is the level now', () => {
    const judged = sitUps([30, 31, 33, 32, 35, 34, 36]);
    const end = judged.points.at(-1);
    expect(end?.value).toBeCloseTo(judged.level?.value ?? 0, 1);
    expect(end?.high).toBeCloseTo(judged.level?.high ?? 0, 1);
  });

  test('only marks in the form of the last one count', () => {
    const marks: ChangeMark[] = [
      { atDays: 0, value: 30, form: 'knees' },
      { atDays: 7, value: 32, form: 'knees' },
      { atDays: 14, value: 10, form: 'toes' },
    ];
    const judged = judgeChange({ testId: 'push-ups', better: 'more', marks });
    expect(judged).toMatchObject({ verdict: 'too early', otherForms: 2 });
    expect(judged.points).toHaveLength(1);
  });

  test('a pulse at rest has no learning: its first mark counts in full', () => {
    const first = judgeChange({ testId: 'resting-pulse', better: 'less', marks: weekly([60]) });
    expect(first.level?.value).toBeCloseTo(60, 9);
    expect(sitUps([30]).level?.value).toBeCloseTo(30 + 0.4 * 1.8, 12);
  });

  test('no interval reaches below nought', () => {
    const judged = judgeChange({ testId: 'pull-ups', better: 'more', marks: weekly([1, 0, 0, 1, 0, 0]) });
    expect(judged.level?.low).toBe(0);
    expect(judged.points.every((point) => point.low >= 0)).toBe(true);
  });
});

describe('nonsense', () => {
  test.each([
    ['NaN', [{ atDays: 0, value: Number.NaN }]],
    ['a negative mark', [{ atDays: 0, value: -1 }]],
    ['an endless mark', [{ atDays: 0, value: Number.POSITIVE_INFINITY }]],
    ['a mark beyond any test', [{ atDays: 0, value: 1e7 }]],
    ['a day that is none', [{ atDays: Number.NaN, value: 1 }]],
    ['milliseconds for days', [{ atDays: 1_764_000_000_000, value: 30 }]],
  ])('%s is refused with a typed error', (_, marks) => {
    expect(() => judgeChange({ testId: 'sit-ups', better: 'more', marks })).toThrow(ChangeInputError);
  });

  test.each([{ today: Number.NaN }, { since: Number.NEGATIVE_INFINITY }])('%o is refused', (days) => {
    const marks = weekly([30, 31]);
    expect(() => judgeChange({ testId: 'sit-ups', better: 'more', marks, ...days })).toThrow(
      ChangeInputError,
    );
  });

  test('equal marks are no change, with an error that stays above nought', () => {
    const judged = sitUps(new Array<number>(30).fill(30));
    expect(judged.verdict).toBe('no real change yet');
    expect(judged.typicalError).toBeGreaterThan(0);
    expect(judged.sentence).toMatch(/^The same as before; /);
    expect(sitUps(new Array<number>(30).fill(0)).level?.value).toBeLessThan(0.2);
  });

  test('ten thousand marks give an answer and a curve that can be drawn', () => {
    const judged = sitUps(
      Array.from({ length: 10_000 }, (_, i) => 30 + (i % 3)),
      1,
    );
    expect(judged.verdict).toBe('no real change yet');
    expect(judged.points.length).toBeLessThanOrEqual(202);
    expect(judged.points.at(-1)?.atDays).toBe(9999);
  });
});

describe('properties', () => {
  const marks = fc.array(
    fc.record({ atDays: fc.integer({ min: 0, max: 800 }), value: fc.integer({ min: 0, max: 60 }) }),
    { minLength: 1, maxLength: 30 },
  );

  test('every number is finite, intervals are in order and the chance is a chance', () => {
    fc.assert(
      fc.property(marks, fc.constantFrom('more', 'less'), (all, better) => {
        const judged = judgeChange({ testId: 'push-ups', better, marks: all, today: 810 });
        expect(JSON.stringify(judged)).not.toMatch(/NaN|Infinity/);
        expect(judged.sentence).not.toMatch(/NaN|undefined|–/);
        for (const interval of [judged.level, judged.difference, judged.slopePer4Weeks, ...judged.points]) {
          if (!interval) continue;
          expect(Number.isFinite(interval.value)).toBe(true);
          expect(interval.low).toBeLessThanOrEqual(interval.value);
          expect(interval.high).toBeGreaterThanOrEqual(interval.value);
        }
        expect(judged.chanceBetter).toBeGreaterThanOrEqual(0);
        expect(judged.chanceBetter).toBeLessThanOrEqual(1);
        expect(judged.typicalError).toBeGreaterThan(0);
      }),
    );
  });

  test('neither the order of the marks nor the day the clock starts from matters', () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.integer({ min: 0, max: 300 }), { minLength: 2, maxLength: 12 }),
        (days) => {
          const made = days.map((atDays, i) => ({ atDays, value: 20 + ((i * 7) % 9) }));
          const judged = judgeChange({ testId: 'sit-ups', better: 'more', marks: made });
          const turned = judgeChange({ testId: 'sit-ups', better: 'more', marks: [...made].reverse() });
          const moved = judgeChange({
            testId: 'sit-ups',
            better: 'more',
            marks: made.map((mark) => ({ ...mark, atDays: mark.atDays + 5000 })),
          });
          expect(turned).toEqual(judged);
          expect(moved.verdict).toBe(judged.verdict);
          expect(moved.chanceBetter).toBeCloseTo(judged.chanceBetter, 8);
        },
      ),
    );
  });

  test('without learning, better for less is the mirror of better for more', () => {
    fc.assert(
      fc.property(marks, (all) => {
        const less = judgeChange({ testId: 'resting-pulse', better: 'less', marks: all });
        const more = judgeChange({ testId: 'resting-pulse', better: 'more', marks: all });
        expect(less.chanceBetter).toBeCloseTo(1 - more.chanceBetter, 8);
        expect(less.difference?.value).toBeCloseTo(more.difference?.value ?? Number.NaN, 8);
      }),
    );
  });

  test('the same number more in every mark changes nothing about the change', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 2, max: 20 }), { minLength: 2, maxLength: 15 }), (values) => {
        const lower = sitUps(values);
        const higher = sitUps(values.map((value) => value + 9));
        expect(higher.chanceBetter).toBeCloseTo(lower.chanceBetter, 8);
        expect(higher.level?.high).toBeCloseTo((lower.level?.high ?? 0) + 9, 6);
      }),
    );
  });

  test('a gain twice as large between two marks is never less likely', () => {
    fc.assert(
      fc.property(fc.integer({ min: 10, max: 20 }), fc.integer({ min: 1, max: 5 }), (from, gain) => {
        const once = sitUps([from, from + gain], 28).chanceBetter;
        expect(sitUps([from, from + 2 * gain], 28).chanceBetter).toBeGreaterThanOrEqual(once);
      }),
    );
  });
});
