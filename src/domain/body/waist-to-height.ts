import { MINIMUM_AGE } from '../minimum-age.ts';
import { bodyMassIndex } from './body-mass-index.ts';

/** Where each band begins, waist over height. Source: NICE NG246. Compare unrounded: 0.497 is below 0.5. */
export const WAIST_BANDS = [
  { from: 0, word: 'below the range' },
  { from: 0.4, word: 'healthy' },
  { from: 0.5, word: 'increased' },
  { from: 0.6, word: 'high' },
] as const;

export interface WaistQuery {
  readonly waistCm: number;
  readonly heightCm: number;
  /** Only to see that the body mass index is below 35; null when unknown. */
  readonly massKg: number | null;
  readonly pregnant: boolean;
  readonly ageYears: number;
}

export type WaistAnswer =
  | { readonly ok: true; readonly ratio: number; readonly band: (typeof WAIST_BANDS)[number] }
  | {
      readonly ok: false;
      readonly reason: 'nonsense' | 'age-outside' | 'pregnancy' | 'other-population';
      readonly sentence: string;
    };

/**
 * Waist over height with the band of NICE: 0.40 to 0.49 healthy, 0.50 to 0.59 increased, 0.60 and over high. Adults with
 * a body mass index below 35; never in pregnancy, never under 18.
 */
export function waistToHeight({ waistCm, heightCm, massKg, pregnant, ageYears }: WaistQuery): WaistAnswer {
  if (pregnant)
    return { ok: false, reason: 'pregnancy', sentence: 'In pregnancy the waist says nothing. It stays off.' };
  if (!(ageYears >= MINIMUM_AGE)) {
    return {
      ok: false,
      reason: 'age-outside',
      sentence: `The bands are for adults of ${MINIMUM_AGE} and over.`,
    };
  }
  if (!(waistCm >= 40 && waistCm <= 200 && heightCm >= 100 && heightCm <= 250)) {
    return {
      ok: false,
      reason: 'nonsense',
      sentence: 'Waist and height do not fit a body. Check both, in centimetres.',
    };
  }
  const index = massKg === null ? null : bodyMassIndex(massKg, heightCm);
  if (index !== null && index >= 35) {
    return {
      ok: false,
      reason: 'other-population',
      sentence: 'The bands were set for a body mass index below 35.',
    };
  }
  const ratio = waistCm / heightCm;
  const band = WAIST_BANDS.findLast(({ from }) => ratio >= from) ?? WAIST_BANDS[0];
  return { ok: true, ratio, band };
}
