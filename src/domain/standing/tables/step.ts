import type { CellTable, PublishedTable } from '../types.ts';

export const STEP_WORDS = [
  'very poor',
  'poor',
  'below average',
  'average',
  'above average',
  'good',
  'excellent',
] as const;

export const STEP_YMCA: PublishedTable = {
  id: 'ymca-step',
  title: 'Three-minute step test, 30.5 cm, pulse of one full minute sitting',
  citation: 'YMCA Fitness Testing and Assessment Manual, 4th ed., Golding (ed.), 2000',
  year: '2000',
  population: 'Members of the YMCA in the United States, 18 and over',
};

/** Most beats for poor, below average, average, above average, good, excellent. From memory. */
export const STEP_YMCA_CUTS: CellTable = {
  male: {
    '18-25': [119, 107, 100, 93, 84, 76],
    '26-35': [121, 110, 102, 94, 85, 76],
    '36-45': [124, 113, 105, 98, 88, 76],
    '46-55': [126, 119, 111, 101, 93, 82],
    '56-65': [128, 117, 109, 100, 94, 77],
    '65+': [126, 118, 110, 102, 92, 81],
  },
  female: {
    '18-25': [131, 120, 110, 102, 93, 81],
    '26-35': [129, 119, 110, 101, 92, 80],
    '36-45': [132, 120, 112, 104, 96, 84],
    '46-55': [132, 124, 118, 110, 101, 91],
    '56-65': [135, 127, 118, 111, 103, 92],
    '65+': [133, 126, 121, 111, 101, 92],
  },
};

export const STEP_HOME: PublishedTable = {
  id: 'home-step',
  title: 'Home step test, three minutes, 30.5 cm',
  citation:
    'Attributed to a Canadian Public Health Association project; loosely after the Canadian Home Fitness Test',
  year: 'unknown',
  population: 'Not stated in the copies that were read',
};

/** Most beats for poor, below average, average, above average, good; below the last one (not at it): excellent. */
export const STEP_HOME_CUTS: CellTable = {
  male: {
    '18-25': [128, 116, 105, 99, 89, 79],
    '26-35': [128, 117, 107, 99, 89, 81],
    '36-45': [130, 119, 112, 103, 96, 83],
    '46-55': [132, 122, 116, 105, 97, 87],
    '56-65': [129, 120, 112, 103, 97, 86],
    '65+': [130, 120, 113, 103, 96, 88],
  },
  female: {
    '18-25': [140, 126, 117, 108, 98, 85],
    '26-35': [138, 126, 119, 111, 99, 88],
    '36-45': [140, 128, 118, 110, 102, 90],
    '46-55': [135, 129, 120, 115, 104, 94],
    '56-65': [139, 128, 118, 112, 104, 95],
    '65+': [134, 128, 122, 115, 102, 90],
  },
};
