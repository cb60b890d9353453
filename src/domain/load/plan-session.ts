import { LADDERS, rungsFor, type Kit, type MovementId, type Unit } from '../movement/ladders.ts';
import { EMPHASES } from './limits.ts';
import type { Emphasis, Target } from './types.ts';

/** What the plan must leave out. */
export interface PlanCautions {
  /** No sit-ups and no planks. */
  readonly pregnant?: boolean;
  /** Movements the coach has taken out. */
  readonly avoid?: readonly MovementId[];
}

export interface PlanSessionInput {
  /** Of the flight, from 1. */
  readonly week: number;
  /** Of the week, from 1; a fourth session starts the round again. */
  readonly ordinal: number;
  readonly emphasis: Emphasis;
  /** The present target of each movement that has one: they give the minutes. */
  readonly targets: readonly Target[];
  readonly kit: ReadonlySet<Kit>;
  readonly cautions: PlanCautions;
}

/** Warm-up or cool-down: its minutes, what to do, and the figures that show it. */
export interface Passage {
  readonly minutes: number;
  readonly lines: readonly string[];
  readonly figures: readonly string[];
}

export interface SessionPlan {
  readonly title: string;
  /** Three movements, in order; fewer only when cautions leave fewer. */
  readonly items: readonly MovementId[];
  /** Warm-up and cool-down included. */
  readonly minutes: number;
  readonly warmUp: Passage;
  readonly coolDown: Passage;
}

/** Cool-down of about 5 minutes: Seguin police fitness protocol. The warm-up is as long; common practice, no source. */
const PASSAGE_MINUTES = 5;

const WARM_UP: Passage = {
  minutes: PASSAGE_MINUTES,
  lines: [
    '3 minutes of marching on the spot, two steps a second.',
    'One easy set of each movement, a rung lower, half the reps.',
  ],
  figures: ['march'],
};

const COOL_DOWN: Passage = {
  minutes: PASSAGE_MINUTES,
  lines: [
    '3 minutes of easy walking, slower each minute.',
    'One stretch, 30 seconds a side. Do not lie down at once.',
  ],
  figures: ['walk-easy', 'stretch-hip-flexor', 'stretch-chest-door'],
};

/** Seconds a unit takes; a flight is up and down again. Common practice, no source. */
const SECONDS_A_UNIT: Readonly<Record<Unit, number>> = { reps: 3, seconds: 1, flights: 35 };

/** What each place of a session may hold, first choice first. Three sessions make the round. */
type Slots = readonly (readonly MovementId[])[];

function slotsOf(week: number, ordinal: number, hasBar: boolean): Slots {
  const back: readonly MovementId[] = hasBar ? ['pull', 'hinge'] : ['hinge', 'pull'];
  switch ((ordinal - 1) % 3) {
    case 0:
      return [['push'], ['squat'], ['sit-up', 'plank', 'hinge']];
    case 1:
      return [['stairs', 'squat'], back, ['plank', 'sit-up', 'calf']];
    default:
      return [['push'], ['stairs', 'squat'], week % 2 === 0 ? ['squat', 'calf'] : ['hinge', 'calf']];
  }
}

/** When a place's own choices are out: these, in order. */
const SPARES: readonly MovementId[] = ['hinge', 'squat', 'push', 'pull', 'calf', 'plank', 'sit-up', 'stairs'];

/** Movements that a house and its cautions allow. */
export function trainable(
  kit: ReadonlySet<Kit>,
  { pregnant, avoid = [] }: PlanCautions,
): ReadonlySet<MovementId> {
  const out = new Set<MovementId>([...avoid, ...(pregnant === true ? (['sit-up', 'plank'] as const) : [])]);
  return new Set(SPARES.filter((movement) => !out.has(movement) && rungsFor(movement, kit).length > 0));
}

function pickItems(slots: Slots, allowed: ReadonlySet<MovementId>): MovementId[] {
  return slots.reduce<MovementId[]>((picked, choices) => {
    const next = [...choices, ...SPARES].find(
      (movement) => allowed.has(movement) && !picked.includes(movement),
    );
    return next === undefined ? picked : [...picked, next];
  }, []);
}

function itemSeconds(movement: MovementId, { targets, emphasis, kit }: PlanSessionInput): number {
  const { sets, restSeconds, range } = EMPHASES[emphasis];
  const unit = (rungsFor(movement, kit)[0] ?? LADDERS[movement].rungs[0]).unit;
  const target = targets.find((t) => t.movement === movement) ?? { sets, amount: range[unit][0], unit };
  return target.sets * (target.amount * SECONDS_A_UNIT[target.unit] + restSeconds);
}

function titleOf(items: readonly MovementId[]): string {
  const names = items.map((movement, index) => {
    const { name } = LADDERS[movement];
    return index === 0 ? name : name.toLowerCase();
  });
  return new Intl.ListFormat('en-GB', { type: 'conjunction' }).format(names);
}

/**
 * One session: three movements of a round of three that covers push, squat, sit-up, stairs, plank, and pull with a bar or
 * hinge without. No movement comes more than twice in a week of three. Common practice, no source.
 */
export function planSession(input: PlanSessionInput): SessionPlan {
  const { week, ordinal, kit, cautions } = input;
  const items = pickItems(slotsOf(week, ordinal, kit.has('bar')), trainable(kit, cautions));
  const workSeconds = items.reduce((sum, movement) => sum + itemSeconds(movement, input), 0);
  return {
    title: titleOf(items),
    items,
    minutes: Math.ceil(workSeconds / 60) + 2 * PASSAGE_MINUTES,
    warmUp: WARM_UP,
    coolDown: COOL_DOWN,
  };
}
