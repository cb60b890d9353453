import { formatNumber } from '../numbers/format.ts';
import type { MethodEntry } from '../methods/types.ts';
import { cooperRunVo2max, mileAndHalfVo2max, rockportVo2max } from './field-tests.ts';

const purpose = 'An estimate of the most oxygen the body can use, from a test without a laboratory.';
const units = 'mL/kg/min';
const print = (vo2max: number | null) => `${formatNumber(vo2max ?? NaN, 1)} mL/kg/min.`;

export const AEROBIC_METHODS: readonly MethodEntry[] = [
  {
    slug: 'vo2max-twelve-minute-run',
    title: 'VO2max from a twelve-minute run',
    purpose,
    formula: '(metres − 504.9) ÷ 44.73',
    units,
    example: () => ({ inputs: '2,400 m.', result: print(cooperRunVo2max(2400)) }),
    sources: [
      {
        citation: 'Cooper KH. JAMA 1968;203:201-204',
        year: '1968',
        population: 'Young men of the US Air Force (who was measured: memory)',
        flag: 'published',
      },
    ],
    limits: ['It needs an all-out run on level ground.', 'A poor pace gives a poor number.'],
    flag: 'published',
  },
  {
    slug: 'vo2max-mile-and-half',
    title: 'VO2max from one and a half miles',
    purpose,
    formula: '3.5 + 483 ÷ minutes',
    units,
    example: () => ({ inputs: '12:00.', result: print(mileAndHalfVo2max(720)) }),
    sources: [
      {
        citation: 'ACSM’s Guidelines for Exercise Testing and Prescription',
        year: '2018',
        population: 'Not stated in what was read',
        flag: 'published',
      },
    ],
    limits: ['It needs an all-out run on level ground.', 'Useless for a walk.'],
    flag: 'published',
  },
  {
    slug: 'vo2max-mile-walk',
    title: 'VO2max from a one-mile walk',
    purpose,
    formula: '132.853 − 0.0769 lb − 0.3877 age + 6.315 (men) − 3.2649 minutes − 0.1565 pulse',
    units,
    example: () => ({
      inputs: 'A woman of 57, 55.8 kg (123 lb), 18:00, pulse 112.',
      result: print(
        rockportVo2max({ massKg: 55.8, ageYears: 57, sex: 'female', endPulse: 112, seconds: 1080 }),
      ),
    }),
    sources: [
      {
        citation: 'Kline GM et al. Med Sci Sports Exerc 1987;19:253-259',
        year: '1987',
        population: 'Adults of 30 to 69 (ages: memory)',
        flag: 'published',
      },
    ],
    limits: [
      'Standard error 5.0 mL/kg/min: two people in three lie within it.',
      'Never with medicines that change the pulse.',
      'From 30 to 69 only.',
    ],
    flag: 'published',
  },
];
