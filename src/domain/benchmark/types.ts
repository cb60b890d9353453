export type TestId =
  | 'sit-ups'
  | 'push-ups'
  | 'stairs'
  | 'pull-ups'
  | 'step-test'
  | 'run-12'
  | 'run-1-5-mile'
  | 'walk'
  | 'resting-pulse'
  | 'plank'
  | 'chair-stand'
  | 'weight'
  | 'waist';

/** The unit a mark is stored in; durations are always whole seconds. */
export type BenchmarkUnit = 'reps' | 'steps' | 'seconds' | 'beats' | 'metres' | 'kilograms' | 'centimetres';

/** A way of doing a test that must not be mixed with another; `id` is stored with the mark. */
export interface TestForm {
  readonly id: string;
  readonly label: string;
}

/** One benchmark test as it is set out to a member: plain data, no behaviour. */
export interface Benchmark {
  readonly id: TestId;
  readonly name: string;
  /** The question the test answers, as its heading asks it. */
  readonly question: string;
  readonly unit: BenchmarkUnit;
  /** The unit as it stands after a number: '40 sit-ups', '96 beats a minute'. */
  readonly unitWord: { readonly one: string; readonly many: string };
  /** How the number is typed: a whole count, a number with decimals, or minutes and seconds. */
  readonly entry: 'count' | 'decimal' | 'duration';
  readonly decimals: 0 | 1;
  readonly forms: readonly [TestForm, ...TestForm[]];
  readonly better: 'more' | 'less' | 'neither';
  /** What a field accepts, in the unit of the test, and the sentence for anything outside. */
  readonly limits: { readonly min: number; readonly max: number; readonly outside: string };
  /** Whether the baseline test day asks it. */
  readonly baseline: 'required' | 'optional';
  /** True for measures that no member sees until they ask for them. */
  readonly offUntilAsked: boolean;
  /** The clock of the test; null where it ends by itself. */
  readonly durationSeconds: number | null;
  /** Rest before the test and where that number comes from. */
  readonly restBefore: { readonly seconds: number; readonly source: string };
  readonly setUp: readonly string[];
  /** What counts and what does not. */
  readonly standards: readonly string[];
  readonly cautions: readonly string[];
  readonly stopWhen: readonly string[];
  /** How to practise before it counts. */
  readonly practice: string;
  /** Where the protocol comes from, with its flag when it is not from a document that was read. */
  readonly source: string;
}
