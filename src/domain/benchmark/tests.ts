import { RESTING_PULSE, RUN_12, RUN_1_5_MILE, STAIRS, STEP_TEST, WALK } from './breath.ts';
import { WAIST, WEIGHT } from './measures.ts';
import { CHAIR_STAND, PLANK, PULL_UPS, PUSH_UPS, SIT_UPS } from './strength.ts';
import type { Benchmark, TestId } from './types.ts';

export type { Benchmark, TestId } from './types.ts';

/** Every benchmark, in the order in which a test day takes them. */
export const BENCHMARKS: Readonly<Record<TestId, Benchmark>> = {
  'resting-pulse': RESTING_PULSE,
  'sit-ups': SIT_UPS,
  'push-ups': PUSH_UPS,
  'pull-ups': PULL_UPS,
  plank: PLANK,
  'chair-stand': CHAIR_STAND,
  stairs: STAIRS,
  'step-test': STEP_TEST,
  walk: WALK,
  'run-12': RUN_12,
  'run-1-5-mile': RUN_1_5_MILE,
  weight: WEIGHT,
  waist: WAIST,
};

export const TEST_IDS = Object.keys(BENCHMARKS) as [TestId, ...TestId[]];

/** The tests that the baseline must have before a first load can be set. */
export const REQUIRED_TESTS: readonly TestId[] = TEST_IDS.filter(
  (id) => BENCHMARKS[id].baseline === 'required',
);

export function isTestId(text: string): text is TestId {
  return Object.hasOwn(BENCHMARKS, text);
}

/** True when `form` is one of the ways this test is done. */
export function isFormOf(test: TestId, form: string): boolean {
  return BENCHMARKS[test].forms.some(({ id }) => id === form);
}

/** The sentence for a value no field accepts; null when the value may stand. NaN may never stand. */
export function limitProblem(test: TestId, value: number): string | null {
  const { min, max, outside } = BENCHMARKS[test].limits;
  return value >= min && value <= max ? null : outside;
}

/** The value with the word for its unit: '1 sit-up', '40 sit-ups'. Durations are formatted elsewhere. */
export function unitWordFor(test: TestId, value: number): string {
  const { one, many } = BENCHMARKS[test].unitWord;
  return value === 1 ? one : many;
}
