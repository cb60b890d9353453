import type { TrendInput } from '#domain/change/linear-trend';

type Extras = Partial<Omit<TrendInput, 'spreads' | 'shares'>> & {
  readonly spreads?: readonly number[];
  readonly shares?: readonly number[];
};

/** A series for the trend filter: errors of 1 and no learning unless said otherwise. */
export function inputOf(
  weeks: readonly number[],
  values: readonly number[],
  extras: Extras = {},
): TrendInput {
  const { spreads = values.map(() => 1), shares = values.map(() => 0), ...more } = extras;
  return {
    weeks: Float64Array.from(weeks),
    values: Float64Array.from(values),
    spreads: Float64Array.from(spreads),
    shares: Float64Array.from(shares),
    learningMean: 0,
    learningVariance: 0,
    endWeek: weeks.at(-1) ?? 0,
    ...more,
  };
}
