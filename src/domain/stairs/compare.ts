import { formatNumber } from '../numbers/format.ts';

/** A staircase as a mark remembers it. */
export interface Staircase {
  readonly stepHeightMm: number;
  /** Steps of one flight; a longer flight has fewer turns. */
  readonly stairCount: number;
}

/** How far two heights may differ and still be the same step. Common practice, no source. */
export const SAME_STEP_MM = 3;

/** True when two marks were made on the same stairs, so that their counts may be set side by side. */
export function isSameStairs(a: Staircase, b: Staircase): boolean {
  return a.stairCount === b.stairCount && Math.abs(a.stepHeightMm - b.stepHeightMm) <= SAME_STEP_MM;
}

export interface Conversion {
  /** The count that climbs the same height on the other stairs; not rounded. */
  readonly steps: number;
  readonly isConverted: boolean;
  readonly sentence: string;
}

/**
 * A count made on one staircase as it would read on another: equal height climbed. Height is all it keeps: a longer
 * flight has fewer turns, a steeper one tires otherwise, so the comparison is weak and says so (common practice, no
 * source). Null when a height or the count cannot be.
 */
export function convertSteps(steps: number, from: Staircase, to: Staircase): Conversion | null {
  if (!(steps >= 0) || !Number.isFinite(steps)) return null;
  if (![from, to].every(({ stepHeightMm }) => stepHeightMm >= 80 && stepHeightMm <= 300)) return null;
  if (isSameStairs(from, to))
    return { steps, isConverted: false, sentence: 'The same stairs: counts compare as they are.' };
  const converted = (steps * from.stepHeightMm) / to.stepHeightMm;
  const sentence = `Other stairs: ${formatNumber(steps)} there climb as high as ${formatNumber(converted)} here. Height is all that compares.`;
  return { steps: converted, isConverted: true, sentence };
}
