import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import published from '../../../tests/published/statistics.json' with { type: 'json' };
import { filterTrend, makeTrace, smoothTrend, type TrendInput, type TrendModel } from './linear-trend.ts';
import { leastSquares } from './plain-rules/least-squares.ts';
import { smoothHolt } from './plain-rules/smoothing.ts';

const { nile } = published;
const STILL: TrendModel = { slopeVariance: 0, bendVariance: 0, levelVariance: 0, damping: 0 };

function inputOf(
  weeks: readonly number[],
  values: readonly number[],
  more: Partial<TrendInput> = {},
): TrendInput {
  return {
    weeks,
    values,
    spreads: values.map(() => 1),
    shares: values.map(() => 0),
    learningMean: 0,
    learningVariance: 0,
    baseWeek: weeks[0] ?? 0,
    endWeek: weeks.at(-1) ?? 0,
    ...more,
  };
}

describe('Nile, local level: Durbin & Koopman 2012, 2.2.5 (retrieved from the tests of StateSpaceModels.jl)', () => {
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

  test('error variance 15099 and level variance 1469.1 at the greatest likelihood', () => {
    const ratio = best();
    const variance = fitAt(ratio).sumOfSquares / (nile.values.length - 1);
    expect(Math.abs(variance - nile.errorVariance)).toBeLessThan(2);
    expect(Math.abs(variance * ratio - nile.levelVariance)).toBeLessThan(1);
  });

  test('log-likelihood -632.5442 with their first level of 0 and variance 1e7, at their variances', () => {
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

  test('log-likelihood -632.5456 with a diffuse start (memory)', () =>
    expect(logLikelihood(best())).toBeCloseTo(-632.5456, 3));

  test('last filtered level 798.37 with variance 4032.2 (memory)', () => {
    const state = fitAt(nile.levelVariance / nile.errorVariance);
    expect(state.level).toBeCloseTo(798.37, 1);
    expect(state.levelVariance * nile.errorVariance).toBeCloseTo(4032.2, 0);
  });
});

test('NIST Norris: a line without noise or belief about its slope is least squares (retrieved)', () => {
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
  const model: TrendModel = { slopeVariance: 0.5, bendVariance: 0.02, levelVariance: 0.1, damping: 0 };
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

/** Mean and variance of the wanted quantities by conditioning one large normal distribution: slow and plain. */
function conditionDensely(input: TrendInput, model: TrendModel, wanted: readonly number[]) {
  const start = input.weeks[0] ?? 0;
  const value0 = input.values[0] ?? 0;
  const DIFFUSE = 1e7;
  const keep = (dt: number) => Math.exp(-model.damping * dt);
  const reach = (dt: number) => (model.damping === 0 ? dt : (1 - keep(dt)) / model.damping);
  /** Covariance of the levels at two times after the start, by adding up many small steps of noise. */
  const covariance = (a: number, b: number): number => {
    const [t, u] = [a - start, b - start];
    const steps = 2000;
    const h = Math.min(t, u) / steps;
    let bends = 0;
    for (let i = 0; i < steps; i += 1) {
      const s = (i + 0.5) * h;
      bends += model.bendVariance * reach(t - s) * reach(u - s) * h;
    }
    return DIFFUSE + model.slopeVariance * reach(t) * reach(u) + bends + model.levelVariance * Math.min(t, u);
  };
  const n = input.values.length;
  const share = (i: number) => input.shares[i] ?? 0;
  const week = (i: number) => input.weeks[i] ?? 0;
  const matrix = Array.from({ length: n }, (_, i) =>
    Array.from(
      { length: n },
      (_, j) =>
        covariance(week(i), week(j)) +
        share(i) * share(j) * input.learningVariance +
        (i === j ? (input.spreads[i] ?? 1) : 0),
    ),
  );
  const residuals = Array.from(input.values, (value, i) => value - value0 + share(i) * input.learningMean);
  const cross = wanted.map((at) => Array.from({ length: n }, (_, i) => covariance(at, week(i))));
  const solve = (right: readonly number[]): number[] => solveLinear(matrix, right);
  const dot = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, v, i) => sum + v * (b[i] ?? 0), 0);
  const solvedResiduals = solve(residuals);
  const means = cross.map((row) => value0 + dot(row, solvedResiduals));
  const solvedCross = cross.map(solve);
  const between = (i: number, j: number): number =>
    covariance(wanted[i] ?? 0, wanted[j] ?? 0) - dot(cross[i] ?? [], solvedCross[j] ?? []);
  return { means, between };
}

/** Gaussian elimination with row exchange. */
function solveLinear(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i] ?? 0]);
  const n = rows.length;
  for (let k = 0; k < n; k += 1) {
    const pivot = rows
      .slice(k)
      .reduce((best, row, i) => (Math.abs(row[k] ?? 0) > Math.abs(rows[best]?.[k] ?? 0) ? i + k : best), k);
    [rows[k], rows[pivot]] = [rows[pivot] ?? [], rows[k] ?? []];
    for (let i = k + 1; i < n; i += 1) {
      const factor = (rows[i]?.[k] ?? 0) / (rows[k]?.[k] ?? 1);
      for (let j = k; j <= n; j += 1) (rows[i] ?? [])[j] = (rows[i]?.[j] ?? 0) - factor * (rows[k]?.[j] ?? 0);
    }
  }
  const solution = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i -= 1) {
    const known = solution.reduce((sum, v, j) => (j > i ? sum + v * (rows[i]?.[j] ?? 0) : sum), 0);
    solution[i] = ((rows[i]?.[n] ?? 0) - known) / (rows[i]?.[i] ?? 1);
  }
  return solution;
}

const variance = (max: number) => fc.double({ min: 0, max, noNaN: true });
const series = fc.array(
  fc.record({
    gap: fc.constantFrom(0, 0.3, 1, 1.1, 4, 9),
    value: fc.double({ min: 0, max: 60, noNaN: true }),
    spread: fc.constantFrom(1, 1, 1, 6),
  }),
  { minLength: 2, maxLength: 8 },
);
const anyInput = fc
  .record({
    series,
    share: fc.constantFrom(0, 1),
    base: fc.double({ min: 0, max: 1, noNaN: true }),
    after: fc.constantFrom(0, 3),
  })
  .map(({ series: marks, share, base, after }) => {
    let week = 2;
    const weeks = marks.map(({ gap }, i) => (i === 0 ? week : (week += gap)));
    return inputOf(
      weeks,
      marks.map((mark) => mark.value),
      {
        spreads: marks.map((mark) => mark.spread),
        shares: marks.map((_, i) => share * ([1, 0.5, 0.25][i] ?? 0)),
        learningMean: share * 0.7,
        learningVariance: share * 0.16,
        baseWeek: 2 + base * (week - 2),
        endWeek: week + after,
      },
    );
  });
const anyModel = fc.record({
  slopeVariance: variance(0.3),
  bendVariance: variance(0.02),
  levelVariance: variance(0.1),
  damping: fc.constantFrom(0, 0.09, 0.5),
});

describe('against one large normal distribution, on random dates, models, learning and spreads', () => {
  test('level now, level then and the variance of the change', () => {
    fc.assert(
      fc.property(anyInput, anyModel, (input, model) => {
        const state = filterTrend(input, model);
        const { means, between } = conditionDensely(input, model, [input.endWeek, input.baseWeek]);
        expect(state.level).toBeCloseTo(means[0] ?? 0, 2);
        expect(state.base).toBeCloseTo(means[1] ?? 0, 2);
        expect(state.levelVariance).toBeCloseTo(between(0, 0), 2);
        expect(state.differenceVariance).toBeCloseTo(between(0, 0) + between(1, 1) - 2 * between(0, 1), 2);
      }),
      { numRuns: 60 },
    );
  });

  test('the smoothed curve', () => {
    fc.assert(
      fc.property(anyInput, anyModel, (input, model) => {
        const trace = makeTrace(input.values.length);
        filterTrend(input, model, trace);
        const { levels, variances } = smoothTrend(input, model, trace);
        const { means, between } = conditionDensely(input, model, Array.from(input.weeks));
        levels.forEach((level, i) => expect(level).toBeCloseTo(means[i] ?? 0, 2));
        variances.forEach((v, i) => expect(v).toBeCloseTo(between(i, i), 2));
      }),
      { numRuns: 60 },
    );
  });
});

test('the misfit of a mark is its distance from what the others say, in standard errors', () => {
  const weeks = [0, 1, 2.5, 3, 6, 7];
  const values = [10, 12, 11, 19, 13, 12];
  const model: TrendModel = { slopeVariance: 0.1, bendVariance: 0.01, levelVariance: 0.02, damping: 0.1 };
  const trace = makeTrace(values.length);
  filterTrend(inputOf(weeks, values), model, trace);
  const { misfits } = smoothTrend(inputOf(weeks, values), model, trace);
  values.forEach((value, left) => {
    const spreads = values.map((_, i) => (i === left ? 1e9 : 1));
    const { means, between } = conditionDensely(inputOf(weeks, values, { spreads }), model, [
      weeks[left] ?? 0,
    ]);
    expect(misfits[left]).toBeCloseTo((value - (means[0] ?? 0)) / Math.sqrt(1 + between(0, 0)), 2);
  });
});

test('weeks without marks widen the level and let the slope fade', () => {
  const weeks = [0, 1, 2, 3, 4, 5];
  const values = [10, 11, 12, 13, 14, 15];
  const model: TrendModel = { slopeVariance: 0.2, bendVariance: 0.001, levelVariance: 0, damping: 0.09 };
  const now = filterTrend(inputOf(weeks, values), model);
  const later = filterTrend(inputOf(weeks, values, { endWeek: 15 }), model);
  expect(later.levelVariance).toBeGreaterThan(now.levelVariance);
  expect(later.slope).toBeCloseTo(now.slope * Math.exp(-0.9), 12);
});
