import fc from 'fast-check';
import { linearRegression, median, sampleStandardDeviation } from 'simple-statistics';
import { describe, expect, test } from 'vitest';
import published from '../../../../tests/published/statistics.json' with { type: 'json' };
import {
  standardErrorOfMeasurement,
  smallestWorthwhileChange,
  typicalErrorFromPairs,
} from '../typical-error.ts';
import { leastSquares } from './least-squares.ts';
import { lowess } from './lowess.ts';
import { mannKendall } from './mann-kendall.ts';
import { smoothHolt, smoothOnce } from './smoothing.ts';
import { theilSen } from './theil-sen.ts';

const { norris, women, nistSingle, nistDouble, holt, cars } = published;

/** Asserts agreement to a relative tolerance, as certified values are given. */
function expectNear(actual: number | undefined, expected: number, tolerance: number): void {
  expect(Math.abs((actual ?? Number.NaN) - expected)).toBeLessThanOrEqual(tolerance * Math.abs(expected));
}

describe('least squares', () => {
  const fit = leastSquares(norris.x, norris.y);

  test.each([
    ['slope', fit?.slope, norris.certified.B1, 1e-12],
    ['intercept', fit?.intercept, norris.certified.B0, 1e-10],
    ['residual SD', fit?.residualSd, norris.certified.residual_sd, 1e-10],
    ['error of the slope', fit?.slopeError, norris.certified.sd_B1, 1e-10],
    ['error of the intercept', fit?.interceptError, norris.certified.sd_B0, 1e-10],
  ])('NIST StRD Norris: %s (retrieved)', (_, actual, expected, tolerance) => {
    expectNear(actual, expected, tolerance);
  });

  test('R 4.2.2 lm(women): slope, intercept, sigma (computed with R)', () => {
    const line = leastSquares(women.x, women.y);
    expect(line?.slope).toBeCloseTo(women.slope, 8);
    expect(line?.intercept).toBeCloseTo(women.intercept, 7);
    expect(line?.residualSd).toBeCloseTo(women.sigma, 8);
  });

  test('has no answer for two points or one x', () => {
    expect(leastSquares([1, 2], [3, 4])).toBeNull();
    expect(leastSquares([1, 1, 1], [3, 4, 5])).toBeNull();
  });
});

describe.each(published.trends)('$source (retrieved)', (example) => {
  test(`Mann-Kendall S is ${example.S}`, () => expect(mannKendall(example.y).s).toBe(example.S));
  test('Theil-Sen slope', () =>
    expect(theilSen(example.x, example.y)?.slope).toBeCloseTo(example.sen_slope, 6));
});

describe.each(published.trends.flatMap((example) => ('z' in example ? [example] : [])))(
  '$source, the rest (retrieved)',
  (example) => {
    const kendall = mannKendall(example.y);
    const sen = theilSen(example.x, example.y);

    test.each([
      ['variance of S', kendall.variance, example.varS, 6],
      ['z', kendall.z, example.z, 6],
      ['p', kendall.p, example.p, 6],
      ['tau', kendall.tau, example.tau, 6],
      ['intercept (Conover)', sen?.intercept, example.intercept_conover, 6],
      ['lower limit (Gilbert)', sen?.low, example.ci95_gilbert?.[0], 3],
      ['upper limit (Gilbert)', sen?.high, example.ci95_gilbert?.[1], 3],
    ])('%s', (_, actual, expected, digits) => {
      expect(expected).toBeDefined();
      expect(actual).toBeCloseTo(expected ?? Number.NaN, digits);
    });
  },
);

describe('smoothing', () => {
  test('NIST e-Handbook 6.4.3.1: single smoothing, forecasts and mean square error (recomputed)', () => {
    const forecasts = smoothOnce(nistSingle.y, nistSingle.alpha);
    forecasts.forEach((value, i) => expect(value).toBeCloseTo(nistSingle.oneStep[i] ?? 0, 3));
    const squares = forecasts.map((value, i) => (value - (nistSingle.y[i + 1] ?? 0)) ** 2);
    expect(squares.reduce((sum, s) => sum + s, 0) / squares.length).toBeCloseTo(
      nistSingle.meanSquareError,
      3,
    );
  });

  test('NIST e-Handbook 6.4.3.4: double smoothing, forecasts from the fifth on (retrieved)', () => {
    const { alpha, gamma, level, trend } = nistDouble;
    const steps = smoothHolt(nistDouble.y.slice(1), alpha, gamma, { level, trend });
    nistDouble.oneStepFromSecond.forEach((value, i) => expect(steps[i]?.forecast).toBeCloseTo(value, 3));
    nistDouble.publishedFromFifth.forEach((value, i) =>
      expect(Math.round((steps[i + 3]?.forecast ?? 0) * 10) / 10).toBe(value),
    );
    const last = steps.at(-1);
    expect((last?.level ?? 0) + (last?.trend ?? 0)).toBeCloseTo(nistDouble.next, 3);
  });

  test('Hyndman & Athanasopoulos, FPP1 Table 7.3: Holt fitted, level, trend, forecasts (retrieved)', () => {
    const steps = smoothHolt(holt.y, holt.alpha, holt.beta, { level: holt.level0, trend: holt.trend0 });
    steps.forEach((step, i) => {
      expect(Math.abs(step.forecast - (holt.fitted[i] ?? 0))).toBeLessThanOrEqual(holt.tolerance);
      expect(Math.abs(step.level - (holt.level[i] ?? 0))).toBeLessThanOrEqual(holt.tolerance);
      expect(Math.abs(step.trend - (holt.trend[i] ?? 0))).toBeLessThanOrEqual(holt.tolerance);
    });
    const last = steps.at(-1);
    holt.forecast.forEach((value, i) => {
      const forecast = (last?.level ?? 0) + (i + 1) * (last?.trend ?? 0);
      expect(Math.abs(forecast - value)).toBeLessThanOrEqual(holt.tolerance);
    });
  });

  test('R 4.2.2 lowess(cars): the first ten and the last (computed with R)', () => {
    const curve = lowess(cars.speed, cars.dist);
    cars.first10.forEach((value, i) => expect(curve[i]).toBeCloseTo(value, 6));
    expect(curve.at(-1)).toBeCloseTo(cars.last, 6);
  });
});

describe('checks of the reference', () => {
  test('typical error of five retest pairs, Hopkins 2000 (constructed)', () => {
    const pairs = [
      [20, 22],
      [25, 24],
      [18, 21],
      [30, 31],
      [22, 22],
    ] as const;
    expect(typicalErrorFromPairs(pairs)).toBeCloseTo(1.118033988749895, 12);
  });

  test('SEM of push-ups from SD 10 and ICC 0.97, Weir 2005 (constructed; form from memory)', () => {
    expect(standardErrorOfMeasurement(10, 0.97)).toBeCloseTo(1.7320508075688772, 12);
  });

  test('smallest worthwhile change of SD 9, Hopkins 2000', () => {
    expect(smallestWorthwhileChange(9)).toBeCloseTo(1.8, 12);
  });
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
