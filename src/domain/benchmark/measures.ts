import { NO_REST } from './shared.ts';
import type { Benchmark } from './types.ts';

export const WEIGHT: Benchmark = {
  id: 'weight',
  name: 'Weight',
  question: 'What do you weigh?',
  unit: 'kilograms',
  unitWord: { one: 'kilogram', many: 'kilograms' },
  entry: 'decimal',
  decimals: 1,
  forms: [{ id: 'morning', label: 'In the morning, before breakfast' }],
  better: 'neither',
  limits: {
    min: 30,
    max: 300,
    outside: 'Bathroom scales read between 30 and 300 kg. Check the number and the unit.',
  },
  baseline: 'optional',
  offUntilAsked: true,
  durationSeconds: null,
  restBefore: NO_REST,
  setUp: ['The same scales, on a hard floor, with as little on as you like.'],
  standards: ['One reading, in the morning, before breakfast.'],
  cautions: [
    'A day moves it by a kilogram. Muscle comes before fat goes, so weight may rise first.',
    'If weighing troubles you, leave it off. Nothing else needs it.',
  ],
  stopWhen: [],
  practice: 'No practice is needed.',
  source: 'Common practice, no source',
};

export const WAIST: Benchmark = {
  id: 'waist',
  name: 'Waist',
  question: 'How far is it round your waist?',
  unit: 'centimetres',
  unitWord: { one: 'centimetre', many: 'centimetres' },
  entry: 'decimal',
  decimals: 1,
  forms: [{ id: 'midway', label: 'Midway between the lowest rib and the top of the hip' }],
  better: 'neither',
  limits: {
    min: 40,
    max: 200,
    outside: 'A waist lies between 40 and 200 cm. Check the number and the unit.',
  },
  baseline: 'optional',
  offUntilAsked: true,
  durationSeconds: null,
  restBefore: NO_REST,
  setUp: ['A tape on the skin, level all round, snug and not tight.'],
  standards: ['Midway between the lowest rib and the top of the hip. Breathe out naturally, then read.'],
  cautions: ['Not in pregnancy: the number says nothing then.'],
  stopWhen: [],
  practice: 'Measure twice. If the two differ by more than 1 cm, measure again.',
  source: 'NICE guideline NG246, how to measure; 1 cm: common practice, no source',
};
