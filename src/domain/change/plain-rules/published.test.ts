import fc from 'fast-check';
import { linearRegression, median, sampleStandardDeviation } from 'simple-statistics';
import { describe, expect, test } from 'vitest';
import { byName, outside, type OutsideFlag } from '#support/outside';
import published from '../../../../tests/published/statistics.json' with { type: 'json' };
import {
  standardErrorOfMeasurement,
  smallestWorthwhileChange,
  typicalErrorFromPairs,
} from '../typical-error.ts';
import { leastSquares } from './least-squares.ts';
import { lowess } from './lowess.ts';
import { mannKendall } from './mann-kendall.ts';
import { smoothHolt, smoothOnce, type HoltStep } from './smoothing.ts';
import { theilSen } from './theil-sen.ts';

const { norris, women, nistSingle, nistDouble, holt, cars } = published;

/** One outside check: a value of ours, the value printed elsewhere, and how near they must be. */
interface Check {
  readonly name: string;
  readonly actual: number | undefined;
  readonly expected: number;
  readonly within: number;
}

function checkAll(
  source: string,
  flag: OutsideFlag,
  checks: readonly (Omit<Check, 'name'> & { what: string })[],
) {
  const named = checks.map(({ what, ...check }) => ({ ...check, name: outside(what, source, flag) }));
  test.each(byName(named))('%s', (_, { actual, expected, within }) => {
    expect(Math.abs((actual ?? Number.NaN) - expected)).toBeLessThanOrEqual(within);
  });
}

/** The same for a printed column. */
function checkColumn(
  what: string,
  source: string,
  flag: OutsideFlag,
  actual: readonly (number | undefined)[],
  expected: readonly number[],
  within: number,
): void {
  checkAll(
    source,
    flag,
    expected.map((value, i) => ({ what: `${what} ${i + 1}`, actual: actual[i], expected: value, within })),
  );
}

describe('least squares', () => {
  const fit = leastSquares(norris.x, norris.y);
  const { certified } = norris;
  const near = (value: number, digits: number): number => Math.abs(value) * 10 ** -digits;
  checkAll('NIST/ITL StRD Norris', 'published', [
    { what: 'slope', actual: fit?.slope, expected: certified.B1, within: near(certified.B1, 12) },
    { what: 'intercept', actual: fit?.intercept, expected: certified.B0, within: near(certified.B0, 10) },
    { what: 'residual SD', actual: fit?.residualSd, expected: certified.residual_sd, within: 1e-10 },
    { what: 'error of the slope', actual: fit?.slopeError, expected: certified.sd_B1, within: 1e-13 },
    { what: 'error of the intercept', actual: fit?.interceptError, expected: certified.sd_B0, within: 1e-10 },
  ]);

  const line = leastSquares(women.x, women.y);
  checkAll(women.source, 'derived', [
    { what: 'slope', actual: line?.slope, expected: women.slope, within: 1e-8 },
    { what: 'intercept', actual: line?.intercept, expected: women.intercept, within: 1e-8 },
    { what: 'residual SD', actual: line?.residualSd, expected: women.sigma, within: 1e-9 },
  ]);

  test('has no answer for two points or one x', () => {
    expect(leastSquares([1, 2], [3, 4])).toBeNull();
    expect(leastSquares([1, 1, 1], [3, 4, 5])).toBeNull();
  });
});

describe('Mann-Kendall and Theil-Sen', () => {
  for (const example of published.trends) {
    const kendall = mannKendall(example.y);
    const sen = theilSen(example.x, example.y);
    checkAll(example.source, 'published', [
      { what: 'Mann-Kendall S', actual: kendall.s, expected: example.S, within: 0 },
      { what: 'Theil-Sen slope', actual: sen?.slope, expected: example.sen_slope, within: 1e-6 },
    ]);
    if (!('z' in example) || !example.ci95_gilbert) continue;
    const [low, high] = example.ci95_gilbert;
    checkAll(example.source, 'published', [
      { what: 'variance of S', actual: kendall.variance, expected: example.varS ?? Number.NaN, within: 1e-6 },
      { what: 'z', actual: kendall.z, expected: example.z ?? Number.NaN, within: 1e-6 },
      { what: 'p', actual: kendall.p, expected: example.p ?? Number.NaN, within: 1e-6 },
      { what: 'tau', actual: kendall.tau, expected: example.tau ?? Number.NaN, within: 1e-6 },
      {
        what: 'intercept after Conover',
        actual: sen?.intercept,
        expected: example.intercept_conover ?? Number.NaN,
        within: 1e-6,
      },
      { what: 'lower limit after Gilbert', actual: sen?.low, expected: low ?? Number.NaN, within: 5e-4 },
      { what: 'upper limit after Gilbert', actual: sen?.high, expected: high ?? Number.NaN, within: 5e-4 },
    ]);
  }
});

describe('smoothing', () => {
  const single = smoothOnce(nistSingle.y, nistSingle.alpha);
  const squares = single.map((value, i) => (value - (nistSingle.y[i + 1] ?? 0)) ** 2);
  const meanSquare = squares.reduce((sum, s) => sum + s, 0) / squares.length;
  checkColumn('single smoothing, forecast', nistSingle.source, 'derived', single, nistSingle.oneStep, 5e-4);
  checkAll(nistSingle.source, 'derived', [
    { what: 'mean square error', actual: meanSquare, expected: nistSingle.meanSquareError, within: 5e-4 },
  ]);

  const { level, trend } = nistDouble;
  const double = smoothHolt(nistDouble.y.slice(1), nistDouble.alpha, nistDouble.gamma, { level, trend });
  const printed = double.slice(3).map((step) => step.forecast);
  checkColumn(
    'double smoothing, forecast',
    nistDouble.source,
    'published',
    printed,
    nistDouble.publishedFromFifth,
    0.05,
  );

  const steps = smoothHolt(holt.y, holt.alpha, holt.beta, { level: holt.level0, trend: holt.trend0 });
  const column = (pick: (step: HoltStep) => number): number[] => steps.map(pick);
  const last = steps.at(-1) ?? { level: 0, trend: 0 };
  const ahead = [1, 2, 3, 4, 5].map((periods) => last.level + periods * last.trend);
  const within = holt.tolerance;
  checkColumn(
    'Holt, fitted',
    holt.source,
    'published',
    column((step) => step.forecast),
    holt.fitted,
    within,
  );
  checkColumn(
    'Holt, level',
    holt.source,
    'published',
    column((step) => step.level),
    holt.level,
    within,
  );
  checkColumn(
    'Holt, trend',
    holt.source,
    'published',
    column((step) => step.trend),
    holt.trend,
    within,
  );
  checkColumn('Holt, forecast', holt.source, 'published', ahead, holt.forecast, within);

  const curve = lowess(cars.speed, cars.dist);
  checkColumn('lowess, fitted', cars.source, 'derived', curve, cars.first10, 1e-6);
  checkAll(cars.source, 'derived', [
    { what: 'lowess, last fitted', actual: curve.at(-1), expected: cars.last, within: 1e-6 },
  ]);
});

describe('checks of the reference', () => {
  const pairs = [
    [20, 22],
    [25, 24],
    [18, 21],
    [30, 31],
    [22, 22],
  ] as const;
  checkAll('Hopkins 2000, five constructed pairs', 'derived', [
    {
      what: 'typical error from retests',
      actual: typicalErrorFromPairs(pairs) ?? undefined,
      expected: 1.118033988749895,
      within: 1e-12,
    },
  ]);
  checkAll('Weir 2005, with the ICC of PMC8701670', 'memory', [
    {
      what: 'SEM of SD 10 and ICC 0.97',
      actual: standardErrorOfMeasurement(10, 0.97),
      expected: 1.7320508075688772,
      within: 1e-12,
    },
  ]);
  checkAll('Hopkins 2000', 'published', [
    {
      what: 'smallest worthwhile change of SD 9',
      actual: smallestWorthwhileChange(9),
      expected: 1.8,
      within: 1e-9,
    },
  ]);
});

describe('against simple-statistics on random input', () => {
  const value = fc.double({ min: -1000, max: 1000, noNaN: true });
  const points = fc.array(fc.tuple(fc.integer({ min: 0, max: 500 }), value), { minLength: 3, maxLength: 40 });

  test('line', () => {
    fc.assert(
      fc.property(points, (all) => {
        const line = leastSquares(
          all.map(([x]) => x),
          all.map(([, y]) => y),
        );
        fc.pre(line !== null);
        const other = linearRegression(all);
        expect(line?.slope).toBeCloseTo(other.m, 6);
        expect(line?.intercept).toBeCloseTo(other.b, 5);
      }),
    );
  });

  test('Theil-Sen slope is the median of all pairs', () => {
    fc.assert(
      fc.property(points, (all) => {
        const slopes = all.flatMap(([x, y], i) =>
          all.slice(i + 1).flatMap(([x2, y2]) => (x2 === x ? [] : [(y2 - y) / (x2 - x)])),
        );
        const sen = theilSen(
          all.map(([x]) => x),
          all.map(([, y]) => y),
        );
        if (slopes.length === 0) expect(sen).toBeNull();
        else expect(sen?.slope).toBeCloseTo(median(slopes), 9);
      }),
    );
  });

  test('typical error', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(value, value), { minLength: 2, maxLength: 30 }), (pairs) => {
        const differences = pairs.map(([a, b]) => b - a);
        expect(typicalErrorFromPairs(pairs)).toBeCloseTo(
          sampleStandardDeviation(differences) / Math.SQRT2,
          8,
        );
      }),
    );
  });

  test('Mann-Kendall turns its sign with the values and cannot leave its range', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 9 }), { maxLength: 30 }), (values) => {
        const kendall = mannKendall(values);
        expect(mannKendall([...values].reverse()).s).toBe(0 - kendall.s);
        expect(Math.abs(kendall.tau)).toBeLessThanOrEqual(1);
        expect(kendall.p).toBeGreaterThanOrEqual(0);
        expect(kendall.p).toBeLessThanOrEqual(1);
      }),
    );
  });
});
