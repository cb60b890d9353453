import { normalCdf } from '../student-t.ts';

export interface MannKendall {
  /** Rises less falls over all pairs. */
  readonly s: number;
  /** Variance of S without trend, corrected for ties. */
  readonly variance: number;
  /** With continuity correction; 0 when S is 0. */
  readonly z: number;
  /** Two-sided. */
  readonly p: number;
  /** Kendall's tau-a: S ÷ pairs. */
  readonly tau: number;
}

/**
 * Mann-Kendall test for a trend, values in order of time. Source: USEPA Unified Guidance 2009, chapter 17.
 * With fewer than two values, or all equal, S, z and tau are 0 and p is 1.
 */
export function mannKendall(values: readonly number[]): MannKendall {
  const n = values.length;
  let s = 0;
  for (let i = 0; i < n; i += 1) {
    for (let j = i + 1; j < n; j += 1) s += Math.sign((values[j] ?? 0) - (values[i] ?? 0));
  }
  const ties = new Map<number, number>();
  for (const value of values) ties.set(value, (ties.get(value) ?? 0) + 1);
  const spread = (k: number): number => k * (k - 1) * (2 * k + 5);
  const variance = (spread(n) - [...ties.values()].reduce((sum, k) => sum + spread(k), 0)) / 18;
  const z = s === 0 || variance <= 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(variance);
  const p = Math.min(1, 2 * (1 - normalCdf(Math.abs(z))));
  return { s, variance, z, p, tau: n < 2 ? 0 : s / ((n * (n - 1)) / 2) };
}
