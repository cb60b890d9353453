import type { Flag } from '../methods/types.ts';

export type MovementId = 'push' | 'sit-up' | 'squat' | 'stairs' | 'pull' | 'plank' | 'hinge' | 'calf';

export type Unit = 'reps' | 'seconds' | 'flights';

/** What a rung needs from the house. */
export type Kit = 'bar' | 'chair' | 'stairs' | 'mat';

/** Share of the body's weight on the hands, 0 to 1. */
export interface WeightShare {
  readonly ofBodyWeight: number;
  readonly flag: Flag;
}

/** One variant of a movement. */
export interface Rung {
  readonly id: string;
  readonly name: string;
  readonly unit: Unit;
  /**
   * Effort of one unit (a rep, a second, a flight) beside one unit of the easiest rung of the ladder. It carries an amount
   * from rung to rung at about the same effort. Common practice, no source.
   */
  readonly costPerUnit: number;
  readonly needs: readonly Kit[];
  readonly share?: WeightShare;
  /** The drawn figure that shows it. */
  readonly figure: string;
  /** The one thing to look at. */
  readonly watch: string;
}

/** A movement's variants, easiest first. */
export interface Ladder {
  readonly id: MovementId;
  readonly name: string;
  readonly rungs: readonly [Rung, ...Rung[]];
}
