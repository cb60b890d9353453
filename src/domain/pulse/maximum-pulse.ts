import { MINIMUM_AGE, OLDEST_AGE } from '../minimum-age.ts';
import type { Flag } from '../methods/types.ts';

/** A formula for the highest pulse from age alone. */
export interface MaximumPulseFormula {
  readonly id: 'tanaka' | 'gellish' | 'gellish-unrounded';
  readonly text: string;
  readonly start: number;
  readonly perYear: number;
  readonly citation: string;
  readonly year: string;
  readonly flag: Flag;
}

/**
 * The published age formulas, beats a minute. None knows a person: one in three is more than 10 beats off. A formula for
 * people on beta-blockers exists (164 − 0.7 age, Brawner 2004) and is not used: with such medicines no pulse is asked.
 */
export const MAXIMUM_PULSE_FORMULAS: readonly [MaximumPulseFormula, ...MaximumPulseFormula[]] = [
  {
    id: 'tanaka',
    text: '208 − 0.7 × age',
    start: 208,
    perYear: 0.7,
    citation: 'Tanaka H, Monahan KD, Seals DR. J Am Coll Cardiol 2001;37:153-156',
    year: '2001',
    flag: 'published',
  },
  {
    id: 'gellish',
    text: '207 − 0.7 × age',
    start: 207,
    perYear: 0.7,
    citation: 'Gellish RL et al. Med Sci Sports Exerc 2007;39:822-829',
    year: '2007',
    flag: 'memory',
  },
  {
    id: 'gellish-unrounded',
    text: '206.9 − 0.67 × age',
    start: 206.9,
    perYear: 0.67,
    citation: 'Gellish’s line unrounded, as a stroke exercise programme prints it',
    year: '2007',
    flag: 'published',
  },
];

/** Spread of people about any age formula, one standard deviation, beats a minute (7 to 12 in the papers). */
export const MAXIMUM_PULSE_ERROR = 10;

/** The highest pulse by a formula, beats a minute, not rounded; null under 18 or past any age. */
export function maximumPulse(
  ageYears: number,
  formula: MaximumPulseFormula = MAXIMUM_PULSE_FORMULAS[0],
): number | null {
  if (!(ageYears >= MINIMUM_AGE && ageYears <= OLDEST_AGE)) return null;
  return formula.start - formula.perYear * ageYears;
}
