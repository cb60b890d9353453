import type { Unit } from '../movement/types.ts';
import type { Emphasis } from './types.ts';

/**
 * The numbers that the load moves by. Common practice, no source, where none is named; the 100 % and 115 % and 'twice
 * running' are the practice's own rule. Ratamess 2009 (Med Sci Sports Exerc 41:687) raises a load by 2 to 10 %.
 */
export const LIMITS = {
  /** Done over asked, per cent: below this the next target comes down. */
  holdFromPercent: 100,
  /** Above this, twice running, it goes up. */
  upFromPercent: 115,
  upsNeeded: 2,
  /** The largest rise of a set's amount in one step, per cent; one unit where that is more. */
  risePercent: 10,
  /** The largest rise of a set's effort when the rung changes, per cent. */
  rungRisePercent: 20,
  /** The largest fall in one step under the `down` rule, per cent of a set's amount. */
  dropPercent: 20,
  /** Effort this much above what was asked eases the target and stops a rise. */
  effortMargin: 2,
  easedPercent: 5,
  /** At most this many sets more from one session to the next. */
  setsRise: 1,
  mildPainPercent: 20,
  strongPainPercent: 40,
  illnessPercent: 30,
  /** No set asks for more than this many times the top of its range, even on the last rung. */
  beyondTop: 2,
} as const;

/** Days without the movement from which the load comes down, and by how much. Longest first. */
export const GAPS = [
  { days: 42, percent: 40 },
  { days: 21, percent: 25 },
  { days: 10, percent: 10 },
] as const;

/** The effort of someone who begins gently: 'somewhat hard' on the CR10 scale, still able to talk. */
export const GENTLE_EFFORT = 4;

interface EmphasisPlan {
  readonly sets: number;
  readonly effort: number;
  /** Share of the tested maximum in a first set. */
  readonly share: number;
  /** Rest between sets, seconds. */
  readonly restSeconds: number;
  /** Lowest and highest amount of a set before the rung changes. */
  readonly range: Readonly<Record<Unit, readonly [low: number, high: number]>>;
}

/** Breath: easier rungs, more reps, shorter rests. Muscle: harder rungs, fewer reps, longer rests. Common practice. */
export const EMPHASES: Readonly<Record<Emphasis, EmphasisPlan>> = {
  breath: {
    sets: 3,
    effort: 5,
    share: 0.5,
    restSeconds: 45,
    range: { reps: [12, 25], seconds: [30, 75], flights: [3, 10] },
  },
  balanced: {
    sets: 3,
    effort: 6,
    share: 0.55,
    restSeconds: 75,
    range: { reps: [8, 15], seconds: [20, 60], flights: [2, 8] },
  },
  muscle: {
    sets: 4,
    effort: 7,
    share: 0.65,
    restSeconds: 120,
    range: { reps: [5, 10], seconds: [15, 45], flights: [2, 6] },
  },
};
