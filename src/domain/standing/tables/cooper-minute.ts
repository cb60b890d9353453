import type { CellTable, PublishedTable } from '../types.ts';

/** The percentiles that the rows below hold, from the 5th to the 95th. */
export const COOPER_PERCENTILES = [
  5, 10, 15, 20, 25, 30, 35, 40, 45, 50, 55, 60, 65, 70, 75, 80, 85, 90, 95,
] as const;

const CITATION =
  'The Cooper Institute, Physical Fitness Assessments and Norms for Adults and Law Enforcement, 2007 to 2013';
const POPULATION =
  'Patients of a preventive clinic and police candidates in the United States; fitter than most people';

export const SIT_UPS_COOPER: PublishedTable = {
  id: 'cooper-sit-ups-minute',
  title: 'Sit-ups in one minute, feet held',
  citation: CITATION,
  year: '2007/2009/2013',
  population: POPULATION,
};

export const PUSH_UPS_COOPER: PublishedTable = {
  id: 'cooper-push-ups-minute',
  title: 'Push-ups in one minute, on the toes',
  citation: CITATION,
  year: '2007/2009/2013',
  population: POPULATION,
};

export const KNEE_PUSH_UPS_COOPER: PublishedTable = {
  id: 'cooper-knee-push-ups-minute',
  title: 'Push-ups in one minute, on the knees, women: the 50th percentile',
  citation: CITATION,
  year: '2007/2009/2013',
  population: POPULATION,
};

/** Repetitions in 60 s. Read in documents: the 20th, 30th and 50th (see `isSitUpCellRead`); the rest from memory. */
export const SIT_UP_CELLS: CellTable = {
  male: {
    '<20': [27, 33, 34, 36, 37, 38, 39, 41, 42, 45, 46, 47, 48, 48, 50, 51, 53, 55, 62],
    '20-29': [27, 30, 32, 33, 35, 35, 37, 38, 39, 40, 41, 42, 44, 45, 46, 47, 49, 52, 55],
    '30-39': [23, 26, 28, 30, 31, 32, 33, 35, 36, 36, 37, 39, 40, 41, 42, 43, 45, 48, 51],
    '40-49': [17, 20, 22, 24, 26, 27, 28, 29, 30, 31, 32, 34, 35, 36, 37, 39, 40, 43, 47],
    '50-59': [12, 15, 17, 19, 20, 21, 22, 24, 25, 26, 27, 28, 30, 31, 33, 35, 36, 39, 43],
    '60+': [7, 10, 13, 15, 16, 17, 18, 19, 19, 20, 21, 22, 24, 26, 28, 30, 31, 35, 39],
  },
  female: {
    '<20': [25, 25, 27, 28, 29, 29, 30, 32, 34, 34, 35, 36, 37, 38, 40, 46, 49, 54, 55],
    '20-29': [18, 21, 23, 24, 28, 30, 31, 32, 34, 35, 37, 38, 39, 41, 42, 44, 45, 49, 51],
    '30-39': [11, 15, 18, 20, 21, 22, 24, 25, 26, 27, 28, 29, 30, 32, 33, 35, 38, 40, 42],
    '40-49': [7, 10, 13, 14, 16, 17, 19, 20, 21, 22, 23, 24, 25, 27, 28, 29, 32, 34, 38],
    '50-59': [5, 6, 7, 10, 11, 12, 12, 14, 16, 17, 19, 20, 21, 22, 22, 24, 25, 29, 30],
    '60+': [0, 1, 2, 3, 4, 4, 5, 6, 8, 8, 10, 11, 12, 12, 15, 17, 20, 26, 28],
  },
};

/** Repetitions in 60 s, on the toes for both sexes. Women of 50 and over have no norm. */
export const PUSH_UP_CELLS: CellTable = {
  male: {
    '20-29': [13, 18, 19, 22, 24, 26, 27, 29, 31, 33, 35, 37, 39, 41, 44, 47, 51, 57, 62],
    '30-39': [9, 13, 15, 17, 19, 20, 21, 24, 25, 27, 29, 30, 31, 34, 36, 39, 41, 46, 52],
    '40-49': [5, 9, 10, 11, 13, 15, 16, 18, 19, 21, 22, 24, 25, 26, 29, 30, 34, 36, 40],
    '50-59': [3, 6, 7, 9, 9.5, 10, 11, 13, 14, 15, 17, 19, 20, 21, 24, 25, 28, 30, 39],
    '60+': [2, 4, 5, 6, 7, 8, 9, 10, 12, 15, 16, 18, 20, 21, 22, 23, 24, 26, 28],
  },
  female: {
    '20-29': [6, 8, 9, 10, 11, 13, 14, 15, 17, 18, 19, 21, 23, 24, 27, 28, 33, 37, 42],
    '30-39': [4, 6, 6.5, 8, 9, 9, 10, 11, 13, 14, 14, 15, 16, 18, 19, 23, 26, 33, 39.5],
    '40-49': [1, 4, 5, 6, 7, 7, 8, 9, 10, 11, 11, 13, 13, 14, 15, 15, 17, 18, 20],
  },
};

/** Women on the knees, one minute: only the median is known. */
export const KNEE_PUSH_UP_MEDIANS: Readonly<Record<string, number>> = {
  '20-29': 26,
  '30-39': 21,
  '40-49': 15,
  '50-59': 13,
};

/** Pennsylvania prints the 30th of all ages, Illinois the 20th to 59, a copy of ACSM the 50th of men to 59. */
export function isSitUpCellRead(sex: 'male' | 'female', band: string, percentile: number): boolean {
  if (band === '<20') return false;
  if (percentile === 30) return true;
  if (band === '60+') return false;
  return percentile === 20 || (percentile === 50 && sex === 'male');
}

/** Pennsylvania prints the 30th; the 50th of men to 59 and the 45th of men of 30 to 39 were read in copies. */
export function isPushUpCellRead(sex: 'male' | 'female', band: string, percentile: number): boolean {
  if (percentile === 30) return true;
  if (sex === 'female') return false;
  return (percentile === 50 && band !== '60+') || (percentile === 45 && band === '30-39');
}
