import {
  CALF_RUNGS,
  HINGE_RUNGS,
  PLANK_RUNGS,
  PULL_RUNGS,
  PUSH_RUNGS,
  SIT_UP_RUNGS,
  SQUAT_RUNGS,
  STAIR_RUNGS,
} from './rungs.ts';
import type { Kit, Ladder, MovementId, Rung } from './types.ts';

export type { Kit, Ladder, MovementId, Rung, Unit } from './types.ts';

/** Every movement with its rungs, easiest first. The order is common practice, no source. */
export const LADDERS: Readonly<Record<MovementId, Ladder>> = {
  push: { id: 'push', name: 'Push-up', rungs: PUSH_RUNGS },
  'sit-up': { id: 'sit-up', name: 'Sit-up', rungs: SIT_UP_RUNGS },
  squat: { id: 'squat', name: 'Squat', rungs: SQUAT_RUNGS },
  stairs: { id: 'stairs', name: 'Stairs', rungs: STAIR_RUNGS },
  pull: { id: 'pull', name: 'Pull', rungs: PULL_RUNGS },
  plank: { id: 'plank', name: 'Plank', rungs: PLANK_RUNGS },
  hinge: { id: 'hinge', name: 'Hinge', rungs: HINGE_RUNGS },
  calf: { id: 'calf', name: 'Calf raise', rungs: CALF_RUNGS },
};

export const MOVEMENTS = Object.keys(LADDERS) as readonly MovementId[];

interface Place {
  readonly movement: MovementId;
  readonly index: number;
  readonly rung: Rung;
}

const PLACES: ReadonlyMap<string, Place> = new Map(
  MOVEMENTS.flatMap((movement) =>
    LADDERS[movement].rungs.map((rung, index) => [rung.id, { movement, index, rung }] as const),
  ),
);

function placeOf(id: string): Place {
  const place = PLACES.get(id);
  if (place === undefined) throw new RangeError(`There is no rung '${id}'.`);
  return place;
}

/** Whether `id` names a rung. */
export const isRung = (id: string): boolean => PLACES.has(id);

/** The rung of an id. Throws a RangeError when there is none. */
export const rungOf = (id: string): Rung => placeOf(id).rung;

/** The movement whose ladder a rung belongs to. Throws a RangeError for an unknown rung. */
export const movementOf = (rungId: string): MovementId => placeOf(rungId).movement;

/** Whether a house has all that a rung needs. */
export const canDo = (rung: Rung, kit: ReadonlySet<Kit>): boolean =>
  rung.needs.every((need) => kit.has(need));

/** The rungs of a movement that a house allows, easiest first. */
export const rungsFor = (movement: MovementId, kit: ReadonlySet<Kit>): readonly Rung[] =>
  LADDERS[movement].rungs.filter((rung) => canDo(rung, kit));

/** The next rung down and up, null at the ends. With `kit`, rungs that the house does not allow are passed over. */
export function neighbours(
  id: string,
  kit?: ReadonlySet<Kit>,
): { readonly down: Rung | null; readonly up: Rung | null } {
  const { movement, index } = placeOf(id);
  const rungs = LADDERS[movement].rungs;
  const allowed = (rung: Rung) => kit === undefined || canDo(rung, kit);
  return {
    down: rungs.slice(0, index).findLast(allowed) ?? null,
    up: rungs.slice(index + 1).find(allowed) ?? null,
  };
}
