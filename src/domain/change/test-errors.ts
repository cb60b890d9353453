import type { TestId } from '../benchmark/types.ts';
import type { Flag } from '../methods/types.ts';
import { standardErrorOfMeasurement } from './typical-error.ts';

/**
 * What is believed about a test's error before the member has repeated it.
 * `absolute` is in the unit of the test, `relative` a share of the result; the larger one counts.
 */
export interface TestError {
  readonly absolute: number;
  readonly relative: number;
  /** False for tests that nobody gets better at by doing them (a pulse at rest, the scales). */
  readonly learns: boolean;
  readonly source: string;
  readonly flag: Flag;
}

const BATTERY = 'ICC from JMIR Form Res 2021;5(12):e28040, Table 3 (31 adults)';

/**
 * Prior typical error of each test. Where the source gives only an ICC, SEM = SD √(1 − ICC) is taken with the
 * spread between adults named beside it, so the result is derived, not published.
 */
export const TEST_ERRORS: Readonly<Record<TestId, TestError>> = {
  'push-ups': {
    absolute: standardErrorOfMeasurement(10, 0.97),
    relative: 0.06,
    learns: true,
    source: `${BATTERY}: 0.97, with SD 10 reps between adults (memory); 6 % of the count above 29 (common practice, no source)`,
    flag: 'derived',
  },
  'sit-ups': {
    absolute: 1.8,
    relative: 0.06,
    learns: true,
    source:
      'No paper read gives the error of one-minute sit-ups in adults; the member’s own repeats take over',
    flag: 'common practice, no source',
  },
  'pull-ups': {
    absolute: 0.7,
    relative: 0.06,
    learns: true,
    source: 'Chosen by the practice',
    flag: 'common practice, no source',
  },
  stairs: {
    absolute: 4,
    relative: 0.03,
    learns: true,
    source: '3 % of the count, on the same stairs; chosen by the practice',
    flag: 'common practice, no source',
  },
  'step-test': {
    absolute: standardErrorOfMeasurement(15, 0.92),
    relative: 0,
    learns: true,
    source: `${BATTERY}: 0.92, with SD 15 beats between adults (memory)`,
    flag: 'derived',
  },
  'resting-pulse': {
    absolute: standardErrorOfMeasurement(10, 0.8),
    relative: 0,
    learns: false,
    source: `${BATTERY}: 0.80, with SD 10 beats between adults (memory)`,
    flag: 'derived',
  },
  plank: {
    absolute: 4,
    relative: 0.08,
    learns: true,
    source: '8 % of the time; chosen by the practice',
    flag: 'common practice, no source',
  },
  'run-1-5-mile': {
    absolute: 5,
    relative: 0.02,
    learns: true,
    source: '2 % of the time, usual for a paced run',
    flag: 'memory',
  },
  'run-12': {
    absolute: 20,
    relative: 0.025,
    learns: true,
    source: '2.5 % of the distance, usual for a paced run',
    flag: 'memory',
  },
  walk: {
    absolute: 8,
    relative: 0.02,
    learns: true,
    source: '2 % of the time',
    flag: 'common practice, no source',
  },
  'chair-stand': {
    absolute: 0.9,
    relative: 0.05,
    learns: true,
    source: 'About one stand, as retest studies of older adults report',
    flag: 'memory',
  },
  weight: {
    absolute: 0.5,
    relative: 0.007,
    learns: false,
    source: 'Water and food move a day’s weight by about 1 %',
    flag: 'common practice, no source',
  },
  waist: {
    absolute: 1,
    relative: 0,
    learns: false,
    source: 'About 1 cm between two readings of the same tape',
    flag: 'common practice, no source',
  },
};

/** The prior typical error in the unit of the test at the member's usual result. */
export function priorTypicalError(testId: TestId, usualResult: number): number {
  const test = TEST_ERRORS[testId];
  return Math.max(test.absolute, test.relative * usualResult);
}
