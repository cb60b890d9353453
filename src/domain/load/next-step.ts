import type { Kit } from '../movement/ladders.ts';
import { stepDown, stepUp, type Place } from './carry.ts';
import { EMPHASES, GAPS, LIMITS } from './limits.ts';
import type { Done, Emphasis, LoadRule, Pain } from './types.ts';

/** What the next step depends on. See `NextTargetInput` for the words. */
export interface StepFacts {
  readonly place: Place;
  readonly history: readonly Done[];
  readonly pain: Pain;
  readonly emphasis: Emphasis;
  readonly daysSinceLast: number;
  readonly ill: boolean;
  readonly kit: ReadonlySet<Kit> | undefined;
  /** False in a landing week and where sets are added: one thing rises at a time. */
  readonly mayRise: boolean;
}

/** A change of amount or rung, before sets and effort are put to it. */
export interface Step {
  readonly rule: Exclude<LoadRule, 'first' | 'landing'>;
  readonly to: Place;
  readonly effortLess: number;
  /** The reason in words, up to the new target. */
  readonly because: string;
}

/** Done over asked in whole per cent, rounded down so that 99.7 never reads as 100. */
const percentOf = ({ doneTotal, askedTotal }: Done): number => Math.floor((doneTotal * 100) / askedTotal);

const isUsable = ({ doneTotal, askedTotal }: Done): boolean =>
  Number.isFinite(doneTotal) && doneTotal >= 0 && Number.isFinite(askedTotal) && askedTotal > 0;
const isAbove = (done: Done): boolean => done.doneTotal * 100 > done.askedTotal * LIMITS.upFromPercent;
const isBelow = (done: Done): boolean => done.doneTotal * 100 < done.askedTotal * LIMITS.holdFromPercent;
const isTooHard = ({ effort, effortAsked }: Done): boolean =>
  effort !== null && effort >= effortAsked + LIMITS.effortMargin;

/** A set's amount less `percent`: whole, at least 1, and at least one unit less where there is one to spare. */
const lessen = (amount: number, percent: number): number =>
  Math.max(1, Math.floor((amount * (100 - percent)) / 100));

const doneWords = (done: Done): string =>
  `${done.doneTotal} of ${done.askedTotal} done, ${percentOf(done)} %`;

/** A smaller amount on the same rung, or the rung below where it would fall out of the range of the emphasis. */
function ease(place: Place, amount: number, { emphasis, kit }: StepFacts): Place {
  const eased = { rung: place.rung, amount };
  const [low] = EMPHASES[emphasis].range[place.rung.unit];
  return (amount < low ? stepDown(eased, kit) : null) ?? eased;
}

/** The amount the last result allows at most, never above the present one. */
function earnedAmount({ place: { amount } }: StepFacts, last: Done | undefined): number {
  if (last === undefined) return amount;
  const byShare = isBelow(last)
    ? Math.max(Math.floor((amount * last.doneTotal) / last.askedTotal), lessen(amount, LIMITS.dropPercent))
    : amount;
  return isTooHard(last) ? Math.min(byShare, lessen(amount, LIMITS.easedPercent)) : byShare;
}

const gapPercent = (days: number): number => GAPS.find((gap) => days >= gap.days)?.percent ?? 0;

/** Pain, illness and a long gap, strongest cut first to be named; null when there is none. */
function setback(facts: StepFacts, earned: number): Step | null {
  const { place, pain, ill, daysSinceLast, kit } = facts;
  const cutPercent = Math.max(
    { none: 0, mild: LIMITS.mildPainPercent, strong: LIMITS.strongPainPercent }[pain],
    ill ? LIMITS.illnessPercent : 0,
    gapPercent(daysSinceLast),
  );
  if (cutPercent === 0) return null;
  const amount = lessen(earned, cutPercent);
  if (pain === 'strong') {
    const to = stepDown({ rung: place.rung, amount }, kit) ?? { rung: place.rung, amount };
    return {
      rule: 'pain',
      to,
      effortLess: 2,
      because: 'Strong pain was reported, and pain stands above every number',
    };
  }
  const to = ease(place, amount, facts);
  if (pain === 'mild')
    return {
      rule: 'pain',
      to,
      effortLess: 1,
      because: 'Mild pain was reported, and pain stands above every number',
    };
  if (ill) return { rule: 'illness', to, effortLess: 1, because: 'After an illness it comes back in steps' };
  return { rule: 'gap', to, effortLess: 0, because: `${daysSinceLast} days since the last time` };
}

/** As many results running as it takes: each above the mark, none too hard, and each asked at the present amount. */
function hasEarnedRise(history: readonly Done[]): boolean {
  const recent = history.slice(0, LIMITS.upsNeeded);
  // A result on a smaller target does not count again: every rise needs results of its own.
  const isAskedAlike = recent.every((done) => done.askedTotal >= (recent[0]?.askedTotal ?? 0));
  const isEarned = recent.every((done) => isUsable(done) && isAbove(done) && !isTooHard(done));
  return recent.length === LIMITS.upsNeeded && isAskedAlike && isEarned;
}

function rise({ place, history, emphasis, kit }: StepFacts): Step | null {
  const [last, before] = history;
  if (last === undefined || before === undefined) return null;
  const because = `${percentOf(before)} % and ${percentOf(last)} %, twice above ${LIMITS.upFromPercent} %`;
  const [, high] = EMPHASES[emphasis].range[place.rung.unit];
  const next = place.amount >= high ? stepUp(place, kit) : null;
  if (next !== null) return { rule: 'up-rung', to: next, effortLess: 0, because };
  const most = place.amount < high ? high : high * LIMITS.beyondTop;
  const amount = Math.min(
    most,
    place.amount + Math.max(1, Math.floor((place.amount * LIMITS.risePercent) / 100)),
  );
  if (amount <= place.amount) return null;
  return { rule: 'up-reps', to: { rung: place.rung, amount }, effortLess: 0, because };
}

/** The change that the rules ask for. Setbacks stand above results; of results, a shortfall above a rise. */
export function nextStep(facts: StepFacts): Step {
  const { place, history, mayRise } = facts;
  const last = history[0] !== undefined && isUsable(history[0]) ? history[0] : undefined;
  const earned = earnedAmount(facts, last);
  const back = setback(facts, earned);
  if (back !== null) return back;
  if (last === undefined)
    return { rule: 'hold', to: place, effortLess: 0, because: 'No result on this rung yet' };
  if (isBelow(last) || isTooHard(last)) {
    const hard = `${doneWords(last)}, at effort ${last.effort} where ${last.effortAsked} was asked`;
    const because = isTooHard(last) ? hard : doneWords(last);
    return { rule: 'down', to: ease(place, earned, facts), effortLess: 0, because };
  }
  const risen = mayRise && hasEarnedRise(history) ? rise(facts) : null;
  return risen ?? { rule: 'hold', to: place, effortLess: 0, because: doneWords(last) };
}
