import type { MethodEntry, MethodSource } from '../methods/types.ts';
import { formatNumber } from '../numbers/format.ts';
import { firstTarget } from './first-target.ts';
import { LIMITS } from './limits.ts';
import { nextTarget } from './next-target.ts';
import { monotony, sessionLoad, strain, STRAIN_CAUTION, weeklyLoad } from './session-load.ts';

/** A week of an invented member: four sessions and three days of rest. */
const WEEK = [300, 0, 450, 200, 0, 600, 150] as const;

const print = (value: number | null, decimals = 0): string => formatNumber(value ?? NaN, decimals);

const OWN_RULE: MethodSource = {
  citation: 'The practice’s own rule',
  year: null,
  population: 'Nobody: a rule of the trade',
  flag: 'common practice, no source',
};

const nextExample = () =>
  nextTarget({
    current: { movement: 'push', rung: 'push-up-stair-2', sets: 3, amount: 10, unit: 'reps', effort: 6 },
    history: [36, 35].map((doneTotal) => ({
      askedTotal: 30,
      doneTotal,
      effort: 6,
      effortAsked: 6,
      pain: 'none' as const,
    })),
    pain: 'none',
    emphasis: 'balanced',
    daysSinceLast: 3,
    landingWeek: false,
  });

const firstExample = () =>
  firstTarget({
    movement: 'push',
    emphasis: 'balanced',
    baseline: { pushUps: 20, form: 'floor' },
    kit: new Set(['stairs', 'mat']),
  });

export const LOAD_METHODS: readonly MethodEntry[] = [
  {
    slug: 'first-load',
    title: 'The first load',
    purpose: 'What the first session asks, from the baseline test day.',
    formula:
      'amount of a set = tested maximum × share × cost of the tested rung ÷ cost of the rung; share 50 % for breath, 55 % balanced, 65 % for muscle',
    units: 'reps, seconds or flights a set',
    example: () => ({ inputs: 'Balanced, 20 push-ups on the floor.', result: firstExample().why }),
    sources: [OWN_RULE],
    limits: [
      'The cost of a rung is our estimate; two people rank the rungs differently.',
      'Less for people of 65 and over and for everybody who begins gently.',
    ],
    flag: 'common practice, no source',
  },
  {
    slug: 'next-load',
    title: 'The next load',
    purpose: 'Whether the next session asks for more, the same or less.',
    formula: `done ÷ asked × 100: below ${LIMITS.holdFromPercent} down, to ${LIMITS.upFromPercent} the same, above it twice running up, first in reps, then to the next rung`,
    units: 'per cent',
    example: () => ({
      inputs: '3 sets of 10 asked, 35 and then 36 of 30 done.',
      result: nextExample().why,
    }),
    sources: [
      OWN_RULE,
      {
        citation: 'Ratamess NA et al. Med Sci Sports Exerc 2009;41:687-708 (a rise of 2 to 10 %)',
        year: '2009',
        population: 'Healthy adults; an expert position on lifting weights',
        flag: 'published',
      },
    ],
    limits: [
      'Reported pain stands above it, and so does the coach.',
      `One step raises a set by ${LIMITS.risePercent} % at most, or by one unit; a new rung by ${LIMITS.rungRisePercent} %.`,
      'After an illness, after ten days without, and in a landing week it asks for less.',
    ],
    flag: 'common practice, no source',
  },
  {
    slug: 'session-load',
    title: 'Load of a session and of a week',
    purpose: 'One number for how much work a session was, whatever was in it.',
    formula: 'session load = effort (0 to 10) × minutes; weekly load = their sum',
    units: 'arbitrary units',
    example: () => ({
      inputs: 'Effort 5 for 40 minutes; a week of 300, 0, 450, 200, 0, 600 and 150.',
      result: `${print(sessionLoad(5, 40))} for the session, ${print(weeklyLoad(WEEK))} for the week.`,
    }),
    sources: [
      {
        citation: 'Foster C et al. J Strength Cond Res 2001;15(1):109-115',
        year: '2001',
        population: 'Trained cyclists and basketball players (memory)',
        flag: 'published',
      },
    ],
    limits: [
      'Effort is to be asked about half an hour after the session; here it is asked at its end.',
      'Ten easy minutes and two hard ones can be the same number.',
    ],
    flag: 'published',
  },
  {
    slug: 'monotony-and-strain',
    title: 'Monotony and strain',
    purpose: 'Whether the days of a week were too much alike.',
    formula:
      'monotony = mean ÷ standard deviation (n − 1) of seven daily loads; strain = weekly load × monotony',
    units: 'monotony without unit, strain in arbitrary units',
    example: () => ({
      inputs: 'Daily loads of 300, 0, 450, 200, 0, 600 and 150.',
      result: `Monotony ${print(monotony(WEEK), 2)}, strain ${print(strain(WEEK))}.`,
    }),
    sources: [
      {
        citation: 'Foster C. Med Sci Sports Exerc 1998;30(7):1164-1168',
        year: '1998',
        population: 'Experienced athletes (memory)',
        flag: 'published',
      },
    ],
    limits: [
      STRAIN_CAUTION,
      'The paper leaves open how the deviation is taken; n − 1 is used here, n would give more.',
      'Seven equal days have none: it would be infinite.',
    ],
    flag: 'published',
  },
];
