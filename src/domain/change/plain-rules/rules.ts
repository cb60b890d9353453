import { SMALLEST_CHANGE_95 } from '../typical-error.ts';
import { student95 } from '../student-t.ts';
import { leastSquares } from './least-squares.ts';
import { lowess } from './lowess.ts';
import { mannKendall } from './mann-kendall.ts';
import { smoothHolt, smoothOnce } from './smoothing.ts';
import { theilSen } from './theil-sen.ts';

/** Marks so far, larger is better. */
export interface Series {
  readonly weeks: readonly number[];
  readonly values: readonly number[];
  /** Typical error that a plain rule is told; none of them estimates it. */
  readonly typicalError: number;
}

/** How strongly a rule says 'better': above its usual limit it calls a gain. */
export interface PlainRule {
  readonly name: string;
  readonly usualLimit: number;
  readonly score: (series: Series) => number;
}

/** Marks in each window of the moving average. */
const WINDOW = 4;

/**
 * The rules in common use that the model is set beside. Each is one-sided at 2.5 %.
 * Last minus first: Weir 2005 (memory). Mann-Kendall and Theil-Sen: USEPA 2009. Moving average: common practice.
 */
export const PLAIN_RULES: readonly PlainRule[] = [
  {
    name: 'Last minus first',
    usualLimit: SMALLEST_CHANGE_95,
    score: ({ values, typicalError }) => ((values.at(-1) ?? 0) - (values[0] ?? 0)) / typicalError,
  },
  {
    name: 'Moving average of four',
    usualLimit: 1.959964,
    score: ({ values, typicalError }) => {
      const size = Math.min(WINDOW, values.length >> 1);
      if (size === 0) return 0;
      const gain = mean(values.slice(-size)) - mean(values.slice(0, size));
      return gain / (typicalError * Math.sqrt(2 / size));
    },
  },
  {
    name: 'Mann-Kendall',
    usualLimit: 1.959964,
    score: ({ values }) => (values.length < 4 ? 0 : mannKendall(values).z),
  },
  {
    name: 'Theil-Sen',
    usualLimit: 0,
    score: ({ weeks, values, typicalError }) => {
      const fit = values.length < 4 ? null : theilSen(weeks, values);
      return fit ? fit.low / typicalError : -1;
    },
  },
  {
    name: 'Straight line',
    usualLimit: 0,
    score: ({ weeks, values }) => {
      const line = values.length < 4 ? null : leastSquares(weeks, values);
      // A perfect line has no error left to compare with.
      if (!line || line.slopeError === 0) return -1;
      return line.slope / line.slopeError - student95(Math.max(4, values.length - 2));
    },
  },
];

/** A plain way to say where a member stands now. */
export interface PlainLevel {
  readonly name: string;
  readonly levelOf: (series: Series) => number;
}

/** Levels that the model's level is set beside. Weights of the smoothers: common practice, no source. */
export const PLAIN_LEVELS: readonly PlainLevel[] = [
  { name: 'Last mark', levelOf: ({ values }) => values.at(-1) ?? 0 },
  { name: 'Mean of the last four', levelOf: ({ values }) => mean(values.slice(-WINDOW)) },
  { name: 'Single smoothing, 0.3', levelOf: ({ values }) => smoothOnce([...values, 0], 0.3).at(-1) ?? 0 },
  {
    name: 'Holt, 0.4 and 0.1',
    levelOf: ({ values }) =>
      smoothHolt(values.slice(1), 0.4, 0.1, { level: values[0] ?? 0, trend: 0 }).at(-1)?.level ??
      values[0] ??
      0,
  },
  { name: 'Lowess', levelOf: ({ weeks, values }) => lowess(weeks, values).at(-1) ?? 0 },
];

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
