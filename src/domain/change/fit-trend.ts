import { filterTrend, makeTrace, smoothTrend, type TrendInput, type TrendState } from './linear-trend.ts';
import { student95, studentCdf } from './student-t.ts';
import { TREND_MODELS, type WeightedModel } from './trend-models.ts';

/** How many repeats the prior typical error is worth (degrees of the scaled inverse chi-square prior). */
export const PRIOR_REPEATS = 8;

/** A first mark is expected to be half a typical error low, ± half; it halves with each repeat, three in all. */
export const LEARNING_SHARES: readonly number[] = [1, 0.5, 0.25];
export const LEARNING_MEAN = 0.5;
export const LEARNING_SD = 0.5;

/** A mark further than this many errors from what the other marks say counts less: (limit ÷ misfit)². */
export const MISFIT_LIMIT = 2.5;

/** Models with less than this share of belief are left out of the smoothed curve. */
const NEGLIGIBLE = 0.02;

export interface Interval {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

export interface TrendFit {
  readonly level: Interval;
  readonly slopePerWeek: Interval;
  readonly difference: Interval;
  readonly chanceBetter: number;
  readonly typicalError: number;
  readonly curve: readonly Interval[];
  /** Indices of marks that count less because they do not fit the others. */
  readonly outliers: readonly number[];
}

export interface TrendQuestion {
  /** Weeks and values in order; larger is better. */
  readonly weeks: readonly number[];
  readonly values: readonly number[];
  readonly priorError: number;
  readonly learns: boolean;
  readonly baseWeek: number;
  readonly endWeek: number;
}

/**
 * Fits the local linear trend: outliers found and weighted first, then every model of `TREND_MODELS` filtered and
 * averaged by likelihood × belief, σ² integrated out. Intervals are 95 %, Student's t on the averaged mean and
 * variance. Needs at least one mark and finite numbers.
 */
export function fitTrend(question: TrendQuestion): TrendFit {
  const { priorError, learns, values } = question;
  const count = values.length;
  const spreads = new Float64Array(count).fill(1);
  const input: TrendInput = {
    weeks: question.weeks,
    values,
    spreads,
    shares: Float64Array.from({ length: count }, (_, i) => (learns ? (LEARNING_SHARES[i] ?? 0) : 0)),
    learningMean: learns ? LEARNING_MEAN * priorError : 0,
    learningVariance: learns ? LEARNING_SD ** 2 : 0,
    baseWeek: question.baseWeek,
    endWeek: question.endWeek,
  };
  const trace = makeTrace(count);
  const outliers = weighOutliers(input, spreads, trace, priorError);
  const degrees = PRIOR_REPEATS + count - 1;
  const fits = TREND_MODELS.map((model) => {
    const state = filterTrend(input, model);
    const sum = PRIOR_REPEATS * priorError ** 2 + state.sumOfSquares;
    const score = Math.log(model.belief) - state.logDeterminant / 2 - (degrees / 2) * Math.log(sum);
    return { model, state, score, errorVariance: sum / degrees };
  });
  const best = Math.max(...fits.map((fit) => fit.score));
  const total = fits.reduce((sum, fit) => sum + Math.exp(fit.score - best), 0);
  const weighted = fits.map((fit) => ({ ...fit, weight: Math.exp(fit.score - best) / total }));
  const t = student95(degrees);
  const average = (pick: (state: TrendState) => readonly [number, number]): Interval =>
    mix(weighted.map((fit) => [fit.weight, ...scale(pick(fit.state), fit.errorVariance)] as const), t);
  return {
    level: average((s) => [s.level, s.levelVariance]),
    slopePerWeek: average((s) => [s.slope, s.slopeVariance]),
    difference: average((s) => [s.level - s.base, s.differenceVariance]),
    chanceBetter: weighted.reduce(
      (sum, { weight, state, errorVariance }) =>
        sum +
        weight *
          chanceAbove(state.level - state.base, Math.sqrt(state.differenceVariance * errorVariance), degrees),
      0,
    ),
    typicalError: Math.sqrt(weighted.reduce((sum, fit) => sum + fit.weight * fit.errorVariance, 0)),
    curve: averageCurve(input, weighted, trace, t),
    outliers,
  };
}

/** Two rounds: smooth with a trend that can bend, widen the marks that do not fit, smooth again. */
function weighOutliers(
  input: TrendInput,
  spreads: Float64Array,
  trace: Float64Array,
  priorError: number,
): number[] {
  if (input.values.length < 3) return [];
  const flexible = TREND_MODELS[3] as WeightedModel;
  for (let round = 0; round < 2; round += 1) {
    filterTrend(input, flexible, trace);
    const { misfits } = smoothTrend(input, trace);
    const error = robustError(misfits, priorError);
    for (let i = 0; i < misfits.length; i += 1) {
      const excess = Math.abs(misfits[i] ?? 0) / (error * MISFIT_LIMIT);
      spreads[i] = Math.max(1, (round === 0 ? 1 : (spreads[i] ?? 1)) * (round === 0 ? excess ** 2 : 1));
    }
  }
  return [...spreads.keys()].filter((i) => (spreads[i] ?? 1) > 1);
}

/** Median size of the misfits as a standard deviation, shrunk to the prior; one wild mark cannot move it. */
function robustError(misfits: Float64Array, priorError: number): number {
  const sizes = Float64Array.from(misfits, Math.abs).sort();
  const median = sizes[sizes.length >> 1] ?? 0;
  const own = median / 0.6745;
  const weight = sizes.length / 2;
  return Math.sqrt((PRIOR_REPEATS * priorError ** 2 + weight * own ** 2) / (PRIOR_REPEATS + weight));
}

function averageCurve(
  input: TrendInput,
  fits: readonly { model: WeightedModel; weight: number; errorVariance: number }[],
  trace: Float64Array,
  t: number,
): Interval[] {
  const kept = fits.filter((fit) => fit.weight >= NEGLIGIBLE);
  const total = kept.reduce((sum, fit) => sum + fit.weight, 0);
  const parts = kept.map(({ model, weight, errorVariance }) => {
    filterTrend(input, model, trace);
    return { ...smoothTrend(input, trace), weight: weight / total, errorVariance };
  });
  return Array.from(input.values, (_, i) =>
    mix(
      parts.map((p) => [p.weight, p.levels[i] ?? 0, (p.variances[i] ?? 0) * p.errorVariance] as const),
      t,
    ),
  );
}

function scale([mean, variance]: readonly [number, number], by: number): [number, number] {
  return [mean, variance * by];
}

function mix(parts: readonly (readonly [weight: number, mean: number, variance: number])[], t: number): Interval {
  const value = parts.reduce((sum, [weight, mean]) => sum + weight * mean, 0);
  const variance = parts.reduce((sum, [weight, mean, own]) => sum + weight * (own + (mean - value) ** 2), 0);
  const half = t * Math.sqrt(variance);
  return { value, low: value - half, high: value + half };
}

/** Chance that the change is above nought; a change that cannot have happened yet is a coin toss. */
function chanceAbove(mean: number, sd: number, degrees: number): number {
  return sd > 0 ? studentCdf(mean / sd, degrees) : mean > 0 ? 1 : mean < 0 ? 0 : 0.5;
}
