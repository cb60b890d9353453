import type { Sex } from '../types.ts';

/**
 * Marine pull-ups: repetitions for full points and for a pass. Men as printed in 2017; the two oldest bands differ in
 * the later order (19/5 and 19/4: memory). Women from memory.
 */
export const MARINE_PULL_UPS: Readonly<Record<Sex, Readonly<Record<string, readonly [number, number]>>>> = {
  male: {
    '17-20': [20, 4],
    '21-25': [23, 5],
    '26-30': [23, 5],
    '31-35': [23, 5],
    '36-40': [21, 5],
    '41-45': [20, 5],
    '46-50': [19, 4],
    '51+': [18, 3],
  },
  female: {
    '17-20': [7, 1],
    '21-25': [11, 3],
    '26-30': [12, 4],
    '31-35': [11, 3],
    '36-40': [10, 3],
    '41-45': [8, 2],
    '46-50': [6, 2],
    '51+': [4, 2],
  },
};

/** US Air Force 2022, men under 25, 1.5 miles: slowest time in seconds and its points of 60. Read whole. */
export const AIR_FORCE_RUN_2022: readonly (readonly [number, number])[] = [
  [552, 60.0],
  [574, 59.5],
  [585, 59.0],
  [598, 58.5],
  [610, 58.0],
  [623, 57.5],
  [637, 57.0],
  [651, 56.5],
  [666, 56.0],
  [682, 55.5],
  [698, 55.0],
  [716, 54.5],
  [734, 54.0],
  [753, 53.5],
  [773, 52.0],
  [794, 50.5],
  [816, 49.0],
  [840, 46.5],
  [865, 44.0],
  [892, 41.0],
  [920, 38.0],
  [950, 35.0],
];

/**
 * US Air Force 2010 to 2021, under 30, one minute of push-ups or sit-ups: the lines that were read (pass, three quarters,
 * full marks) with their points of 10. The cells between them are from memory and are not shipped.
 */
export const AIR_FORCE_LINES_2010: Readonly<
  Record<Sex, Readonly<Record<'push-ups' | 'sit-ups', readonly (readonly [number, number, string])[]>>>
> = {
  male: {
    'push-ups': [
      [33, 5, 'a pass'],
      [44, 7.5, 'three quarters'],
      [67, 10, 'full marks'],
    ],
    'sit-ups': [
      [42, 6, 'a pass'],
      [46, 7.5, 'three quarters'],
      [58, 10, 'full marks'],
    ],
  },
  female: {
    'push-ups': [
      [18, 5, 'a pass'],
      [27, 7.5, 'three quarters'],
      [47, 10, 'full marks'],
    ],
    'sit-ups': [
      [38, 6, 'a pass'],
      [42, 7.5, 'three quarters'],
      [54, 10, 'full marks'],
    ],
  },
};

/** US Navy point levels, best first; the worked example was read, the event tables are memory and not used. */
export const NAVY_LEVELS: readonly (readonly [string, number])[] = [
  ['Outstanding High', 100],
  ['Outstanding Medium', 95],
  ['Outstanding Low', 90],
  ['Excellent High', 85],
  ['Excellent Medium', 80],
  ['Excellent Low', 75],
  ['Good High', 70],
  ['Good Medium', 65],
  ['Good Low', 60],
  ['Satisfactory High', 55],
  ['Satisfactory Medium', 50],
  ['Probationary', 45],
];
