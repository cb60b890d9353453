import { kcalPerMinute, metsOf, steppingVo2 } from '../aerobic/oxygen-cost.ts';

/** Gravity, m/s², as the published example of stair power uses it (standard gravity is 9.80665). */
export const GRAVITY = 9.81;

export interface Climb {
  /** Steps climbed; the way down is not counted. */
  readonly steps: number;
  readonly stepHeightMm: number;
  readonly seconds: number;
  /** Body mass; without it the watts and the energy stay unknown. Nothing is carried. */
  readonly massKg?: number | null;
}

export interface ClimbFigures {
  readonly heightM: number;
  readonly metresPerMinute: number;
  readonly wattsPerKg: number;
  readonly watts: number | null;
  /** mL/kg/min and METs by the stepping equation; null outside its range. */
  readonly vo2: number | null;
  readonly mets: number | null;
  readonly kcal: number | null;
  /** Says why the oxygen cost is missing, or what it assumes. */
  readonly sentence: string;
}

/** Height climbed in metres: steps × step height. Source of the check: Teh KC, Aziz AR. MSSE 2002;34:695 (27.0 m). */
export function climbHeightM(steps: number, stepHeightMm: number): number {
  return (steps * stepHeightMm) / 1000;
}

/**
 * Mean mechanical power of lifting the body, watts: m g h / t. What the muscles spend on balance, on the way down and on
 * heat is not in it. Source: the stair-power example of textbooks (54 kg, 3 m, 5 s: 318 W).
 */
export function stairPowerWatts(massKg: number, heightM: number, seconds: number): number {
  return (massKg * GRAVITY * heightM) / seconds;
}

/**
 * Steps turned into metres, speed, watts and oxygen cost. Null when a number cannot be (not finite, no time, a step
 * outside 80 to 300 mm). On one flight up and down, each step up has its step down, so a step counts as one round of
 * the stepping equation (derived); the power is the mean over the whole time, the way down with it.
 */
export function figureClimb({ steps, stepHeightMm, seconds, massKg }: Climb): ClimbFigures | null {
  const isPossible =
    Number.isFinite(steps) &&
    steps >= 0 &&
    stepHeightMm >= 80 &&
    stepHeightMm <= 300 &&
    seconds > 0 &&
    seconds <= 86_400;
  if (!isPossible) return null;
  const mass = massKg && massKg > 0 && massKg < 500 ? massKg : null;
  const heightM = climbHeightM(steps, stepHeightMm);
  const stepsPerMinute = (steps / seconds) * 60;
  const vo2 = steppingVo2(stepsPerMinute, stepHeightMm / 1000);
  const mets = vo2 === null ? null : metsOf(vo2);
  return {
    heightM,
    metresPerMinute: (heightM / seconds) * 60,
    wattsPerKg: stairPowerWatts(1, heightM, seconds),
    watts: mass === null ? null : stairPowerWatts(mass, heightM, seconds),
    vo2,
    mets,
    kcal: mets === null || mass === null ? null : kcalPerMinute(mets, mass) * (seconds / 60),
    sentence:
      vo2 === null
        ? 'The stepping equation holds from 12 to 30 steps a minute. This pace is outside, so the oxygen cost is left out.'
        : 'Oxygen cost by the stepping equation, every step up with its step down.',
  };
}

/** Energy of one step in kcal, from the METs and the pace in steps a minute. Check: Bassett DR et al. MSSE 1997;29:1250. */
export function kcalPerStep(mets: number, massKg: number, stepsPerMinute: number): number {
  return kcalPerMinute(mets, massKg) / stepsPerMinute;
}
