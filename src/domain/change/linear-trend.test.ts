import { describe, expect, test } from 'vitest';
import { outside } from '#support/outside';
import { inputOf } from '#support/trend-input';
import published from '../../../tests/published/statistics.json' with { type: 'json' };
import { filterTrend, makeTrace, smoothTrend, type TrendModel } from './linear-trend.ts';
import { leastSquares } from './plain-rules/least-squares.ts';
import { smoothHolt } from './plain-rules/smoothing.ts';

const { nile } = published;
const STILL: TrendModel = {
  slopeVariance: 0,
  bendVariance: 0,
  earlyBendVariance: 0,
  levelVariance: 0,
  damping: 0,
};

const NILE = 'Durbin & Koopman 2012, 2.2.5, in the tests of StateSpaceModels.jl';

describe('Nile, local level', () => {
  const years = nile.values.map((_, i) => i);
  const fitAt = (ratio: number) =>
    filterTrend(inputOf(years, nile.values), { ...STILL, levelVariance: ratio });
  /** Log-likelihood with the error variance at its best value for this ratio; the first flow sets the level. */
  const logLikelihood = (ratio: number): number => {
    const state = fitAt(ratio);
    const n = nile.values.length - 1;
    const variance = state.sumOfSquares / n;
    return -(n * Math.log(2 * Math.PI) + n * Math.log(variance) + state.logDeterminant + n) / 2;
  };

  const errorVarianceAt = (ratio: number): number => fitAt(ratio).sumOfSquares / (nile.values.length - 1);

  /** Golden section on the log of the ratio. */
  const best = (): number => {
    let [low, high] = [Math.log(0.001), Math.log(10)];
    while (high - low > 1e-9) {
      const left = high - (high - low) * 0.618034;
      const right = low + (high - low) * 0.618034;
      if (logLikelihood(Math.exp(left)) > logLikelihood(Math.exp(right))) high = right;
      else low = left;
    }
    return Math.exp((low + high) / 2);
  };

  test(outside('error variance 15099 at the greatest likelihood', NILE, 'published'), () => {
    expect(Math.abs(errorVarianceAt(best()) - nile.errorVariance)).toBeLessThan(2);
  });

  test(outside('level variance 1469.1 at the greatest likelihood', NILE, 'published'), () => {
    const ratio = best();
    expect(Math.abs(errorVarianceAt(ratio) * ratio - nile.levelVariance)).toBeLessThan(1);
  });

  test(outside('log-likelihood -632.5442 with a first level of 0, variance 1e7', NILE, 'published'), () => {
    const { errorVariance, levelVariance, firstVariance } = nile;
    // A mark of 0 as wide as their first level stands for it; the first flow's own share is taken out again.
    const spread = firstVariance / errorVariance;
    const input = inputOf([0, ...years], [0, ...nile.values], { spreads: [spread, ...years.map(() => 1)] });
    const state = filterTrend(input, { ...STILL, levelVariance: levelVariance / errorVariance });
    const logDeterminant = state.logDeterminant - Math.log(spread + 1);
    const sumOfSquares = state.sumOfSquares - (nile.values[0] ?? 0) ** 2 / (spread + 1);
    const n = nile.values.length - 1;
    const logLikelihood =
      -(n * Math.log(2 * Math.PI * errorVariance) + logDeterminant + sumOfSquares / errorVariance) / 2;
    expect(logLikelihood).toBeCloseTo(nile.logLikelihood, 4);
  });

  test(outside('log-likelihood -632.5456 with a diffuse start', 'Nile local level', 'memory'), () =>
    expect(logLikelihood(best())).toBeCloseTo(-632.5456, 3),
  );

  test(outside('last filtered level 798.37 with variance 4032.2', 'Nile local level', 'memory'), () => {
    const state = fitAt(nile.levelVariance / nile.errorVariance);
    expect(state.level).toBeCloseTo(798.37, 1);
    expect(state.levelVariance * nile.errorVariance).toBeCloseTo(4032.2, 0);
  });
});

test(outside('a trend without noise or belief is least squares', 'NIST/ITL StRD Norris', 'published'), () => {
  const { x, y, certified } = published.norris;
  const order = x.map((_, i) => i).sort((a, b) => (x[a] ?? 0) - (x[b] ?? 0));
  const weeks = order.map((i) => x[i] ?? 0);
  const values = order.map((i) => y[i] ?? 0);
  const state = filterTrend(inputOf(weeks, values), { ...STILL, slopeVariance: 1e6 });
  expect(state.slope).toBeCloseTo(certified.B1, 8);
  expect(Math.sqrt(state.slopeVariance) * certified.residual_sd).toBeCloseTo(certified.sd_B1, 8);
  expect(state.level - state.slope * (weeks.at(-1) ?? 0)).toBeCloseTo(certified.B0, 5);
  expect(Math.sqrt(state.sumOfSquares / 34)).toBeCloseTo(certified.residual_sd, 6);
});

test('women (R datasets): the smoothed line is the least-squares line', () => {
  const { x, y } = published.women;
  const input = inputOf(x, y);
  const model = { ...STILL, slopeVariance: 1e7 };
  const trace = makeTrace(y.length);
  filterTrend(input, model, trace);
  const line = leastSquares(x, y);
  smoothTrend(input, model, trace).levels.forEach((level, i) =>
    expect(level).toBeCloseTo((line?.intercept ?? 0) + (line?.slope ?? 0) * (x[i] ?? 0), 4),
  );
});

test('settles into Holt’s smoothing, whose weights follow from the variances (Durbin & Koopman, memory)', () => {
  const model: TrendModel = {
    slopeVariance: 0.5,
    bendVariance: 0.02,
    earlyBendVariance: 0,
    levelVariance: 0.1,
    damping: 0,
  };
  const values = Array.from({ length: 300 }, (_, i) => 40 + 6 * Math.sin(i / 9) + ((i * 37) % 11) / 4);
  const trace = makeTrace(values.length);
  filterTrend(
    inputOf(
      values.map((_, i) => i),
      values,
    ),
    model,
    trace,
  );
  const row = trace.length / values.length;
  const at = (mark: number, column: number): number => trace[mark * row + column] ?? 0;
  const alpha = at(299, 11);
  const beta = at(299, 12) / alpha;
  const start = { level: at(200, 0) - at(200, 1), trend: at(200, 1) };
  const steps = smoothHolt(values.slice(200), alpha, beta, start);
  expect(steps.at(-1)?.forecast).toBeCloseTo(at(299, 0), 6);
});

test('weeks without marks widen the level and let the slope fade', () => {
  const weeks = [0, 1, 2, 3, 4, 5];
  const values = [10, 11, 12, 13, 14, 15];
  const model: TrendModel = {
    slopeVariance: 0.2,
    bendVariance: 0.001,
    earlyBendVariance: 0,
    levelVariance: 0,
    damping: 0.09,
  };
  const now = filterTrend(inputOf(weeks, values), model);
  const later = filterTrend(inputOf(weeks, values, { endWeek: 15 }), model);
  expect(later.levelVariance).toBeGreaterThan(now.levelVariance);
  expect(later.slope).toBeCloseTo(now.slope * Math.exp(-0.9), 12);
});
