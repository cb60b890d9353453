import { LADDERS, rungOf, rungsFor, type Kit, type MovementId, type Rung } from '../movement/ladders.ts';
import { formatNumber } from '../numbers/format.ts';
import { EMPHASES, GENTLE_EFFORT } from './limits.ts';
import type { Decision, Emphasis } from './types.ts';
import { setsOf } from './words.ts';

/** Results of the baseline test day, where taken. Anything negative or not finite counts as not taken. */
export interface Baseline {
  readonly pushUps?: number;
  /** The form of the push-up test. */
  readonly form?: 'floor' | 'knees';
  /** In one minute. */
  readonly sitUps?: number;
  /** Stairs climbed in three minutes. */
  readonly stairs?: number;
  /** Stairs of one flight in the house; {@link USUAL_STAIR_COUNT} when left out. */
  readonly stairCount?: number;
  readonly pullUps?: number;
  readonly plankSeconds?: number;
}

export interface FirstTargetInput {
  readonly movement: MovementId;
  readonly emphasis: Emphasis;
  readonly baseline: Baseline;
  readonly kit: ReadonlySet<Kit>;
  readonly ageYears?: number;
  /** The screen said to begin gently. */
  readonly gentle?: boolean;
}

/** A flight of stairs where the house's own is not known. Common practice, no source. */
const USUAL_STAIR_COUNT = 13;

/** From this age the first share is smaller. Common practice, no source, as are both factors. */
const OLDER_FROM_YEARS = 65;
const OLDER_FACTOR = 0.85;
const GENTLE_FACTOR = 0.8;

interface Tested {
  readonly rung: string;
  readonly maximum: number;
  readonly words: string;
}

const usable = (value: number | undefined): value is number =>
  value !== undefined && value > 0 && value < Infinity;

/** The test that says most about a movement, as a maximum on one of its rungs; null when there is none. */
function testedMaximum(movement: MovementId, baseline: Baseline): Tested | null {
  const { pushUps, form, sitUps, stairs, stairCount, pullUps, plankSeconds } = baseline;
  if (movement === 'push' && usable(pushUps)) {
    const rung = form === 'knees' ? 'push-up-knees' : 'push-up-floor';
    return {
      rung,
      maximum: pushUps,
      words: `${formatNumber(pushUps)} push-ups${form === 'knees' ? ' from the knees' : ''}`,
    };
  }
  if (movement === 'sit-up' && usable(sitUps))
    return { rung: 'sit-up-tested', maximum: sitUps, words: `${formatNumber(sitUps)} sit-ups in a minute` };
  if (movement === 'stairs' && usable(stairs)) {
    const flight = usable(stairCount) ? stairCount : USUAL_STAIR_COUNT;
    return {
      rung: 'stairs-walk',
      maximum: stairs / flight,
      words: `${formatNumber(stairs)} stairs in three minutes`,
    };
  }
  if (movement === 'pull' && usable(pullUps))
    return { rung: 'pull-up', maximum: pullUps, words: `${formatNumber(pullUps)} pull-ups` };
  if (movement === 'plank' && usable(plankSeconds))
    return {
      rung: 'plank-forearms',
      maximum: plankSeconds,
      words: `a plank of ${formatNumber(plankSeconds)} s`,
    };
  return null;
}

const isCareful = ({ gentle, ageYears }: FirstTargetInput): boolean =>
  gentle === true || (ageYears !== undefined && ageYears >= OLDER_FROM_YEARS);

/** Share of the tested maximum in a first set, 0 to 1. */
function firstShare({ emphasis, gentle, ageYears }: FirstTargetInput): number {
  const older = ageYears !== undefined && ageYears >= OLDER_FROM_YEARS ? OLDER_FACTOR : 1;
  return EMPHASES[emphasis].share * older * (gentle === true ? GENTLE_FACTOR : 1);
}

const rangeOf = (rung: Rung, emphasis: Emphasis) => EMPHASES[emphasis].range[rung.unit];

/** The hardest rung, no higher on the ladder than the tested one, on which the share still makes a full set; else the easiest. */
function rungForShare(
  rungs: readonly [Rung, ...Rung[]],
  costAsked: number,
  { movement, emphasis }: FirstTargetInput,
  testedRung: string,
): Rung {
  const ladder = LADDERS[movement].rungs;
  const reach = ladder.slice(0, ladder.findIndex(({ id }) => id === testedRung) + 1);
  const fits = (rung: Rung) =>
    reach.includes(rung) && costAsked / rung.costPerUnit >= rangeOf(rung, emphasis)[0];
  return rungs.findLast(fits) ?? rungs[0];
}

/** The rung without a test: the easiest, or one further for people who want muscle and need no care. */
function untestedRung(rungs: readonly [Rung, ...Rung[]], input: FirstTargetInput): Rung {
  return (input.emphasis === 'muscle' && !isCareful(input) ? rungs[1] : undefined) ?? rungs[0];
}

/**
 * The first load of a movement from the baseline test day: a share of the tested maximum, with reserve, on a rung no harder
 * than the tested one. Without a test it begins at the foot of the ladder. Common practice, no source. Throws a RangeError
 * when the house allows no rung of the movement (see `rungsFor`).
 */
export function firstTarget(input: FirstTargetInput): Decision {
  const { movement, emphasis, baseline, kit } = input;
  const [easiest, ...harder] = rungsFor(movement, kit);
  if (easiest === undefined) throw new RangeError(`This house has nothing for '${movement}'.`);
  const rungs = [easiest, ...harder] as const;
  const { sets, effort } = EMPHASES[emphasis];
  const careful = isCareful(input) ? Math.min(effort, GENTLE_EFFORT) : effort;
  const tested = testedMaximum(movement, baseline);

  const decide = (rung: Rung, amount: number, why: (words: string) => string): Decision => ({
    target: { movement, rung: rung.id, sets, amount, unit: rung.unit, effort: careful },
    rule: 'first',
    why: why(setsOf(sets, amount, rung.unit)),
  });

  if (tested === null) {
    const rung = untestedRung(rungs, input);
    return decide(
      rung,
      rangeOf(rung, emphasis)[0],
      (words) => `No test for this yet, so it begins easily: ${words}.`,
    );
  }
  const share = firstShare(input);
  const costAsked = tested.maximum * rungOf(tested.rung).costPerUnit * share;
  const rung = rungForShare(rungs, costAsked, input, tested.rung);
  const [low, high] = rangeOf(rung, emphasis);
  const amount = Math.min(high, Math.max(low, Math.floor(costAsked / rung.costPerUnit)));
  return decide(
    rung,
    amount,
    (words) => `You did ${tested.words}; about ${formatNumber(share * 100)} % of that is ${words} here.`,
  );
}
