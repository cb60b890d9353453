import type { MovementId, Unit } from '../movement/types.ts';

/** What a plan leans to, chosen by member and coach. */
export type Emphasis = 'breath' | 'balanced' | 'muscle';

export type Pain = 'none' | 'mild' | 'strong';

/** What a session asks of one movement: `sets` times `amount` units of a rung, at an effort of 1 to 10. */
export interface Target {
  readonly movement: MovementId;
  readonly rung: string;
  readonly sets: number;
  /** Units a set: reps, seconds or flights. */
  readonly amount: number;
  readonly unit: Unit;
  readonly effort: number;
}

/** One session's result on a rung, over all sets. */
export interface Done {
  readonly askedTotal: number;
  readonly doneTotal: number;
  /** 1 to 10 as the member put it; null when not said. */
  readonly effort: number | null;
  readonly effortAsked: number;
  readonly pain: Pain;
}

export type LoadRule =
  'first' | 'down' | 'hold' | 'up-reps' | 'up-rung' | 'pain' | 'gap' | 'landing' | 'illness';

/** A decision as a value: the target, the rule that fired, and the reason in one sentence with its numbers. */
export interface Decision {
  readonly target: Target;
  readonly rule: LoadRule;
  readonly why: string;
}
