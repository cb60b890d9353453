import type { PublishedTable, Sex } from '../types.ts';

export const RUN_POLICE: PublishedTable = {
  id: 'police-run',
  title: 'One and a half miles: percentiles printed by three state police services',
  citation: 'Pennsylvania MPOETC (30th), New York State Police (50th and 70th), Illinois POWER test (20th)',
  year: 'undated pages',
  population: 'Standards for police candidates in the United States; the pages do not say who was measured',
};

/** Percentile and the slowest time for it in seconds. That the Illinois line is the 20th is derived from its sit-ups. */
export const RUN_POLICE_CELLS: Readonly<
  Record<Sex, Readonly<Record<string, readonly (readonly [number, number])[]>>>
> = {
  male: {
    '18-19': [[30, 796]],
    '20-29': [
      [20, 840],
      [30, 796],
      [50, 718],
      [70, 659],
    ],
    '30-39': [
      [20, 874],
      [30, 826],
      [50, 745],
      [70, 682],
    ],
    '40-49': [
      [20, 924],
      [30, 874],
      [50, 791],
      [70, 718],
    ],
    '50-59': [
      [20, 1018],
      [30, 958],
    ],
    '60+': [[30, 1058]],
  },
  female: {
    '18-19': [[30, 952]],
    '20-29': [
      [20, 1006],
      [30, 952],
      [50, 847],
      [70, 773],
    ],
    '30-39': [
      [20, 1058],
      [30, 998],
      [50, 874],
      [70, 803],
    ],
    '40-49': [
      [20, 1117],
      [30, 1042],
      [50, 924],
      [70, 838],
    ],
    '50-59': [
      [20, 1244],
      [30, 1139],
    ],
    '60+': [[30, 1280]],
  },
};

/** Pennsylvania's entrance lines, the 30th percentile: repetitions in one minute, and seconds for the run. */
export const PENNSYLVANIA_LINES: Readonly<
  Record<Sex, Readonly<Record<string, { sitUps: number; pushUps: number; runSeconds: number }>>>
> = {
  male: {
    '18-29': { sitUps: 35, pushUps: 26, runSeconds: 796 },
    '30-39': { sitUps: 32, pushUps: 20, runSeconds: 826 },
    '40-49': { sitUps: 27, pushUps: 15, runSeconds: 874 },
    '50-59': { sitUps: 21, pushUps: 10, runSeconds: 958 },
    '60+': { sitUps: 17, pushUps: 8, runSeconds: 1058 },
  },
  female: {
    '18-29': { sitUps: 30, pushUps: 13, runSeconds: 952 },
    '30-39': { sitUps: 22, pushUps: 9, runSeconds: 998 },
    '40-49': { sitUps: 17, pushUps: 7, runSeconds: 1042 },
    '50-59': { sitUps: 12, pushUps: 7, runSeconds: 1139 },
    '60+': { sitUps: 4, pushUps: 7, runSeconds: 1280 },
  },
};
