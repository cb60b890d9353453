/** The share of a day's difference that the trend takes up. Source: Walker J. The Hacker's Diet, 1991. */
export const WEIGHT_SMOOTHING = 0.1;

/** The sentence that goes with every weight: weight alone is never a verdict. Common practice, no source. */
export const MUSCLE_FIRST =
  'Muscle comes before fat goes, so weight may rise first. Weight alone is never a verdict.';

/**
 * Daily trend of weight: T += 0.1 (W − T), beginning at `start`, or at the first weight when there is no trend yet. Same
 * unit in as out; one weight a day. With `pencil` each correction is rounded to 0.1, as the book does on paper.
 * Source: Walker, The Hacker's Diet, 1991, chapter on the pencil and the trend.
 */
export function smoothDailyWeights(
  weights: readonly number[],
  start: number | undefined = weights[0],
  { pencil = false } = {},
): readonly number[] {
  if (start === undefined) return [];
  let trend = start;
  return weights.map((weight) => {
    const correction = WEIGHT_SMOOTHING * (weight - trend);
    trend = pencil ? Math.round((trend + roundToTenth(correction)) * 10) / 10 : trend + correction;
    return trend;
  });
}

/** To the nearest tenth, halves away from zero, as one rounds on paper. */
function roundToTenth(value: number): number {
  return (Math.sign(value) * Math.round(Math.abs(value) * 10 + 1e-9)) / 10;
}

export interface WeightReading {
  /** Days since any fixed day; need not be whole or even. */
  readonly day: number;
  readonly kg: number;
}

/**
 * The same trend over irregular days: a reading after a gap of d days takes up 1 − 0.9^d of the difference, which is the
 * published rule when d is 1 (derived). Readings that are no number are left out; the rest is put in order of day.
 */
export function smoothWeights(
  readings: readonly WeightReading[],
): readonly (WeightReading & { readonly trendKg: number })[] {
  const ordered = readings
    .filter(({ day, kg }) => Number.isFinite(day) && Number.isFinite(kg) && kg > 0)
    .toSorted((a, b) => a.day - b.day);
  let last: { day: number; trendKg: number } | null = null;
  return ordered.map((reading) => {
    const share: number = last ? 1 - (1 - WEIGHT_SMOOTHING) ** (reading.day - last.day) : 1;
    const trendKg: number = last ? last.trendKg + share * (reading.kg - last.trendKg) : reading.kg;
    last = { day: reading.day, trendKg };
    return { ...reading, trendKg };
  });
}
