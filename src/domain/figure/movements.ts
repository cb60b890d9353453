import calf from './movements/calf.json' with { type: 'json' };
import coolDown from './movements/cool-down.json' with { type: 'json' };
import floor from './movements/floor.json' with { type: 'json' };
import hinge from './movements/hinge.json' with { type: 'json' };
import mobility from './movements/mobility.json' with { type: 'json' };
import plank from './movements/plank.json' with { type: 'json' };
import press from './movements/press.json' with { type: 'json' };
import pull from './movements/pull.json' with { type: 'json' };
import pushUp from './movements/push-up.json' with { type: 'json' };
import sitUp from './movements/sit-up.json' with { type: 'json' };
import squat from './movements/squat.json' with { type: 'json' };
import stairs from './movements/stairs.json' with { type: 'json' };
import warmUp from './movements/warm-up.json' with { type: 'json' };
import type { Movement } from './types.ts';

const FILES = [
  pushUp,
  sitUp,
  squat,
  stairs,
  pull,
  plank,
  hinge,
  press,
  calf,
  mobility,
  warmUp,
  coolDown,
  floor,
];

/** Every rung of every ladder, easiest first. JSON loses literal types; the tests check each entry strictly. */
export const MOVEMENTS = FILES.flat() as unknown as readonly Movement[];

const BY_ID: ReadonlyMap<string, Movement> = new Map(MOVEMENTS.map((movement) => [movement.id, movement]));

/** The movement of an id such as `push-up-stair-2`, or null. */
export const findMovement = (id: string): Movement | null => BY_ID.get(id) ?? null;

/** The movement of an id. @throws RangeError when there is none, so that a wrong name in a lesson stops the build */
export function movementOf(id: string): Movement {
  const found = BY_ID.get(id);
  if (!found) throw new RangeError(`no movement is called ${id}`);
  return found;
}

/** The rungs of a ladder, easiest first. */
export const rungsOf = (ladder: string): readonly Movement[] =>
  MOVEMENTS.filter((movement) => movement.ladder === ladder).toSorted((a, b) => a.rung - b.rung);
