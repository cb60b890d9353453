import { standardErrorOfMeasurement } from './typical-error.ts';

/** How far a value may be trusted: read in a source, derived from read values, remembered, or a trade rule. */
export type ErrorFlag = 'published' | 'derived' | 'memory' | 'common practice, no source';

export type TestUnit =
  'reps' | 'steps' | 'seconds' | 'beats' | 'metres' | 'kilograms' | 'centimetres' | 'points';

/**
 * What is believed about a test's error before the member has repeated it.
 * `absolute` is in the unit of the test, `relative` a share of the result; the larger one counts.
 */
export interface TestError {
  readonly unit: TestUnit;
  readonly absolute: number;
  readonly relative: number;
  /** False for tests that nobody gets better at by doing them (a pulse at rest, the scales). */
  readonly learns: boolean;
  readonly source: string;
  readonly flag: ErrorFlag;
}

const BATTERY = 'ICC from JMIR Form Res 2021;5(12):e28040, Table 3 (31 adults)';

/**
 * Prior typical error of each test. Where the source gives only an ICC, SEM = SD √(1 − ICC) is taken with the
 * spread between adults named beside it, so the result is derived, not published.
 */
export const TEST_ERRORS = {
  'push-ups': {
    unit: 'reps',
    absolute: standardErrorOfMeasurement(10, 0.97),
    relative: 0.06,
    learns: true,
    source: `${BATTERY}: 0.97, with SD 10 reps between adults (memory); 6 % of the count above 29 (common practice, no source)`,
    flag: 'derived',
  },
  'sit-ups': {
    unit: 'reps',
    absolute: 1.8,
    relative: 0.06,
    learns: true,
    source:
      'No paper read gives the error of one-minute sit-ups in adults; the member’s own repeats take over',
    flag: 'common practice, no source',
  },
  'curl-up': {
    unit: 'reps',
    absolute: standardErrorOfMeasurement(10, 0.98),
    relative: 0.06,
    learns: true,
    source: `${BATTERY}: 0.98, with SD 10 reps between adults (memory)`,
    flag: 'derived',
  },
  'pull-ups': {
    unit: 'reps',
    absolute: 0.7,
    relative: 0.06,
    learns: true,
    source: 'Chosen by the practice',
    flag: 'common practice, no source',
  },
  stairs: {
    unit: 'steps',
    absolute: 4,
    relative: 0.03,
    learns: true,
    source: '3 % of the count, on the same stairs; chosen by the practice',
    flag: 'common practice, no source',
  },
  'four-flights': {
    unit: 'seconds',
    absolute: 1.5,
    relative: 0.03,
    learns: true,
    source: '3 % of the time, on the same stairs; chosen by the practice',
    flag: 'common practice, no source',
  },
  'step-test': {
    unit: 'beats',
    absolute: standardErrorOfMeasurement(15, 0.92),
    relative: 0,
    learns: true,
    source: `${BATTERY}: 0.92, with SD 15 beats between adults (memory)`,
    flag: 'derived',
  },
  'resting-pulse': {
    unit: 'beats',
    absolute: standardErrorOfMeasurement(10, 0.8),
    relative: 0,
    learns: false,
    source: `${BATTERY}: 0.80, with SD 10 beats between adults (memory)`,
    flag: 'derived',
  },
  plank: {
    unit: 'seconds',
    absolute: 4,
    relative: 0.08,
    learns: true,
    source: '8 % of the time; chosen by the practice',
    flag: 'common practice, no source',
  },
  'run-1.5-mile': {
    unit: 'seconds',
    absolute: 5,
    relative: 0.02,
    learns: true,
    source: '2 % of the time, usual for a paced run',
    flag: 'memory',
  },
  'run-12-min': {
    unit: 'metres',
    absolute: 20,
    relative: 0.025,
    learns: true,
    source: '2.5 % of the distance, usual for a paced run',
    flag: 'memory',
  },
  walk: {
    unit: 'seconds',
    absolute: 8,
    relative: 0.02,
    learns: true,
    source: '2 % of the time',
    flag: 'common practice, no source',
  },
  'chair-stand': {
    unit: 'reps',
    absolute: 0.9,
    relative: 0.05,
    learns: true,
    source: 'About one stand, as retest studies of older adults report',
    flag: 'memory',
  },
  weight: {
    unit: 'kilograms',
    absolute: 0.5,
    relative: 0.007,
    learns: false,
    source: 'Water and food move a day’s weight by about 1 %',
    flag: 'common practice, no source',
  },
  waist: {
    unit: 'centimetres',
    absolute: 1,
    relative: 0,
    learns: false,
    source: 'About 1 cm between two readings of the same tape',
    flag: 'common practice, no source',
  },
} as const satisfies Record<string, TestError>;

/** For a test that has no row: 6 % of the result, and said to be so. */
export const UNKNOWN_TEST_ERROR: TestError = {
  unit: 'points',
  absolute: 0.7,
  relative: 0.06,
  learns: true,
  source: '6 % of the result; this test has no published error here',
  flag: 'common practice, no source',
};

/** The row of a test; names that only narrow a test ('run', 'push-ups-minute') fall back to their family. */
export function testErrorOf(testId: string): TestError {
  const rows: Readonly<Record<string, TestError>> = TEST_ERRORS;
  const exact = rows[testId];
  if (exact) return exact;
  const family = Object.keys(rows).find((id) => testId.startsWith(id) || id.startsWith(`${testId}-`));
  return (family && rows[family]) || UNKNOWN_TEST_ERROR;
}

/** The prior typical error in the unit of the test at the member's usual result. */
export function priorTypicalError(test: TestError, usualResult: number): number {
  return Math.max(test.absolute, test.relative * usualResult);
}
