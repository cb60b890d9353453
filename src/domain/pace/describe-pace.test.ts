import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { describePace, PaceInputError } from './describe-pace.ts';

/** Taps with a beat that changes evenly from `first` to `last` a minute over `seconds`. */
function fadingTaps(first: number, last: number, seconds: number): number[] {
  const taps: number[] = [];
  for (let at = 0; ;) {
    const pace = first + ((last - first) * at) / (seconds * 1000);
    at += 60_000 / pace;
    if (at > seconds * 1000) return taps;
    taps.push(at);
  }
}

/** Reps at an even beat, the last one on `toMs`. */
function evenTaps(reps: number, fromMs: number, toMs: number): number[] {
  return Array.from({ length: reps }, (_, i) => fromMs + ((i + 1) * (toMs - fromMs)) / reps);
}

const anyTaps = fc
  .array(fc.double({ min: 1, max: 5000, noNaN: true }), { minLength: 1, maxLength: 120 })
  .map((beats) => beats.reduce<number[]>((taps, beat) => [...taps, (taps.at(-1) ?? 0) + beat], []));

describe('describePace', () => {
  test('tells a start that was too fast, with both paces and the one to begin at', () => {
    const tapsMs = [
      ...evenTaps(14, 0, 20_000),
      ...evenTaps(10, 20_000, 40_000),
      ...evenTaps(7, 40_000, 60_000),
    ];
    const report = describePace({ tapsMs, durationMs: 60_000 });
    expect(report.count).toBe(31);
    expect(report.perMinute).toBe(31);
    expect(report.perTenSeconds).toEqual([7, 7, 5, 5, 3, 4]);
    expect(report.fade).toEqual({ first: 42, last: 21, share: 0.5 });
    expect(report.suggestion).toBe('You began at 42 a minute and ended at 21: start at 31 next time.');
  });

  test('calls an even beat even', () => {
    const report = describePace({ tapsMs: fadingTaps(30, 30, 60), durationMs: 60_000 });
    expect(report.perTenSeconds).toEqual([5, 5, 5, 5, 5, 5]);
    expect(report.evenness).toEqual({
      spread: expect.closeTo(0, 9),
      swing: expect.closeTo(0, 9),
      isUneven: false,
    });
    expect(report.longestPause).toBeNull();
    expect(report.suggestion).toBe('An even 30 a minute from start to end. Keep that pace.');
  });

  test('has a word for a pace that swings by more than two without fading', () => {
    const taps = [
      ...evenTaps(10, 0, 19_000),
      ...evenTaps(10, 19_000, 40_000),
      ...evenTaps(10, 40_000, 59_000),
    ];
    const report = describePace({ tapsMs: taps, durationMs: 60_000 });
    expect(report.evenness?.swing).toBeCloseTo(60 / 1.9 - 60 / 2.1, 6);
    expect(report.suggestion).toBe(
      'About 30 a minute from start to end, but the pace swung by 3. Count a steady beat.',
    );
  });

  test('finds the longest pause and where it began', () => {
    const taps = Array.from({ length: 20 }, (_, i) => (i + 1) * 2000 + (i >= 12 ? 7500 : 0));
    const report = describePace({ tapsMs: taps });
    expect(report.longestPause).toEqual({ seconds: 9.5, atSeconds: 24 });
    expect(report.suggestion).toContain('The longest pause was 9.5 seconds, at 24.');
  });

  test('tells a finish faster than the start', () => {
    const report = describePace({ tapsMs: fadingTaps(20, 40, 60), durationMs: 60_000 });
    expect(report.fade?.share).toBeLessThan(-0.15);
    expect(report.suggestion).toBe(
      `You began at 21 a minute and ended at 36: there was more in the start. Begin at ${report.count} next time.`,
    );
  });

  test('says less from a bare count', () => {
    expect(describePace({ count: 34, durationMs: 60_000 })).toEqual({
      count: 34,
      seconds: 60,
      perMinute: 34,
      perTenSeconds: [],
      curve: [],
      fade: null,
      evenness: null,
      longestPause: null,
      suggestion: '34 is 34 a minute on the whole. Tap the reps next time and the pace will show.',
    });
    expect(describePace({ count: 17 }).suggestion).toBe('17 in all. Without a time there is no pace.');
    expect(describePace({}).suggestion).toBe('No reps, so no pace.');
    expect(describePace({ tapsMs: [], count: 0, durationMs: 60_000 }).suggestion).toBe(
      'No reps, so no pace.',
    );
  });

  test('answers one rep, and reps all at once, without a number that is none', () => {
    expect(describePace({ tapsMs: [0] })).toMatchObject({
      count: 1,
      perMinute: null,
      curve: [],
      evenness: null,
    });
    expect(describePace({ tapsMs: [0, 0, 0, 0, 0, 0, 0, 0, 0] })).toMatchObject({
      evenness: null,
      fade: null,
    });
    expect(describePace({ tapsMs: new Array<number>(12).fill(5000) })).toMatchObject({
      curve: [],
      fade: null,
    });
    expect(describePace({ tapsMs: [1000, 2000, 3000], durationMs: 60_000 }).suggestion).toBe(
      '3 a minute on the whole. Too few reps to speak of pace.',
    );
  });

  test.each([
    ['a tap that is no number', { tapsMs: [Number.NaN] }],
    ['a negative tap', { tapsMs: [-1] }],
    ['taps out of order', { tapsMs: [2000, 1000] }],
    ['a tap after the end', { tapsMs: [61_000], durationMs: 60_000 }],
    ['an endless test', { count: 3, durationMs: Number.POSITIVE_INFINITY }],
    ['a test of no length', { count: 3, durationMs: 0 }],
    ['half a rep', { count: 2.5 }],
    ['a negative count', { count: -1 }],
    ['a count that is no number', { count: Number.NaN }],
  ])('refuses %s with a typed error', (_, question) => {
    expect(() => describePace(question)).toThrow(PaceInputError);
  });

  test('a rep on the stroke of ten seconds belongs to the ten seconds it ends', () => {
    expect(describePace({ tapsMs: [0, 10_000, 10_001, 20_000], durationMs: 20_000 }).perTenSeconds).toEqual([
      2, 2,
    ]);
  });

  test('property: every rep is counted in exactly one ten seconds, and every number is finite', () => {
    fc.assert(
      fc.property(anyTaps, (tapsMs) => {
        const report = describePace({ tapsMs });
        expect(report.perTenSeconds.reduce((sum, n) => sum + n, 0)).toBe(tapsMs.length);
        expect(JSON.stringify(report)).not.toMatch(/NaN|Infinity/);
        for (const { perMinute, atSeconds } of report.curve) {
          expect(Number.isFinite(perMinute) && Number.isFinite(atSeconds)).toBe(true);
        }
        if (report.fade) expect(report.fade.share).toBeLessThanOrEqual(1);
      }),
    );
  });

  test('property: doing the same reps twice as fast doubles the paces and leaves the shapes alone', () => {
    fc.assert(
      fc.property(anyTaps, (tapsMs) => {
        const slow = describePace({ tapsMs });
        const fast = describePace({ tapsMs: tapsMs.map((tap) => tap / 2) });
        expect(fast.perMinute).toBeCloseTo(2 * (slow.perMinute ?? 0), 6);
        expect(fast.evenness?.spread ?? 0).toBeCloseTo(slow.evenness?.spread ?? 0, 6);
        expect(fast.fade?.share ?? 0).toBeCloseTo(slow.fade?.share ?? 0, 6);
      }),
    );
  });
});
