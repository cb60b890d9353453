import type { MethodEntry, MethodSource } from '../methods/types.ts';
import { formatNumber } from '../numbers/format.ts';
import { LEARNING_MEAN, LEARNING_SD, MISFIT_LIMIT, PRIOR_REPEATS } from './fit-trend.ts';
import { judgeChange, PROBABLE_CHANCE, REAL_CHANCE } from './judge-change.ts';
import {
  SMALLEST_CHANGE_80,
  SMALLEST_CHANGE_95,
  smallestRealChange,
  standardErrorOfMeasurement,
} from './typical-error.ts';

const HOPKINS: MethodSource = {
  citation: 'Hopkins WG. Measures of reliability in sports medicine and science. Sports Med 2000;30:1-15',
  year: '2000',
  population: 'A review of method; nobody was measured',
  flag: 'published',
};

const WEIR: MethodSource = {
  citation: 'Weir JP. Quantifying test-retest reliability. J Strength Cond Res 2005;19:231-240',
  year: '2005',
  population: 'A review of method; nobody was measured. The form of the formula is from memory',
  flag: 'memory',
};

const BATTERY: MethodSource = {
  citation: 'JMIR Form Res 2021;5(12):e28040, Table 3',
  year: '2021',
  population: '31 adults, a battery of tests done at home; the spread between adults is from memory',
  flag: 'derived',
};

const STATE_SPACE: MethodSource = {
  citation:
    'Durbin J, Koopman SJ. Time Series Analysis by State Space Methods. 2nd ed. Oxford 2012, chapters 2 to 4. The code is checked against its results for the Nile',
  year: '2012',
  population: 'A method; nobody was measured',
  flag: 'memory',
};

const SIMULATION: MethodSource = {
  citation: 'Sizes of the beliefs: chosen by the simulation of this practice, whose table stands below',
  year: null,
  population: 'Invented members, drawn at random',
  flag: 'common practice, no source',
};

const EXAMPLE_MARKS = [28, 30, 30, 32, 33, 33, 35, 35, 37];

function exampleJudgement() {
  return judgeChange({
    testId: 'sit-ups',
    better: 'more',
    marks: EXAMPLE_MARKS.map((value, week) => ({ atDays: week * 7, value })),
  });
}

/** The methods behind every number of a change. */
export const CHANGE_METHODS: readonly MethodEntry[] = [
  {
    slug: 'typical-error',
    title: 'Typical error of a test',
    purpose: 'How far two results of the same person lie apart when nothing has changed.',
    formula: `SEM = SD √(1 − ICC) where a study gives them; then (${PRIOR_REPEATS} × SEM² + own squared deviations) ÷ (${PRIOR_REPEATS} + own repeats), and the root of it`,
    units: 'The unit of the test',
    example: () => ({
      inputs: 'Push-ups: SD between adults 10, test-retest correlation 0.97, no marks of your own yet.',
      result: `${formatNumber(standardErrorOfMeasurement(10, 0.97), 2)} push-ups.`,
    }),
    sources: [HOPKINS, WEIR, BATTERY],
    limits: [
      'For sit-ups, stairs, plank, pull-ups and the runs nobody published the error of adults at home: a value of the practice stands in until you have repeats of your own.',
      'It holds for the same form, the same stairs and the same way of counting. Another counter makes it larger.',
    ],
    flag: 'common practice, no source',
  },
  {
    slug: 'smallest-real-change',
    title: 'Smallest real change',
    purpose:
      'How far two single results must differ before the difference is more than the error of the test.',
    formula: `${formatNumber(SMALLEST_CHANGE_95, 3)} × typical error at 95 %; ${formatNumber(SMALLEST_CHANGE_80, 3)} × typical error at 80 %`,
    units: 'The unit of the test',
    example: () => {
      const error = standardErrorOfMeasurement(10, 0.97);
      return {
        inputs: `Typical error ${formatNumber(error, 2)} push-ups.`,
        result: `${formatNumber(smallestRealChange(error, 95), 1)} push-ups at 95 %, ${formatNumber(smallestRealChange(error, 80), 1)} at 80 %.`,
      };
    },
    sources: [WEIR, HOPKINS],
    limits: [
      'It is for two results only. Many results together can show a smaller change; one good day can pass it by chance.',
      'A first result is often low because the test is new.',
    ],
    flag: 'memory',
  },
  {
    slug: 'real-change',
    title: 'Real change',
    purpose: 'Whether you have changed, judged from all your results and their dates.',
    formula: `A local linear trend with a slope that fades, by Kalman filter and smoother, averaged over several beliefs about how people change. Really: chance ${formatNumber(REAL_CHANCE * 100, 1)} % or more that the level now is above the level then. Probably: ${formatNumber(PROBABLE_CHANCE * 100)} %. A result more than ${formatNumber(MISFIT_LIMIT, 1)} errors from what the others say counts less. A first result is taken to be ${formatNumber(LEARNING_MEAN, 1)} ± ${formatNumber(LEARNING_SD, 1)} errors low, the second half of that, the third a quarter. Since a landing: only the results from that day on`,
    units: 'The unit of the test; slope per four weeks',
    example: () => {
      const { verdict, level, difference, sentence } = exampleJudgement();
      const span = (part: typeof level): string =>
        part
          ? `${formatNumber(part.value, 1)} (${formatNumber(part.low, 1)} to ${formatNumber(part.high, 1)})`
          : '';
      return {
        inputs: `Sit-ups week by week: ${EXAMPLE_MARKS.join(', ')}.`,
        result: `${verdict}: level now ${span(level)}, change ${span(difference)}. “${sentence}”`,
      };
    },
    sources: [STATE_SPACE, SIMULATION],
    limits: [
      'With one result, or all within a week, it is too early. With two, only a large difference counts.',
      'A rise that begins after a long flat time is seen some weeks late.',
      'In a member who gains much in the first four weeks and then stays for a year, the size of the gain is told too small.',
      'A gain of one typical error is found in fewer than half of the members within a year.',
    ],
    flag: 'common practice, no source',
  },
];
