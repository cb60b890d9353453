import type { ChangeMark } from '../../src/domain/change/judge-change.ts';

/** Seeded random numbers (mulberry32), so that the table is the same on every machine. */
export interface Random {
  readonly uniform: () => number;
  readonly normal: () => number;
}

export function seededRandom(seed: number): Random {
  let state = seed >>> 0;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const normal = (): number => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}

/** True level in typical errors above the start, by week. */
export type Path = (week: number) => number;

export const stays: Path = () => 0;

/** A gain made evenly over twelve weeks, then held. */
export function gainsOverAFlight(errors: number): Path {
  return risesBetween(errors, 0, 12);
}

/** A gain made evenly between two weeks, then held. */
function risesBetween(errors: number, from: number, to: number): Path {
  return (week) => errors * Math.min(1, Math.max(0, (week - from) / (to - from)));
}

/** Each way a year may go, with its share of the practice. Sizes in typical errors. */
const LIVES: readonly (readonly [share: number, draw: (random: Random) => Path])[] = [
  [0.25, () => stays],
  [0.25, levelsOff],
  [0.2, (random) => risesBetween(2 + 3 * random.uniform(), 0, 4 + 12 * random.uniform())],
  [0.15, lapses],
  [0.1, startsLate],
  [0.05, drifts],
];

/**
 * A member of an invented practice: a quarter stay the same, a quarter gain and level off slowly, a fifth gain evenly
 * and stop at once, some lapse and come back, some begin to gain late, a few drift.
 */
export function drawLife(random: Random): Path {
  let left = random.uniform();
  for (const [share, draw] of LIVES) {
    if (left < share) return draw(random);
    left -= share;
  }
  return stays;
}

function levelsOff(random: Random): Path {
  const gain = 3 + 1.5 * random.normal();
  const pace = 6 + 12 * random.uniform();
  return (week) => gain * (1 - Math.exp(-week / pace));
}

function lapses(random: Random): Path {
  const improve = levelsOff(random);
  const middle = 8 + 37 * random.uniform();
  const half = 2 + 3 * random.uniform();
  const depth = 1 + 2 * random.uniform();
  return (week) => improve(week) - depth * Math.max(0, 1 - Math.abs(week - middle) / half);
}

function startsLate(random: Random): Path {
  const from = 6 + 24 * random.uniform();
  return risesBetween(2 + 2 * random.uniform(), from, from + 6 + 8 * random.uniform());
}

function drifts(random: Random): Path {
  const waves = [1, 2, 3].map((n) => ({ size: random.normal() / n, turn: random.uniform(), n }));
  const at: Path = (week) =>
    waves.reduce(
      (sum, { size, turn, n }) => sum + size * Math.sin(2 * Math.PI * ((n * week) / 60 + turn)),
      0,
    );
  return (week) => at(week) - at(0);
}

export interface Conditions {
  readonly name: string;
  /** Share of marks that are a bad or a wild day. */
  readonly outliers: number;
  /** How far the first mark is low, in typical errors, on average; the second 0.45, the third 0.2 of it. */
  readonly learning: number;
  /** Share of weeks missed, and whether there is a hole of six weeks. */
  readonly missed: number;
  readonly hole: boolean;
  /** Only the test days are marked, every fourth week. */
  readonly testDaysOnly: boolean;
}

const CLEAN = { outliers: 0, learning: 0, missed: 0, hole: false, testDaysOnly: false };

export const CONDITIONS: readonly Conditions[] = [
  { ...CLEAN, name: 'Clean' },
  { ...CLEAN, name: 'Outliers', outliers: 0.06 },
  { ...CLEAN, name: 'Learning', learning: 0.8 },
  { ...CLEAN, name: 'Gaps', missed: 0.25, hole: true },
  { ...CLEAN, name: 'All three', outliers: 0.06, learning: 0.8, missed: 0.25, hole: true },
  { ...CLEAN, name: 'Test days', learning: 0.8, testDaysOnly: true },
];

/** Sit-ups round 30 a minute, where the prior typical error is 1.8. */
export const BASE_LEVEL = 30;
export const PRIOR_ERROR = 1.8;

export interface Member {
  readonly marks: readonly ChangeMark[];
  /** True level in the unit of the test, without learning, by week. */
  readonly levelAt: Path;
  /** The member's own typical error. */
  readonly typicalError: number;
}

/**
 * A year of marks, one a week for a day or two either way, in whole reps. Every member has an error of their own:
 * lognormal round the prior, SD 25 %. Weeks 0, 4, 8, … (test days) are not missed unless they fall in the hole.
 */
export function drawMember(path: Path, conditions: Conditions, random: Random): Member {
  const typicalError = PRIOR_ERROR * Math.exp(0.25 * random.normal());
  const levelAt: Path = (week) => BASE_LEVEL + path(week) * typicalError;
  const learning = conditions.learning * typicalError * (0.5 + random.uniform());
  const holeStart = 14 + Math.floor(24 * random.uniform());
  const marks: ChangeMark[] = [];
  for (let week = 0; week <= 52; week += 1) {
    const isTestDay = week % 4 === 0;
    const isMissed = !isTestDay && (conditions.testDaysOnly || random.uniform() < conditions.missed);
    const isInHole = conditions.hole && week >= holeStart && week < holeStart + 6;
    const day = week === 0 ? 0 : week * 7 + Math.round(2 * random.uniform() - 1);
    const isWild = random.uniform() < conditions.outliers;
    const side = random.uniform() < 0.75 ? -1 : 1;
    const wild = isWild ? side * (4 + 3 * random.uniform()) * typicalError : 0;
    const error = random.normal() * typicalError + wild;
    if (isMissed || isInHole) continue;
    const stillToLearn = learning * ([1, 0.45, 0.2][marks.length] ?? 0);
    const value = Math.max(0, Math.round(levelAt(day / 7) - stillToLearn + error));
    marks.push({ atDays: day, value });
  }
  return { marks, levelAt, typicalError };
}
