import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inputOf } from '#support/trend-input';
import {
  EARLY_WEEKS,
  filterTrend,
  makeTrace,
  smoothTrend,
  type TrendInput,
  type TrendModel,
} from './linear-trend.ts';

/** Mean and variance of the wanted quantities by conditioning one large normal distribution: slow and plain. */
function conditionDensely(input: TrendInput, model: TrendModel, wanted: readonly number[]) {
  const start = input.weeks[0] ?? 0;
  const value0 = input.values[0] ?? 0;
  const DIFFUSE = 1e7;
  // A step that begins early is early as a whole.
  const lateFrom = [...input.weeks, input.endWeek].find((week) => week >= start + EARLY_WEEKS) ?? Infinity;
  const keep = (dt: number) => Math.exp(-model.damping * dt);
  const reach = (dt: number) => (model.damping === 0 ? dt : (1 - keep(dt)) / model.damping);
  /** Bends between two moments after the start, as they reach the levels at t and u: many small steps. */
  const bendsBetween = (from: number, to: number, t: number, u: number, perWeek: number): number => {
    const steps = 1000;
    const h = Math.max(0, to - from) / steps;
    let sum = 0;
    for (let i = 0; i < steps; i += 1) {
      const s = from + (i + 0.5) * h;
      sum += perWeek * reach(t - s) * reach(u - s) * h;
    }
    return sum;
  };
  const covariance = (a: number, b: number): number => {
    const [t, u] = [a - start, b - start];
    const both = Math.min(t, u);
    const early = Math.min(both, lateFrom - start);
    const bends =
      bendsBetween(0, early, t, u, model.bendVariance + model.earlyBendVariance) +
      bendsBetween(early, both, t, u, model.bendVariance);
    return DIFFUSE + model.slopeVariance * reach(t) * reach(u) + bends + model.levelVariance * both;
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
    after: fc.constantFrom(0, 3),
  })
  .map(({ series: marks, share, after }) => {
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
        endWeek: week + after,
      },
    );
  });
const anyModel = fc.record({
  slopeVariance: variance(0.3),
  bendVariance: variance(0.02),
  earlyBendVariance: fc.constantFrom(0, 0.05),
  levelVariance: variance(0.1),
  damping: fc.constantFrom(0, 0.09, 0.5),
});

describe('against one large normal distribution, on random dates, models, learning and spreads', () => {
  test('level now, level then and the variance of the change', () => {
    fc.assert(
      fc.property(anyInput, anyModel, (input, model) => {
        const state = filterTrend(input, model);
        const { means, between } = conditionDensely(input, model, [input.endWeek, input.weeks[0] ?? 0]);
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
  const model: TrendModel = {
    slopeVariance: 0.1,
    bendVariance: 0.01,
    earlyBendVariance: 0,
    levelVariance: 0.02,
    damping: 0.1,
  };
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
