import type { MethodEntry } from '../methods/types.ts';
import { formatIsoDay } from '../numbers/format.ts';
import type { ReadinessAnswers } from './questions.ts';
import { screen, VALID_MONTHS, validUntil } from './screen.ts';

/** Someone who is not used to training, with nothing else to tell. */
const BEGINNER: ReadinessAnswers = {
  activity: 'inactive',
  disease: ['none'],
  signs: ['none'],
  pregnancy: 'no',
  age: '45-64',
  medicinesPulse: 'no',
  bloodPressure: 'normal',
  recentIllnessOrSurgery: 'no',
  effort: 'light-moderate',
};

const ANSWERED_ON = '2026-12-01';

export const READINESS_METHODS: readonly MethodEntry[] = [
  {
    slug: 'readiness',
    title: 'Readiness: may I begin?',
    purpose: 'Who may begin, who begins gently and who sees a doctor first.',
    formula:
      'Signs: doctor. Known disease and not used to training, or meant to be hard: doctor. Known disease, used to it, moderate: gently. Not used to it: gently. Else clear. The strictest answer decides',
    units: 'clear, gentle or doctor',
    example: () => {
      const { result, reasons } = screen(BEGINNER);
      return {
        inputs: `Not active so far, nothing else to tell; answered on ${formatIsoDay(ANSWERED_ON, true)}.`,
        result: `‘${result}’, until ${formatIsoDay(validUntil(ANSWERED_ON), true)}. ${reasons.join(' ')}`,
      };
    },
    sources: [
      {
        citation:
          'Riebe D et al. Med Sci Sports Exerc 2015;47:2473-2479 (three inputs, risk factors no longer counted)',
        year: '2015',
        population: 'Adults; an expert consensus, no trial',
        flag: 'published',
      },
      {
        citation: `The same, its details: 30 minutes, 3 days a week, 3 months, ${VALID_MONTHS} months`,
        year: '2015',
        population: 'Adults; an expert consensus, no trial',
        flag: 'memory',
      },
      {
        citation:
          'Questions on pregnancy, age, blood pressure, illness and operations: the practice’s own, stricter',
        year: null,
        population: 'Nobody: a rule of the trade',
        flag: 'common practice, no source',
      },
    ],
    limits: [
      'It finds nobody ill and nobody well. A doctor’s word stands above it.',
      'Of US adults of 40 and over, the published questions send 54.2 % to a doctor before any exercise and 2.6 % before hard exercise only (Whitfield 2017).',
      'It is as good as the answers, on the day they were given.',
    ],
    flag: 'common practice, no source',
  },
];
