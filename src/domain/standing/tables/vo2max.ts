import type { CellTable, PublishedTable } from '../types.ts';

export const VO2MAX_COOPER: PublishedTable = {
  id: 'cooper-vo2max',
  title: 'VO2max classes',
  citation:
    'Cooper Institute classification, in Heyward V, Advanced Fitness Assessment and Exercise Prescription, 3rd ed. 1998, p. 48',
  year: '1998',
  population: 'Patients of a preventive clinic in the United States, 13 and over; women past 50 thinly based',
};

export const VO2MAX_WORDS = ['very poor', 'poor', 'fair', 'good', 'excellent', 'superior'] as const;

/** mL/kg/min: least for poor, fair, good, excellent; superior begins above the last value, not at it. */
export const VO2MAX_CUTS: CellTable = {
  male: {
    '13-19': [35.0, 38.4, 45.2, 51.0, 55.9],
    '20-29': [33.0, 36.5, 42.5, 46.5, 52.4],
    '30-39': [31.5, 35.5, 41.0, 45.0, 49.4],
    '40-49': [30.2, 33.6, 39.0, 43.8, 48.0],
    '50-59': [26.1, 31.0, 35.8, 41.0, 45.3],
    '60+': [20.5, 26.1, 32.3, 36.5, 44.2],
  },
  female: {
    '13-19': [25.0, 31.0, 35.0, 39.0, 41.9],
    '20-29': [23.6, 29.0, 33.0, 37.0, 41.0],
    '30-39': [22.8, 27.0, 31.5, 35.7, 40.0],
    '40-49': [21.0, 24.5, 29.0, 32.9, 36.9],
    '50-59': [20.2, 22.8, 27.0, 31.5, 35.7],
    '60+': [17.5, 20.2, 24.5, 30.3, 31.4],
  },
};

export const VO2MAX_FRIEND: PublishedTable = {
  id: 'friend-vo2max',
  title: 'VO2max measured on a treadmill, percentiles',
  citation: 'Kaminsky LA, Arena R, Myers J. Mayo Clin Proc 2015;90(11):1515-1523, Table 2 (FRIEND)',
  year: '2015',
  population: '7,783 treadmill tests in the United States, ages 20 to 79',
};

export const FRIEND_PERCENTILES = [5, 10, 25, 50, 75, 90, 95] as const;

/** mL/kg/min. Read: the 50th at 20 to 29 and at 70 to 79; every other cell from memory. */
export const FRIEND_CELLS: CellTable = {
  male: {
    '20-29': [29.0, 32.1, 40.1, 48.0, 55.2, 61.8, 66.3],
    '30-39': [27.2, 30.2, 35.9, 42.4, 49.2, 56.5, 59.8],
    '40-49': [24.2, 26.8, 31.9, 37.8, 45.0, 52.1, 55.6],
    '50-59': [20.9, 22.8, 27.1, 32.6, 39.7, 45.6, 50.7],
    '60-69': [17.4, 19.8, 23.7, 28.2, 34.5, 40.3, 43.0],
    '70-79': [16.3, 17.1, 20.4, 24.4, 30.4, 36.6, 39.7],
  },
  female: {
    '20-29': [21.7, 23.9, 30.5, 37.6, 44.7, 51.3, 56.0],
    '30-39': [19.0, 20.9, 25.3, 30.2, 36.1, 41.4, 45.8],
    '40-49': [17.0, 18.8, 22.1, 26.7, 32.4, 38.4, 41.7],
    '50-59': [16.0, 17.3, 19.9, 23.4, 27.6, 32.0, 35.9],
    '60-69': [13.4, 14.6, 17.2, 20.0, 23.8, 27.0, 29.4],
    '70-79': [13.1, 13.6, 15.6, 18.3, 20.8, 23.1, 24.1],
  },
};

export function isFriendCellRead(band: string, percentile: number): boolean {
  return percentile === 50 && (band === '20-29' || band === '70-79');
}
