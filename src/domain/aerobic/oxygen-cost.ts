/** Oxygen at rest, the metabolic unit, in mL/kg/min (a convention). */
export const ONE_MET = 3.5;
/** Energy from a litre of oxygen, kcal (rounded convention). */
export const KCAL_PER_LITRE = 5;

/** Oxygen uptake as multiples of rest: VO2 / 3.5. */
export function metsOf(vo2: number): number {
  return vo2 / ONE_MET;
}

/** Metres a minute in one mile an hour, rounded as ACSM prints it (26.8224 exactly). */
export const ACSM_METRES_PER_MINUTE_PER_MPH = 26.8;

/** The published range of the stepping equation: rounds a minute and height of the step. */
export const STEPPING_RANGE = { roundsPerMinute: [12, 30], stepHeightM: [0.04, 0.4] } as const;

const isWithin = (value: number, [from, to]: readonly [number, number]): boolean =>
  value >= from && value <= to;

/**
 * Oxygen cost of stepping up and down: 0.2 f + 1.33 × 1.8 H f + 3.5 mL/kg/min; f full rounds (up and down again) a
 * minute, H the step's height in metres. About 12 to 30 rounds and 0.04 to 0.40 m; null outside. Standard error 1.7,
 * r 0.95 (Latin RW et al. Med Sci Sports Exerc 2001, PMID 11581567, 55 adults, 0.1 to 0.3 m, 20 to 25 rounds).
 * Source: ACSM GETP10 Table 6.3. Cost, gross, of a steady effort; not a maximum.
 */
export function steppingVo2(roundsPerMinute: number, stepHeightM: number): number | null {
  if (!isWithin(roundsPerMinute, STEPPING_RANGE.roundsPerMinute)) return null;
  if (!isWithin(stepHeightM, STEPPING_RANGE.stepHeightM)) return null;
  return 0.2 * roundsPerMinute + 1.33 * 1.8 * stepHeightM * roundsPerMinute + ONE_MET;
}

/** The same with Latin's rounded coefficient: 0.2 f + 2.4 H f + 3.5 (PMID 11581567). Null outside the range above. */
export function steppingVo2Latin(roundsPerMinute: number, stepHeightM: number): number | null {
  if (steppingVo2(roundsPerMinute, stepHeightM) === null) return null;
  return 0.2 * roundsPerMinute + 2.4 * stepHeightM * roundsPerMinute + ONE_MET;
}

/**
 * Oxygen cost of running: 0.2 S + 0.9 S G + 3.5 mL/kg/min; S metres a minute, G slope as a fraction. Source: ACSM
 * Health Fitness J 2020;24(4). For running, about 134 m/min and faster (range: memory).
 */
export function runningVo2(metresPerMinute: number, slope: number): number {
  return 0.2 * metresPerMinute + 0.9 * metresPerMinute * slope + ONE_MET;
}

/** Oxygen cost of walking: 0.1 S + 1.8 S G + 3.5 mL/kg/min. Source as running; about 50 to 100 m/min (range: memory). */
export function walkingVo2(metresPerMinute: number, slope: number): number {
  return 0.1 * metresPerMinute + 1.8 * metresPerMinute * slope + ONE_MET;
}

/** Energy a minute of an effort in METs: METs × 3.5 × kg / 1000 × 5 kcal. */
export function kcalPerMinute(mets: number, massKg: number): number {
  return ((mets * ONE_MET * massKg) / 1000) * KCAL_PER_LITRE;
}
