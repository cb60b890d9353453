import type { Flag, MethodEntry } from '../methods/types.ts';
import { weakestFlag } from '../methods/flags.ts';
import { PLANK_LINFIELD } from './place-plank.ts';
import { WAIST_NICE } from './place-waist.ts';
import { standingOf } from './standing-of.ts';
import { CHAIR_STAND_STEADI } from './tables/chair.ts';
import { KNEE_PUSH_UPS_COOPER, PUSH_UPS_COOPER, SIT_UPS_COOPER } from './tables/cooper-minute.ts';
import { CURL_UP_CSEP, PUSH_UPS_CSEP } from './tables/csep.ts';
import { RUN_POLICE } from './tables/police.ts';
import { STEP_HOME, STEP_YMCA } from './tables/step.ts';
import { VO2MAX_COOPER, VO2MAX_FRIEND } from './tables/vo2max.ts';
import type { PublishedTable, StandingQuery } from './types.ts';

const STRAIGHT =
  'Straight lines between the printed cells, rounded to a whole percentile; beyond the outermost cells only the side is told.';
const WORDS = 'The word whose range holds the result. The cuts are inclusive.';

interface TableMethod {
  readonly table: PublishedTable;
  readonly formula: string;
  readonly units: string;
  /** What is placed for the example. */
  readonly query: StandingQuery;
  readonly inputs: string;
  readonly flags: readonly [Flag, ...Flag[]];
  readonly limits: readonly [string, ...string[]];
}

/** The page of a table: its slug is the table's id, so that every place can link to it. */
function methodOf({ table, formula, units, query, inputs, flags, limits }: TableMethod): MethodEntry {
  const flag = weakestFlag(flags);
  return {
    slug: table.id,
    title: table.title,
    purpose: 'Where a result stands among those who were measured.',
    formula,
    units,
    example: () => {
      const standing = standingOf(query);
      const said = standing.kind === 'placed' ? standing.disagreements.map(({ sentence }) => sentence) : [];
      return { inputs, result: [standing.sentence, ...said].join(' ') };
    },
    sources: [{ citation: table.citation, year: table.year, population: table.population, flag }],
    limits,
    flag,
  };
}

const man35 = { sex: 'male', ageYears: 35 } as const;
const woman35 = { sex: 'female', ageYears: 35 } as const;

/** One page for each table that places a result. */
export const STANDING_METHODS: readonly MethodEntry[] = [
  methodOf({
    table: PUSH_UPS_CSEP,
    formula: `${WORDS} Set beside it: an older edition and one clinic’s single target, where they disagree.`,
    units: 'push-ups without a clock',
    query: { ...man35, test: 'push-ups', form: 'floor', value: 17 },
    inputs: 'A man of 35 does 17 on the toes.',
    flags: ['published', 'memory'],
    limits: [
      'Men on the toes and women on the knees: no other form has a place in it.',
      'Read whole: men to 29, and everywhere ‘good’ and ‘excellent’. The other cuts are from memory and an older edition.',
      'Counts differ between raters when the depth is not watched (r 0.10 to 0.97 in one study).',
    ],
  }),
  methodOf({
    table: SIT_UPS_COOPER,
    formula: STRAIGHT,
    units: 'sit-ups in 60 s',
    query: { ...man35, test: 'sit-ups', form: 'feet held', value: 32 },
    inputs: 'A man of 35 does 32 with the feet held.',
    flags: ['published', 'memory'],
    limits: [
      'Feet held, knees bent, hands behind the head: no other form has a place in it.',
      'The 20th, 30th and (men) 50th were read; every other cell is from memory.',
      'Those measured were fitter than most people.',
    ],
  }),
  methodOf({
    table: PUSH_UPS_COOPER,
    formula: STRAIGHT,
    units: 'push-ups in 60 s, on the toes',
    query: { ...man35, test: 'push-ups', value: 27, detail: { protocol: 'one-minute' } },
    inputs: 'A man of 35 does 27 in one minute.',
    flags: ['published', 'memory'],
    limits: [
      'Not for women of 50 and over: there is no norm.',
      'The 30th and (men) 50th were read; the rest is from memory.',
    ],
  }),
  methodOf({
    table: KNEE_PUSH_UPS_COOPER,
    formula: 'At, above or below the middle: only the 50th percentile was read.',
    units: 'push-ups in 60 s, on the knees',
    query: { ...woman35, test: 'push-ups', form: 'knees', value: 24, detail: { protocol: 'one-minute' } },
    inputs: 'A woman of 35 does 24 on the knees in one minute.',
    flags: ['published'],
    limits: ['Women of 20 to 59 only.', 'It tells a half and no more.'],
  }),
  methodOf({
    table: CURL_UP_CSEP,
    formula: WORDS,
    units: 'curl-ups to 50 beats a minute',
    query: { ...woman35, test: 'curl-up', value: 12 },
    inputs: 'A woman of 35 does 12.',
    flags: ['memory'],
    limits: ['Another test than sit-ups: never mix the two.', 'The whole table is from memory.'],
  }),
  methodOf({
    table: CHAIR_STAND_STEADI,
    formula: WORDS,
    units: 'stands in 30 s',
    query: { sex: 'male', ageYears: 67, test: 'chair-stand', value: 11 },
    inputs: 'A man of 67 stands up 11 times.',
    flags: ['published', 'memory'],
    limits: ['From 60 to 94 only, on a chair of 43 cm.', 'Past 69 the cells are from memory.'],
  }),
  methodOf({
    table: PLANK_LINFIELD,
    formula: STRAIGHT,
    units: 'seconds',
    query: { sex: 'male', ageYears: 20, test: 'plank', value: 110 },
    inputs: 'A man of 20 holds 1:50.',
    flags: ['published'],
    limits: [
      'Students of 18 to 25 and nobody else.',
      'Two groups of students differ by 18 seconds in the middle (men).',
    ],
  }),
  methodOf({
    table: STEP_YMCA,
    formula: WORDS,
    units: 'beats in the minute after, sitting',
    query: { ...man35, test: 'step-test', value: 100, detail: { stepHeightMm: 305 } },
    inputs: 'A man of 35 counts 100 after three minutes on 30.5 cm.',
    flags: ['memory'],
    limits: [
      'Only on a step of 30.5 cm, 1 cm either way (common practice), at 96 beats a minute.',
      'Never with medicines that change the pulse.',
      'The whole table is from memory.',
    ],
  }),
  methodOf({
    table: STEP_HOME,
    formula: 'Set beside the step test where its word differs. It never places a result.',
    units: 'beats a minute',
    query: { ...man35, test: 'step-test', value: 88, detail: { stepHeightMm: 305 } },
    inputs: 'A man of 35 counts 88 after three minutes on 30.5 cm.',
    flags: ['published'],
    limits: ['Its copies differ: one counts a full minute, the other 15 seconds times four.'],
  }),
  methodOf({
    table: RUN_POLICE,
    formula: STRAIGHT,
    units: 'seconds for 1.5 miles',
    query: { sex: 'male', ageYears: 22, test: 'run-1-5-mile', value: 740 },
    inputs: 'A man of 22 runs it in 12:20.',
    flags: ['published', 'derived'],
    limits: ['Police candidates, not people in general.', 'From 50 on two points are known, from 60 on one.'],
  }),
  methodOf({
    table: VO2MAX_COOPER,
    formula: 'The class whose range holds the VO2max; superior begins above its cut, the others at it.',
    units: 'mL/kg/min',
    query: { ...man35, test: 'run-12', value: 2400 },
    inputs: 'A man of 35 runs 2,400 m in twelve minutes.',
    flags: ['published', 'derived'],
    limits: [
      'From a field test the VO2max is an estimate; from the walk it is more than 5 off for one in three.',
      'Women past 50 are thinly based.',
    ],
  }),
  methodOf({
    table: VO2MAX_FRIEND,
    formula: `${STRAIGHT} Set beside the classes where the two point apart.`,
    units: 'mL/kg/min',
    query: { sex: 'female', ageYears: 57, test: 'vo2max', value: 25 },
    inputs: 'A woman of 57 has a VO2max of 25.',
    flags: ['published', 'memory'],
    limits: [
      'An update of 2021 lies 1.5 to 4.6 lower.',
      'Only the 50th at 20 to 29 and at 70 to 79 was read; the rest is from memory.',
    ],
  }),
  methodOf({
    table: WAIST_NICE,
    formula: 'waist ÷ height, compared before rounding: from 0.4 healthy, from 0.5 increased, from 0.6 high',
    units: 'a ratio without a unit',
    query: { ...woman35, test: 'waist', value: 81, detail: { heightCm: 163 } },
    inputs: 'A waist of 81 cm and a height of 163 cm.',
    flags: ['published'],
    limits: [
      'Adults with a body mass index below 35.',
      'Never in pregnancy, never under 18.',
      'Off until you ask for it.',
    ],
  }),
];
