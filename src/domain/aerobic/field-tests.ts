/** Metres in a mile. */
export const MILE_M = 1609.344;
/** Pounds in a kilogram. */
export const POUNDS_PER_KG = 2.2046226218;

const isPositive = (...values: number[]): boolean =>
  values.every((value) => Number.isFinite(value) && value > 0);

/**
 * VO2max from the distance of a twelve-minute run: (m − 504.9) / 44.73 mL/kg/min.
 * Source: Cooper KH. JAMA 1968;203:201-204 (115 men of the US Air Force: memory). An estimate; the running must be
 * all-out. Below 505 m the line falls under zero and means nothing.
 */
export function cooperRunVo2max(metres: number): number {
  return (metres - 504.9) / 44.73;
}

/** The distance in metres that Cooper's line gives for a VO2max: the same line turned round. */
export function cooperRunDistance(vo2max: number): number {
  return vo2max * 44.73 + 504.9;
}

/**
 * VO2max from the time of a 1.5-mile run: 3.5 + 483 / minutes, mL/kg/min. Source: ACSM's Guidelines for Exercise
 * Testing and Prescription. Infinite for a time of 0, so refuse such a time first.
 */
export function mileAndHalfVo2max(seconds: number): number {
  return 3.5 + (483 * 60) / seconds;
}

/** The 1.5-mile time in seconds for a VO2max above 3.5. */
export function mileAndHalfSeconds(vo2max: number): number {
  return (483 * 60) / (vo2max - 3.5);
}

export interface Walker {
  readonly massKg: number;
  readonly ageYears: number;
  readonly sex: 'male' | 'female';
  /** Beats a minute at the end of the mile. */
  readonly endPulse: number;
}

/** Everything of Kline's equation but the time. */
function rockportRest({ massKg, ageYears, sex, endPulse }: Walker): number {
  const pounds = massKg * POUNDS_PER_KG;
  return 132.853 - 0.0769 * pounds - 0.3877 * ageYears + (sex === 'male' ? 6.315 : 0) - 0.1565 * endPulse;
}

/**
 * VO2max from a one-mile walk: 132.853 − 0.0769 lb − 0.3877 age + 6.315 (men) − 3.2649 min − 0.1565 pulse, mL/kg/min.
 * Standard error 5.0 mL/kg/min, r 0.88. Source: Kline GM et al. Med Sci Sports Exerc 1987;19:253-259 (adults of 30 to
 * 69: memory). Null unless every input is a positive number.
 */
export function rockportVo2max(walk: Walker & { readonly seconds: number }): number | null {
  const { massKg, ageYears, endPulse, seconds } = walk;
  return isPositive(massKg, ageYears, endPulse, seconds)
    ? rockportRest(walk) - (3.2649 * seconds) / 60
    : null;
}

/** The walking time in seconds that gives this walker a VO2max. */
export function rockportSeconds(walker: Walker, vo2max: number): number {
  return ((rockportRest(walker) - vo2max) / 3.2649) * 60;
}

/**
 * The absolute form of the walk: 6.9652 + 0.0091 lb − 0.0257 age + 0.5955 (men) − 0.2240 min − 0.0115 pulse, L/min.
 * Source: Kline 1987; NCI Thesaurus C166279. Null unless every input is a positive number.
 */
export function rockportVo2maxLitres(walk: Walker & { readonly seconds: number }): number | null {
  const { massKg, ageYears, sex, endPulse, seconds } = walk;
  if (!isPositive(massKg, ageYears, endPulse, seconds)) return null;
  const pounds = massKg * POUNDS_PER_KG;
  const male = sex === 'male' ? 0.5955 : 0;
  return 6.9652 + 0.0091 * pounds - 0.0257 * ageYears + male - 0.224 * (seconds / 60) - 0.0115 * endPulse;
}

/**
 * The time for another distance: T2 = T1 (D2 / D1)^1.06, seconds. Sensible for efforts of about 3.5 to 230 minutes on
 * both sides; null outside them. Source: Riegel PS. American Scientist 1981;69(3):285-290 (runners).
 */
export function riegelSeconds(seconds: number, fromM: number, toM: number): number | null {
  if (!isPositive(seconds, fromM, toM)) return null;
  const other = seconds * (toM / fromM) ** 1.06;
  return [seconds, other].every((time) => time >= 210 && time <= 13_800) ? other : null;
}
