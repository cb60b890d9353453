import type { CellTable, PublishedTable } from '../types.ts';

export const CHAIR_STAND_STEADI: PublishedTable = {
  id: 'steadi-chair-stand',
  title: 'Chair stands in 30 seconds',
  citation: 'CDC STEADI, 30-Second Chair Stand; Rikli RE, Jones CJ. J Aging Phys Act 1999;7:162-181',
  year: '1999',
  population: 'Community-living people in the United States, 60 to 94',
};

/** Fewest stands that are not below average, then (where it was read) the most that are still average. */
export const CHAIR_STAND_CUTS: CellTable = {
  male: {
    '60-64': [14, 19],
    '65-69': [12, 18],
    '70-74': [12],
    '75-79': [11],
    '80-84': [10],
    '85-89': [8],
    '90-94': [7],
  },
  female: {
    '60-64': [12, 17],
    '65-69': [11, 16],
    '70-74': [10],
    '75-79': [10],
    '80-84': [9],
    '85-89': [8],
    '90-94': [4],
  },
};

/** The bands that were read; older ones are from memory. */
export const isChairBandRead = (band: string): boolean => band === '60-64' || band === '65-69';
