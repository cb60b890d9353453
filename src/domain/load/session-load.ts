/** Days that monotony looks at; days of rest count as 0. */
const MONOTONY_DAYS = 7;

/** The published strain and monotony are weak evidence; every page that shows them says so. */
export const STRAIN_CAUTION =
  'Monotony and strain come from a few athletes and say little about one person. Your own sleep and soreness say more.';

/** Minutes a week for adults, moderate or half as many vigorous (WHO 2020, as the OECD reprints them). */
export const WHO_WEEKLY_MINUTES = { moderate: [150, 300], vigorous: [75, 150] } as const;

/**
 * Session load, arbitrary units: effort (0 to 10) times minutes (Foster 2001, J Strength Cond Res 15:109-115). Null when
 * either is missing or makes no sense.
 */
export function sessionLoad(effort: number, minutes: number): number | null {
  const isSound = effort >= 0 && effort <= 10 && minutes >= 0 && Number.isFinite(minutes);
  return isSound ? effort * minutes : null;
}

const isSound = (loads: readonly number[]): boolean =>
  loads.every((load) => Number.isFinite(load) && load >= 0);

/** The sum of a week's session loads, arbitrary units; null when one of them makes no sense. */
export function weeklyLoad(loads: readonly number[]): number | null {
  return isSound(loads) ? loads.reduce((sum, load) => sum + load, 0) : null;
}

/**
 * Monotony: mean over standard deviation of seven daily loads, days of rest kept as 0 (Foster 1998, Med Sci Sports Exerc
 * 30:1164-1168). The paper does not fix the deviation; n − 1 is used here. Null with fewer or more days, a load that makes
 * no sense, or seven equal days: never infinity.
 */
export function monotony(dailyLoads: readonly number[]): number | null {
  if (dailyLoads.length !== MONOTONY_DAYS || !isSound(dailyLoads)) return null;
  if (dailyLoads.every((load) => load === dailyLoads[0])) return null;
  const mean = dailyLoads.reduce((sum, load) => sum + load, 0) / MONOTONY_DAYS;
  const squares = dailyLoads.reduce((sum, load) => sum + (load - mean) ** 2, 0);
  return mean / Math.sqrt(squares / (MONOTONY_DAYS - 1));
}

/** Strain, arbitrary units: weekly load times monotony (Foster 1998); null where monotony is. */
export function strain(dailyLoads: readonly number[]): number | null {
  const evenness = monotony(dailyLoads);
  const week = weeklyLoad(dailyLoads);
  return evenness === null || week === null ? null : week * evenness;
}
