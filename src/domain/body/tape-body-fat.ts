import { MINIMUM_AGE } from '../minimum-age.ts';
import { CM_PER_INCH } from './body-mass-index.ts';

export interface TapeMeasures {
  readonly sex: 'male' | 'female';
  readonly heightCm: number;
  readonly neckCm: number;
  /** Men: the abdomen at the navel. Women: the waist at its narrowest. */
  readonly waistCm: number;
  /** Women only: the widest part. */
  readonly hipCm?: number;
}

/** Standard error of the estimate in per cent of body fat. Source: Hodgdon and Beckett 1984; Hodgdon and Friedl 1999. */
export const TAPE_ERROR = { male: 3.5, female: 3.7 } as const;

/** The girth that the equations take the logarithm of; null when it cannot be a body's. */
function girth({ sex, neckCm, waistCm, hipCm }: TapeMeasures): number | null {
  const sum = sex === 'male' ? waistCm - neckCm : waistCm + (hipCm ?? NaN) - neckCm;
  return sum > 0 && neckCm > 0 ? sum : null;
}

/**
 * Body fat in per cent from the tape: density 1.0324 − 0.19077 log(abdomen − neck) + 0.15456 log(height) for men,
 * 1.29579 − 0.35004 log(waist + hip − neck) + 0.22100 log(height) for women (cm, log to ten); then 495 / density − 450.
 * Source: Hodgdon JA, Beckett MB. NHRC Reports 84-11 (men) and 84-29 (women), 1984; US Navy personnel.
 * Null for measures that cannot be.
 */
export function tapeBodyFat(tape: TapeMeasures): number | null {
  const size = girth(tape);
  if (size === null || !(tape.heightCm >= 100 && tape.heightCm <= 250)) return null;
  const [a, b, c] = tape.sex === 'male' ? [1.0324, 0.19077, 0.15456] : [1.29579, 0.35004, 0.221];
  const density = a - b * Math.log10(size) + c * Math.log10(tape.heightCm);
  const percent = 495 / density - 450;
  return percent >= 0 && percent <= 75 ? percent : null;
}

/**
 * The form in inches of the US Department of Defense: men 86.010 log(abdomen − neck) − 70.041 log(height) + 36.76; women
 * 163.205 log(waist + hip − neck) − 97.684 log(height) − 78.387. Not identical to the metric form (19.43 beside 19.32 on
 * the same man). Source: Hodgdon JA, Friedl K. NHRC TD 99-2B, 1999. Null for measures that cannot be.
 */
export function tapeBodyFatInches(tape: TapeMeasures): number | null {
  const size = girth(tape);
  if (size === null || !(tape.heightCm >= 100 && tape.heightCm <= 250)) return null;
  const [a, b, c] = tape.sex === 'male' ? [86.01, 70.041, 36.76] : [163.205, 97.684, -78.387];
  const percent = a * Math.log10(size / CM_PER_INCH) - b * Math.log10(tape.heightCm / CM_PER_INCH) + c;
  return percent >= 0 && percent <= 75 ? percent : null;
}

export type BodyFatAnswer =
  | {
      readonly ok: true;
      readonly percent: number;
      readonly from: number;
      readonly to: number;
      readonly sentence: string;
    }
  | {
      readonly ok: false;
      readonly reason: 'nonsense' | 'age-outside' | 'pregnancy';
      readonly sentence: string;
    };

/** Body fat by the tape with the range of its error, for adults and never in pregnancy. */
export function bodyFatRange(tape: TapeMeasures, ageYears: number, pregnant: boolean): BodyFatAnswer {
  if (pregnant)
    return { ok: false, reason: 'pregnancy', sentence: 'In pregnancy the tape says nothing. It stays off.' };
  if (!(ageYears >= MINIMUM_AGE)) {
    return {
      ok: false,
      reason: 'age-outside',
      sentence: `The tape is for adults of ${MINIMUM_AGE} and over.`,
    };
  }
  const percent = tapeBodyFat(tape);
  if (percent === null) {
    return {
      ok: false,
      reason: 'nonsense',
      sentence: 'These measures do not fit one body. Check them, in centimetres.',
    };
  }
  const error = TAPE_ERROR[tape.sex];
  const [from, to] = [Math.max(0, percent - error), percent + error];
  const sentence = `About ${Math.round(percent)} per cent, and two times in three between ${Math.round(from)} and ${Math.round(to)}.`;
  return { ok: true, percent, from, to, sentence };
}
