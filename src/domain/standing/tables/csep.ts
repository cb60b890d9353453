import type { CellTable, PublishedTable } from '../types.ts';

export const PUSH_UPS_CSEP: PublishedTable = {
  id: 'csep-push-ups',
  title: 'Push-ups to failure, without a clock: men on the toes, women on the knees',
  citation:
    'Canadian Society for Exercise Physiology, CPAFLA 3rd ed. 2003; reprinted in ACSM’s Guidelines for Exercise Testing and Prescription',
  year: '2003',
  population: 'Canadian adults, 15 to 69',
};

/** Fewest repetitions for fair, good, very good, excellent; below fair the word is 'needs improvement'. */
export const CSEP_WORDS = ['needs improvement', 'fair', 'good', 'very good', 'excellent'] as const;

export const PUSH_UP_CUTS: CellTable = {
  male: {
    '15-19': [18, 23, 29, 39],
    '20-29': [17, 22, 29, 36],
    '30-39': [12, 17, 22, 30],
    '40-49': [10, 13, 17, 25],
    '50-59': [7, 10, 13, 21],
    '60-69': [5, 8, 11, 18],
  },
  female: {
    '15-19': [12, 18, 25, 33],
    '20-29': [10, 15, 21, 30],
    '30-39': [8, 13, 20, 27],
    '40-49': [5, 11, 15, 24],
    '50-59': [2, 7, 11, 21],
    '60-69': [2, 5, 12, 17],
  },
};

/**
 * Read whole: men to 29. Elsewhere the cuts of excellent and good were read in a copy; fair and very good rest on
 * memory and an older Canadian edition. `step` counts from fair (0) to excellent (3).
 */
export function isCsepCutRead(sex: 'male' | 'female', band: string, step: number): boolean {
  return (sex === 'male' && (band === '15-19' || band === '20-29')) || step === 1 || step === 3;
}

/** Men of 40 to 49: 'excellent' began at 22 in the Canadian Standardized Test of 1986. */
export const OLDER_EDITION_EXCELLENT = { sex: 'male', band: '40-49', from: 22 } as const;

export const CURL_UP_CSEP: PublishedTable = {
  id: 'csep-curl-up',
  title: 'Partial curl-up, 50 beats a minute, at most 25',
  citation: 'Canadian Society for Exercise Physiology 2003, in ACSM’s Guidelines, 8th and 9th edition',
  year: '2003',
  population: 'Canadian adults, 20 to 69',
};

/** As above; the whole table is from memory. Excellent is 25, the most that can be done. */
export const CURL_UP_CUTS: CellTable = {
  male: {
    '20-29': [11, 16, 21, 25],
    '30-39': [11, 15, 18, 25],
    '40-49': [6, 13, 18, 25],
    '50-59': [8, 11, 17, 25],
    '60-69': [6, 11, 16, 25],
  },
  female: {
    '20-29': [5, 14, 18, 25],
    '30-39': [6, 10, 19, 25],
    '40-49': [4, 11, 19, 25],
    '50-59': [6, 10, 19, 25],
    '60-69': [3, 8, 17, 25],
  },
};

/** One number a decade: 'good fitness' by the staff of the Mayo Clinic. The man of 65: 10 in print, 11 from memory. */
export const MAYO_TARGETS = {
  citation: 'Mayo Clinic staff, How fit are you?, 2022',
  male: { 25: 28, 35: 21, 45: 16, 55: 12, 65: 10 },
  female: { 25: 20, 35: 19, 45: 14, 55: 10, 65: 10 },
} as const;
