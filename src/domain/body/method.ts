import { formatNumber } from '../numbers/format.ts';
import type { MethodEntry } from '../methods/types.ts';
import { fitChair, MAT_MARGIN_MM } from './fit.ts';
import { MUSCLE_FIRST, smoothDailyWeights } from './smoothed-weight.ts';
import { bodyFatRange, tapeBodyFatInches } from './tape-body-fat.ts';

const example = { sex: 'male', heightCm: 177.8, neckCm: 40.64, waistCm: 91.44 } as const;

export const BODY_METHODS: readonly MethodEntry[] = [
  {
    slug: 'weight-trend',
    title: 'The trend of weight',
    purpose: 'Weight without the water of the day.',
    formula:
      'trend = trend before + 0.1 × (weight − trend before), once a day; after a gap of d days 1 − 0.9^d of the difference',
    units: 'the unit of the scales',
    example: () => ({
      inputs: 'Trend 173.6; then 172.5, 171.5, 172, 171.5.',
      result: `${smoothDailyWeights([172.5, 171.5, 172, 171.5], 173.6)
        .map((trend) => formatNumber(trend, 2))
        .join(', ')}.`,
    }),
    sources: [
      {
        citation: 'Walker J. The Hacker’s Diet, 1991',
        year: '1991',
        population: 'One man; a rule of bookkeeping',
        flag: 'published',
      },
      {
        citation: 'The rule for gaps is derived from it',
        year: null,
        population: 'Nobody was measured',
        flag: 'derived',
      },
    ],
    limits: [
      MUSCLE_FIRST,
      'It lags: half of a lasting change shows after a week.',
      'Off until you ask for it.',
    ],
    flag: 'derived',
  },
  {
    slug: 'tape-body-fat',
    title: 'Body fat by the tape',
    purpose: 'A rough share of fat, with its error.',
    formula:
      '495 ÷ density − 450; men: density = 1.0324 − 0.19077 log(abdomen − neck) + 0.15456 log(height); women: 1.29579 − 0.35004 log(waist + hip − neck) + 0.22100 log(height)',
    units: 'per cent; girths and height in centimetres, logarithm to ten',
    example: () => ({
      inputs: 'A man of 40: abdomen 91.4, neck 40.6, height 177.8 cm (36, 16 and 70 in).',
      result: `${bodyFatRange(example, 40, false).sentence} The later form in inches gives ${formatNumber(tapeBodyFatInches(example) ?? NaN, 2)}.`,
    }),
    sources: [
      {
        citation:
          'Hodgdon JA, Beckett MB. NHRC Reports 84-11 and 84-29, 1984; Hodgdon JA, Friedl K. NHRC TD 99-2B, 1999',
        year: '1984/1999',
        population: 'Men and women of the US Navy',
        flag: 'published',
      },
    ],
    limits: [
      'Standard error 3.5 (men) and 3.7 (women) per cent: a change below that is the tape.',
      'Never under 18, never in pregnancy. Off until you ask for it.',
    ],
    flag: 'published',
  },
  {
    slug: 'fit-of-the-house',
    title: 'Chair, mat and bar that fit',
    purpose: 'What suits a body, before the feel decides.',
    formula: `seat = a quarter of the stature, 3 cm either way; mat as long as you are tall, ${MAT_MARGIN_MM / 10} cm free on every side; bar at least as high as you are tall`,
    units: 'centimetres',
    example: () => ({ inputs: 'A stature of 172 cm.', result: fitChair(1720, null).sentence }),
    sources: [
      {
        citation: 'Common practice, no source',
        year: null,
        population: 'Nobody was measured',
        flag: 'common practice, no source',
      },
    ],
    limits: ['The check by feel outranks the number: thighs level, heels down, nothing touched.'],
    flag: 'common practice, no source',
  },
];
