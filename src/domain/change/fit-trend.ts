import { filterTrend, makeTrace, smoothTrend, type TrendInput, type TrendState } from './linear-trend.ts';
import { shrunkErrorVariance } from './typical-error.ts';
import { student95, studentCdf } from './student-t.ts';
import { BENDING_MODEL, FREE_MODEL, TREND_MODELS, type WeightedModel } from './trend-models.ts';

/** How many repeats the prior typical error is worth (degrees of the scaled inverse chi-square prior). */
export const PRIOR_REPEATS = 8;

/**
 * Learning is modelled, not thrown away: a first mark is expected to be 0.4 of a typical error low, SD 0.4, halving
 * with each repeat, three repeats in all. Dropping the first mark would cost members their baseline; believing it
 * would call the knack of the test a gain. Common practice, no source; sizes set by simulation.
 */
export const LEARNING_SHARES: readonly number[] = [1, 0.5, 0.25];
export const LEARNING_MEAN = 0.4;
export const LEARNING_SD = 0.4;

/** A mark further than this many errors from what the other marks say counts less: (limit ÷ misfit)². */
export const MISFIT_LIMIT = 2;

/** Models with less than this share of belief are left out of the smoothed curve. */
const NEGLIGIBLE = 0.02;

export interface Interval {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

export interface TrendFit {
  /** Level at the end week, and what it is above the level at the first mark. */
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
  /** Repeats made before the first of these; null for a test that cannot be learned. */
  readonly repeatsBefore: number | null;
  readonly endWeek: number;
}

interface ModelFit {
  readonly model: WeightedModel;
  readonly state: TrendState;
  readonly trace: Float64Array;
  readonly errorVariance: number;
  readonly weight: number;
}

/**
 * Fits the local linear trend: outliers found and weighted first, then every model of `TREND_MODELS` filtered and
 * averaged by likelihood × belief, σ² integrated out. Intervals are 95 %, Student's t on the averaged mean and
 * variance. Two marks are no trend: they are compared as they stand (`FREE_MODEL`), which is the published rule of the
 * smallest real change, less the learning. Needs at least one mark and finite numbers.
 */
export function fitTrend(question: TrendQuestion): TrendFit {
  const { priorError } = question;
  const repeatsBefore = question.repeatsBefore ?? LEARNING_SHARES.length;
  const values = Float64Array.from(question.values);
  const count = values.length;
  const spreads = new Float64Array(count).fill(1);
  const input: TrendInput = {
    weeks: Float64Array.from(question.weeks),
    values,
    spreads,
    shares: Float64Array.from(values, (_, i) => LEARNING_SHARES[i + repeatsBefore] ?? 0),
    learningMean: LEARNING_MEAN * priorError,
    learningVariance: LEARNING_SD ** 2,
    endWeek: question.endWeek,
  };
  const outliers = weighOutliers(input, spreads, priorError);
  // Two marks without a believed pace tell nothing of the error.
  const ownRepeats = count > 2 ? count - 1 : 0;
  const degrees = PRIOR_REPEATS + ownRepeats;
  const weighted = fitModels(input, count === 2 ? [FREE_MODEL] : TREND_MODELS, priorError, ownRepeats);
  const t = student95(degrees);
  const average = (pick: (state: TrendState) => readonly [number, number]): Interval =>
    mix(
      weighted.map((fit) => [fit.weight, ...scale(pick(fit.state), fit.errorVariance)] as const),
      t,
    );
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
    curve: averageCurve(input, weighted, t),
    outliers,
  };
}

/** Every model filtered, with its share of belief after the marks: likelihood (σ² integrated out) × belief. */
function fitModels(
  input: TrendInput,
  models: readonly WeightedModel[],
  priorError: number,
  ownRepeats: number,
): ModelFit[] {
  const fits = models.map((model) => {
    const trace = makeTrace(input.values.length);
    const state = filterTrend(input, model, trace);
    const sumOfSquares = ownRepeats > 0 ? state.sumOfSquares : 0;
    const errorVariance = shrunkErrorVariance(priorError, PRIOR_REPEATS, sumOfSquares, ownRepeats);
    const score =
      Math.log(model.belief) -
      state.logDeterminant / 2 -
      ((PRIOR_REPEATS + ownRepeats) / 2) * Math.log(errorVariance);
    return { model, state, trace, errorVariance, score };
  });
  const best = Math.max(...fits.map((fit) => fit.score));
  const total = fits.reduce((sum, fit) => sum + Math.exp(fit.score - best), 0);
  return fits.map(({ score, ...fit }) => ({ ...fit, weight: Math.exp(score - best) / total }));
}

/**
 * Two rounds: smooth with a trend that can bend, widen the marks that do not fit, smooth again with those out of
 * the way and widen by the new misfits. A mark within the limit keeps its full weight.
 */
function weighOutliers(input: TrendInput, spreads: Float64Array, priorError: number): number[] {
  if (input.values.length < 3) return [];
  const trace = makeTrace(input.values.length);
  for (let round = 0; round < 2; round += 1) {
    filterTrend(input, BENDING_MODEL, trace);
    const { misfits } = smoothTrend(input, BENDING_MODEL, trace);
    const limit = robustError(misfits, priorError) * MISFIT_LIMIT;
    // The misfit of a mark already widened is measured in wider errors; turn it back.
    spreads.forEach((spread, i) => {
      const misfit = (misfits[i] ?? 0) * Math.sqrt(spread);
      spreads[i] = Math.max(1, (misfit / limit) ** 2);
    });
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

function averageCurve(input: TrendInput, fits: readonly ModelFit[], t: number): Interval[] {
  const count = input.values.length;
  const means = new Float64Array(count);
  const squares = new Float64Array(count);
  let total = 0;
  for (const { model, trace, weight, errorVariance } of fits) {
    if (weight < NEGLIGIBLE) continue;
    const { levels, variances } = smoothTrend(input, model, trace);
    // Squares are summed about the marks, so that large values lose no digits.
    for (let i = 0; i < count; i += 1) {
      const offset = (levels[i] ?? 0) - (input.values[i] ?? 0);
      means[i] = (means[i] ?? 0) + weight * offset;
      squares[i] = (squares[i] ?? 0) + weight * ((variances[i] ?? 0) * errorVariance + offset * offset);
    }
    total += weight;
  }
  return Array.from(means, (sum, i) => {
    const mean = sum / total;
    const half = t * Math.sqrt(Math.max(0, (squares[i] ?? 0) / total - mean * mean));
    const value = (input.values[i] ?? 0) + mean;
    return { value, low: value - half, high: value + half };
  });
}

function scale([mean, variance]: readonly [number, number], by: number): [number, number] {
  return [mean, variance * by];
}

function mix(
  parts: readonly (readonly [weight: number, mean: number, variance: number])[],
  t: number,
): Interval {
  const value = parts.reduce((sum, [weight, mean]) => sum + weight * mean, 0);
  const variance = parts.reduce((sum, [weight, mean, own]) => sum + weight * (own + (mean - value) ** 2), 0);
  const half = t * Math.sqrt(variance);
  return { value, low: value - half, high: value + half };
}

/** Chance that the change is above nought; a change that cannot have happened yet is a coin toss. */
function chanceAbove(mean: number, sd: number, degrees: number): number {
  return sd > 0 ? studentCdf(mean / sd, degrees) : mean > 0 ? 1 : mean < 0 ? 0 : 0.5;
}
