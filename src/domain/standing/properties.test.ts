import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BENCHMARKS, TEST_IDS } from '../benchmark/tests.ts';
import { percentileOf } from './place.ts';
import { standingOf } from './standing-of.ts';
import type { Percentile, StandingQuery } from './types.ts';

describe('properties', () => {
  const number = (percentile: Percentile | undefined) =>
    !percentile ? NaN : 'value' in percentile ? percentile.value : 'above' in percentile ? 101 : -1;

  it('a better result never stands lower', () => {
    const query = fc.record({
      test: fc.constantFrom(
        'sit-ups',
        'push-ups',
        'run-1-5-mile',
        'run-12',
        'vo2max',
        'chair-stand',
        'step-test',
        'plank',
      ),
      sex: fc.constantFrom('male', 'female'),
      ageYears: fc.integer({ min: 18, max: 95 }),
      value: fc.integer({ min: 0, max: 4500 }),
      more: fc.integer({ min: 1, max: 300 }),
      protocol: fc.constantFrom('to-failure', 'one-minute'),
    });
    fc.assert(
      fc.property(query, ({ more, protocol, ...rest }) => {
        const form =
          rest.test === 'push-ups' && rest.sex === 'female' && protocol === 'to-failure'
            ? 'knees'
            : undefined;
        const detail = { protocol, stepHeightMm: 305 } as const;
        const [a, b] = [rest.value, rest.value + more].map((value) =>
          standingOf({ ...rest, form, detail, value } as StandingQuery),
        );
        if (a?.kind !== 'placed' || b?.kind !== 'placed') return;
        const isLess = rest.test === 'run-1-5-mile' || rest.test === 'step-test';
        const [worse, better] = isLess ? [b, a] : [a, b];
        if (a.category) expect(better.category?.rank).toBeGreaterThanOrEqual(worse.category?.rank ?? NaN);
        if (a.percentile) expect(number(better.percentile)).toBeGreaterThanOrEqual(number(worse.percentile));
      }),
      { numRuns: 2000 },
    );
  });

  it('answers anything with a sentence and never prints NaN', () => {
    const odd = fc.oneof(fc.double(), fc.constantFrom(NaN, Infinity, -1, 0, 130, 1e308));
    fc.assert(
      fc.property(
        fc.constantFrom(...TEST_IDS),
        odd,
        odd,
        fc.constantFrom('male', 'female', null),
        odd,
        odd,
        (test, value, ageYears, sex, one, two) => {
          const detail = { heightCm: one, massKg: two, endPulse: one, stepHeightMm: two };
          for (const form of BENCHMARKS[test].forms) {
            const standing = standingOf({ test, form: form.id, value, ageYears, sex, detail });
            expect(standing.sentence).toMatch(/\.$/);
            expect(JSON.stringify(standing)).not.toMatch(/NaN|undefined|Infinity/);
          }
        },
      ),
      { numRuns: 2000 },
    );
  });

  it('cells that hold the same value speak with the higher percentile; no cells, no answer', () => {
    const cells = [
      { percentile: 10, value: 5, flag: 'memory' },
      { percentile: 20, value: 5, flag: 'published' },
      { percentile: 30, value: 10, flag: 'published' },
    ] as const;
    expect(percentileOf(5, cells, 'more')).toEqual({ percentile: { value: 20 }, flag: 'published' });
    expect(percentileOf(7.5, cells, 'more')).toEqual({ percentile: { value: 25 }, flag: 'derived' });
    expect(percentileOf(4, cells, 'more')).toEqual({ percentile: { below: 10 }, flag: 'memory' });
    expect(percentileOf(4, [], 'more')).toBeNull();
    expect(percentileOf(NaN, cells, 'more')).toBeNull();
  });
});
