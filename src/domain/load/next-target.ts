import type { Kit } from '../movement/ladders.ts';
import { placeOfTarget } from './carry.ts';
import { EMPHASES, GENTLE_EFFORT, LIMITS } from './limits.ts';
import { nextStep, type Step } from './next-step.ts';
import type { Decision, Done, Emphasis, Pain, Target } from './types.ts';
import { setsOf } from './words.ts';

export interface NextTargetInput {
  readonly current: Target;
  /** Results of this movement on this rung, newest first. */
  readonly history: readonly Done[];
  /** Pain reported now, of the whole session or since. The worse of this and the last result's counts. */
  readonly pain: Pain;
  readonly emphasis: Emphasis;
  /** Since this movement was last done; 0 when it never was. */
  readonly daysSinceLast: number;
  readonly landingWeek: boolean;
  /** What the house has; rungs it does not allow are passed over. Everything when left out. */
  readonly kit?: ReadonlySet<Kit>;
  /** Sets the coach has set and that stay; the emphasis decides when left out. */
  readonly coachSets?: number;
  /** Back from an illness, or still tired by one. */
  readonly ill?: boolean;
  /** The screen said to begin gently: effort stays at {@link GENTLE_EFFORT} at most. */
  readonly gentle?: boolean;
}

const worse = (a: Pain, b: Pain): Pain =>
  a === 'strong' || b === 'strong' ? 'strong' : a === 'mild' || b === 'mild' ? 'mild' : 'none';

/** Sets of the plan: one fewer in a landing week, and never more than one set added at a time. */
function plannedSets({ current, emphasis, landingWeek, coachSets }: NextTargetInput): number {
  const sets = coachSets ?? EMPHASES[emphasis].sets;
  return Math.min(landingWeek ? Math.max(1, sets - 1) : sets, current.sets + LIMITS.setsRise);
}

const CAREFUL_RULES: readonly string[] = ['pain', 'illness', 'gap', 'down'];

function effortOf(input: NextTargetInput, step: Step): number {
  const { current, emphasis, gentle } = input;
  const { effort } = EMPHASES[emphasis];
  const wanted = gentle === true ? Math.min(effort, GENTLE_EFFORT) : effort;
  const most = CAREFUL_RULES.includes(step.rule) ? current.effort : current.effort + 1;
  return Math.max(1, Math.min(wanted, most) - step.effortLess);
}

function sentenceOf(step: Step, current: Target, target: Target, isLandingRule: boolean): string {
  const words = setsOf(target.sets, target.amount, target.unit);
  if (isLandingRule) return `A landing week is lighter: ${words}.`;
  if (step.rule === 'hold') return `${step.because}: it stays at ${words}.`;
  if (step.rule === 'up-reps') return `${step.because}: up to ${words}.`;
  const isSameRung = target.rung === current.rung;
  return `${step.because}: next is ${isSameRung ? words : `“${step.to.rung.name}”, ${words}`}.`;
}

/**
 * The next load of a movement: done over asked, per cent. Below 100 it comes down; to 115 it stays; above 115 twice running
 * it goes up, first in reps and then to the next rung. Pain stands above all, then illness, a gap, and the landing week.
 * Common practice, no source: the practice's own rule, with the limits of {@link LIMITS}. The same input gives the same
 * answer. Throws a RangeError for an unknown rung.
 */
export function nextTarget(input: NextTargetInput): Decision {
  const { current, history, emphasis, daysSinceLast, landingWeek, kit, ill } = input;
  const sets = plannedSets(input);
  const step = nextStep({
    place: placeOfTarget(current),
    history,
    pain: worse(input.pain, history[0]?.pain ?? 'none'),
    emphasis,
    daysSinceLast,
    ill: ill === true,
    kit,
    mayRise: !landingWeek && sets <= current.sets,
  });
  const target: Target = {
    movement: current.movement,
    rung: step.to.rung.id,
    sets: CAREFUL_RULES.includes(step.rule) ? Math.min(sets, current.sets) : sets,
    amount: step.to.amount,
    unit: step.to.rung.unit,
    effort: effortOf(input, step),
  };
  const isLandingRule = landingWeek && step.rule === 'hold';
  return {
    target,
    rule: isLandingRule ? 'landing' : step.rule,
    why: sentenceOf(step, current, target, isLandingRule),
  };
}
