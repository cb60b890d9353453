import { DOCTOR_FIRST, REST_BETWEEN_TESTS, STOP_SIGNS } from './shared.ts';
import type { Benchmark } from './types.ts';

export const SIT_UPS: Benchmark = {
  id: 'sit-ups',
  name: 'Sit-ups in a minute',
  question: 'How many sit-ups can you do in one minute?',
  unit: 'reps',
  unitWord: { one: 'sit-up', many: 'sit-ups' },
  entry: 'count',
  decimals: 0,
  forms: [
    { id: 'feet held', label: 'Feet held under something heavy, or by a person' },
    { id: 'feet free', label: 'Feet free' },
  ],
  better: 'more',
  limits: { min: 0, max: 120, outside: 'More than 120 in a minute is two a second. Check the number.' },
  baseline: 'required',
  offUntilAsked: false,
  durationSeconds: 60,
  restBefore: REST_BETWEEN_TESTS,
  setUp: [
    'Lie on the mat with the knees bent to about 90 degrees and the soles flat.',
    'Tuck the toes under a heavy sofa, or have someone hold the feet.',
    'Fingers behind the head. Do not pull on it.',
  ],
  standards: [
    'Down: both shoulder blades touch the mat.',
    'Up: the elbows come to the knees.',
    'Rest only in the up position.',
    'A rep that misses either end does not count.',
  ],
  cautions: [
    'Not with a sore back or neck, not in pregnancy, and not in the months after birth until you are cleared.',
    DOCTOR_FIRST,
  ],
  stopWhen: ['Pain in the back or the neck.', ...STOP_SIGNS],
  practice:
    'Do five slowly the day before. Begin the minute at a pace you can keep: the first twenty are not a race.',
  source: 'Pennsylvania MPOETC protocol: bent knee, feet held, 60 seconds, rest only up',
};

export const PUSH_UPS: Benchmark = {
  id: 'push-ups',
  name: 'Push-ups',
  question: 'How many push-ups can you do without a break?',
  unit: 'reps',
  unitWord: { one: 'push-up', many: 'push-ups' },
  entry: 'count',
  decimals: 0,
  forms: [
    { id: 'floor', label: 'On the toes' },
    { id: 'knees', label: 'On the knees' },
  ],
  better: 'more',
  limits: {
    min: 0,
    max: 300,
    outside: 'More than 300 in one go belongs in a record book. Check the number.',
  },
  baseline: 'required',
  offUntilAsked: false,
  durationSeconds: null,
  restBefore: REST_BETWEEN_TESTS,
  setUp: [
    'Hands on the mat, slightly outside the shoulders, fingers forward.',
    'Choose toes or knees before you begin, and keep that choice.',
    'The body is one line from head to the point it rests on.',
  ],
  standards: [
    'Down: the elbows bend to 90 degrees.',
    'Up: the arms straighten fully.',
    'The line of the body does not break.',
    'No clock and no rest. Two faulty reps running end it.',
  ],
  cautions: [
    'Not with a sore shoulder, wrist or elbow.',
    'Breathe out on the way up. Never hold the breath.',
    DOCTOR_FIRST,
  ],
  stopWhen: ['Pain in a shoulder, an elbow or a wrist.', ...STOP_SIGNS],
  practice:
    'Do three or four the day before, in front of a mirror or a telephone, to see the line of the body.',
  source: 'CSEP push-up test as printed by Cañada College: untimed, to failure or two faulty reps',
};

export const PULL_UPS: Benchmark = {
  id: 'pull-ups',
  name: 'Pull-ups',
  question: 'How many pull-ups can you do from a dead hang?',
  unit: 'reps',
  unitWord: { one: 'pull-up', many: 'pull-ups' },
  entry: 'count',
  decimals: 0,
  forms: [{ id: 'dead hang', label: 'From a dead hang, either grip' }],
  better: 'more',
  limits: { min: 0, max: 80, outside: 'More than 80 in one go belongs in a record book. Check the number.' },
  baseline: 'optional',
  offUntilAsked: false,
  durationSeconds: null,
  restBefore: REST_BETWEEN_TESTS,
  setUp: [
    'Pull on the bar with both feet on the floor before you trust it.',
    'Hang with straight arms, palms either way. A chair helps you up and down.',
  ],
  standards: [
    'Start from a dead hang.',
    'Up: the chin passes the bar.',
    'Down: the arms straighten fully.',
    'No swing and no kick of the legs. No clock.',
  ],
  cautions: [
    'Not with a sore shoulder or elbow.',
    'A bar in a door frame holds what its maker says, and no more.',
    DOCTOR_FIRST,
  ],
  stopWhen: ['The bar moves.', 'Pain in a shoulder or an elbow.', ...STOP_SIGNS],
  practice: 'Hang for ten seconds first. None is a mark too: write 0.',
  source: 'US Marine Corps fitness test, rules of the pull-up',
};

export const PLANK: Benchmark = {
  id: 'plank',
  name: 'Plank',
  question: 'How long can you hold a plank?',
  unit: 'seconds',
  unitWord: { one: 'second', many: 'seconds' },
  entry: 'duration',
  decimals: 0,
  forms: [{ id: 'elbows', label: 'On the elbows' }],
  better: 'more',
  limits: { min: 0, max: 3600, outside: 'More than an hour is another sport. Check the time.' },
  baseline: 'optional',
  offUntilAsked: false,
  durationSeconds: null,
  restBefore: REST_BETWEEN_TESTS,
  setUp: [
    'Elbows under the shoulders, forearms flat, toes on the mat.',
    'Put the telephone where you see the clock.',
  ],
  standards: [
    'One line from head to heels.',
    'The time ends when the hips sag or rise and do not come back at once.',
  ],
  cautions: [
    'Not with a sore back, not in later pregnancy.',
    'Keep breathing. A held breath raises the blood pressure.',
    DOCTOR_FIRST,
  ],
  stopWhen: ['Pain in the back or a shoulder.', ...STOP_SIGNS],
  practice: 'Hold ten seconds twice, the day before.',
  source: 'Strand 2014 describes the hold; when it ends: common practice, no source',
};

export const CHAIR_STAND: Benchmark = {
  id: 'chair-stand',
  name: 'Chair stand',
  question: 'How many times can you stand up from a chair in 30 seconds?',
  unit: 'reps',
  unitWord: { one: 'stand', many: 'stands' },
  entry: 'count',
  decimals: 0,
  forms: [{ id: 'arms crossed', label: 'Arms crossed on the chest' }],
  better: 'more',
  limits: { min: 0, max: 60, outside: 'More than 60 in 30 seconds is two a second. Check the number.' },
  baseline: 'optional',
  offUntilAsked: false,
  durationSeconds: 30,
  restBefore: REST_BETWEEN_TESTS,
  setUp: [
    'A chair without arms, its seat 43 cm high, its back against a wall.',
    'Feet flat, arms crossed with the hands on the shoulders.',
  ],
  standards: [
    'Up: stand fully. Down: sit.',
    'More than half-way up when the time ends counts as one.',
    'If the hands help, the mark is 0.',
  ],
  cautions: ['Have someone near if your balance is uncertain.', DOCTOR_FIRST],
  stopWhen: ['You feel you may fall.', ...STOP_SIGNS],
  practice: 'Stand up twice to find the place for the feet.',
  source: 'CDC STEADI 30-Second Chair Stand; Rikli and Jones 1999',
};
