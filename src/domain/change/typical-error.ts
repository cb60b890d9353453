/** z for 95 % two-sided (1.96 × √2 = 2.7718) and 80 % two-sided (1.2816 × √2 = 1.8124). */
export const SMALLEST_CHANGE_95 = 1.959964 * Math.SQRT2;
export const SMALLEST_CHANGE_80 = 1.281552 * Math.SQRT2;

/**
 * Typical error from retests: SD of the differences divided by √2, in the unit of the test.
 * Differences are taken second minus first, so a shared learning gain does not count as error.
 * `null` with fewer than two pairs. Source: Hopkins WG. Sports Med 2000;30:1-15.
 */
export function typicalErrorFromPairs(pairs: readonly (readonly [number, number])[]): number | null {
  if (pairs.length < 2) return null;
  const differences = pairs.map(([first, second]) => second - first);
  const mean = differences.reduce((sum, d) => sum + d, 0) / differences.length;
  const sumOfSquares = differences.reduce((sum, d) => sum + (d - mean) ** 2, 0);
  return Math.sqrt(sumOfSquares / (differences.length - 1) / 2);
}

/**
 * Standard error of measurement from the spread between people and the test-retest correlation:
 * SEM = SD √(1 − ICC). Source: Weir JP. J Strength Cond Res 2005;19:231-240 (form of the formula: memory).
 */
export function standardErrorOfMeasurement(sdBetween: number, icc: number): number {
  return sdBetween * Math.sqrt(1 - icc);
}

/**
 * Smallest real change between two single marks: z √2 × typical error. 95 %: 2.772; 80 %: 1.812.
 * Source: Weir 2005 (memory for the form); z values are arithmetic.
 */
export function smallestRealChange(typicalError: number, confidence: 80 | 95): number {
  return typicalError * (confidence === 95 ? SMALLEST_CHANGE_95 : SMALLEST_CHANGE_80);
}

/** Smallest worthwhile change: 0.2 × SD between people. Source: Hopkins 2000. */
export function smallestWorthwhileChange(sdBetween: number): number {
  return 0.2 * sdBetween;
}

/**
 * A member's error variance from their own repeats, pooled within the person and shrunk to the prior: the mean form of
 * a scaled inverse chi-square posterior, (repeats × prior² + sum of squares) ÷ (repeats + degrees).
 * `priorRepeats` says what the prior is worth: with 8, eight own repeats weigh as much.
 * `sumOfSquares` are squared deviations from what was expected, `degrees` how many of them are free.
 */
export function shrunkErrorVariance(
  prior: number,
  priorRepeats: number,
  sumOfSquares: number,
  degrees: number,
): number {
  return (priorRepeats * prior ** 2 + sumOfSquares) / (priorRepeats + degrees);
}
