import { mannKendall } from './mann-kendall.ts';

export interface TheilSen {
  /** Median of the slopes of all pairs, per unit of time. */
  readonly slope: number;
  /** Median y less slope × median x (Conover). */
  readonly intercept: number;
  /** Two-sided 95 % limits by ranks interpolated as Gilbert 1987 does. */
  readonly low: number;
  readonly high: number;
}

/** z of the two-sided 95 % limits. */
const Z = 1.959964;

/**
 * Theil-Sen slope. Pairs at the same time are left out; `null` when there is no pair.
 * Source: USEPA Unified Guidance 2009, section 17.3.3.
 */
export function theilSen(times: readonly number[], values: readonly number[]): TheilSen | null {
  const slopes: number[] = [];
  for (let i = 0; i < times.length; i += 1) {
    for (let j = i + 1; j < times.length; j += 1) {
      const dt = (times[j] ?? 0) - (times[i] ?? 0);
      if (dt !== 0) slopes.push(((values[j] ?? 0) - (values[i] ?? 0)) / dt);
    }
  }
  if (slopes.length === 0) return null;
  slopes.sort((a, b) => a - b);
  const slope = median(slopes);
  const reach = Z * Math.sqrt(Math.max(0, mannKendall(values).variance));
  return {
    slope,
    intercept: median([...values].sort((a, b) => a - b)) - slope * median([...times].sort((a, b) => a - b)),
    low: atRank(slopes, (slopes.length - reach) / 2),
    high: atRank(slopes, (slopes.length + reach) / 2 + 1),
  };
}

function median(sorted: readonly number[]): number {
  const half = sorted.length >> 1;
  const upper = sorted[half] ?? 0;
  return sorted.length % 2 === 1 ? upper : ((sorted[half - 1] ?? 0) + upper) / 2;
}

/** Value at a rank counted from 1, linearly between whole ranks, held at the ends. */
function atRank(sorted: readonly number[], rank: number): number {
  const held = Math.min(Math.max(rank, 1), sorted.length);
  const below = Math.floor(held);
  const low = sorted[below - 1] ?? 0;
  return low + (held - below) * ((sorted[below] ?? low) - low);
}
