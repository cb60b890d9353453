import { placed } from '#support/standing';
import { describe, expect, it } from 'vitest';
import { standingOf } from './standing-of.ts';
import type { StandingQuery } from './types.ts';

const man = { sex: 'male', ageYears: 35 } as const;
const woman = { sex: 'female', ageYears: 35 } as const;

function refused(query: StandingQuery) {
  const standing = standingOf(query);
  if (standing.kind !== 'no-number') throw new Error(standing.sentence);
  return standing;
}

describe('no number', () => {
  it.each<[string, StandingQuery, string, RegExp]>([
    ['feet free', { ...man, test: 'sit-ups', form: 'feet free', value: 30 }, 'other-protocol', /feet held/],
    [
      'a man on the knees',
      { ...man, test: 'push-ups', form: 'knees', value: 30 },
      'other-protocol',
      /men on the toes/,
    ],
    [
      'a woman on the toes',
      { ...woman, test: 'push-ups', form: 'floor', value: 30 },
      'other-protocol',
      /women on the knees/,
    ],
    [
      'a man on the knees in a minute',
      { ...man, test: 'push-ups', form: 'knees', value: 30, detail: { protocol: 'one-minute' } },
      'other-protocol',
      /men on the toes/,
    ],
    [
      'a woman of 55 on the toes in a minute',
      { sex: 'female', ageYears: 55, test: 'push-ups', value: 10, detail: { protocol: 'one-minute' } },
      'age-outside',
      /age of 55/,
    ],
    [
      'a woman of 62 on the knees in a minute',
      {
        sex: 'female',
        ageYears: 62,
        test: 'push-ups',
        form: 'knees',
        value: 10,
        detail: { protocol: 'one-minute' },
      },
      'age-outside',
      /age of 62/,
    ],
    ['push-ups at 70', { ...man, ageYears: 70, test: 'push-ups', value: 10 }, 'age-outside', /age of 70/],
    ['curl-ups at 19', { ...man, ageYears: 19, test: 'curl-up', value: 10 }, 'age-outside', /age of 19/],
    ['curl-ups past the beat', { ...man, test: 'curl-up', value: 26 }, 'nonsense', /ends at 25/],
    [
      'another step',
      { ...man, test: 'step-test', value: 100, detail: { stepHeightMm: 175 } },
      'other-protocol',
      /17.5 cm/,
    ],
    ['a step unknown', { ...man, test: 'step-test', value: 100 }, 'detail-missing', /30.5 cm/],
    [
      'a medicine',
      { ...man, test: 'step-test', value: 100, detail: { stepHeightMm: 305, pulseMedicine: true } },
      'medicines',
      /no table fits/,
    ],
    [
      'a walk with a medicine',
      { ...man, test: 'walk', value: 900, detail: { massKg: 80, endPulse: 120, pulseMedicine: true } },
      'medicines',
      /equation says nothing/,
    ],
    [
      'a walk without a pulse',
      { ...man, test: 'walk', value: 900, detail: { massKg: 80 } },
      'detail-missing',
      /pulse at the end/,
    ],
    [
      'a walk at 29',
      { ...man, ageYears: 29, test: 'walk', value: 900, detail: { massKg: 80, endPulse: 120 } },
      'age-outside',
      /30 to 69/,
    ],
    [
      'a walk at 70',
      { ...man, ageYears: 70, test: 'walk', value: 900, detail: { massKg: 80, endPulse: 120 } },
      'age-outside',
      /30 to 69/,
    ],
    [
      'a walk that does not fit',
      { ...man, test: 'walk', value: 2400, detail: { massKg: 250, endPulse: 200 } },
      'nonsense',
      /do not fit/,
    ],
    ['a plank at 26', { ...man, ageYears: 26, test: 'plank', value: 90 }, 'other-population', /students/],
    [
      'a chair stand at 59',
      { ...man, ageYears: 59, test: 'chair-stand', value: 12 },
      'age-outside',
      /begins at 60/,
    ],
    [
      'a chair stand at 95',
      { ...man, ageYears: 95, test: 'chair-stand', value: 12 },
      'age-outside',
      /ends at 94/,
    ],
    ['stairs', { ...man, test: 'stairs', value: 90 }, 'no-table', /Your own marks/],
    ['weight', { ...man, test: 'weight', value: 80 }, 'no-table', /Muscle comes before fat/],
    ['a pulse at rest', { ...woman, test: 'resting-pulse', value: 64 }, 'no-table', /74 in women/],
    [
      'a pulse at rest, sex not given',
      { sex: null, ageYears: 40, test: 'resting-pulse', value: 64 },
      'no-table',
      /71 in men and 74 in women/,
    ],
    ['a waist without a height', { ...man, test: 'waist', value: 90 }, 'detail-missing', /height/],
    [
      'a waist in pregnancy',
      { ...woman, test: 'waist', value: 90, detail: { heightCm: 170, pregnant: true } },
      'pregnancy',
      /pregnancy/,
    ],
    [
      'a waist past the index',
      { ...woman, test: 'waist', value: 120, detail: { heightCm: 170, massKg: 102 } },
      'other-population',
      /below 35/,
    ],
    ['sex not given', { sex: null, ageYears: 40, test: 'sit-ups', value: 30 }, 'sex-missing', /go by sex/],
    [
      'age not given',
      { sex: 'male', ageYears: null, test: 'sit-ups', value: 30 },
      'age-missing',
      /go by age/,
    ],
    ['age 0', { ...man, ageYears: 0, test: 'sit-ups', value: 30 }, 'age-outside', /under 18/],
    ['age 17', { ...man, ageYears: 17.9, test: 'sit-ups', value: 30 }, 'age-outside', /under 18/],
    ['age 130', { ...man, ageYears: 130, test: 'sit-ups', value: 30 }, 'nonsense', /not an age/],
    ['age NaN', { ...man, ageYears: NaN, test: 'sit-ups', value: 30 }, 'nonsense', /not an age/],
    ['age below zero', { ...man, ageYears: -3, test: 'sit-ups', value: 30 }, 'nonsense', /not an age/],
    ['no number at all', { ...man, test: 'sit-ups', value: NaN }, 'nonsense', /not a number/],
    ['without end', { ...man, test: 'plank', value: Infinity }, 'nonsense', /not a number/],
    ['below zero', { ...man, test: 'sit-ups', value: -3 }, 'nonsense', /Check the number/],
    ['too many', { ...man, test: 'push-ups', value: 900 }, 'nonsense', /record book/],
    ['a VO2max of 300', { ...man, test: 'vo2max', value: 300 }, 'nonsense', /between 5 and 100/],
    ['curl-ups below zero', { ...man, test: 'curl-up', value: -1 }, 'nonsense', /below zero/],
  ])('for %s, and a sentence', (_, query, reason, sentence) => {
    const standing = refused(query);
    expect(standing.reason).toBe(reason);
    expect(standing.sentence).toMatch(sentence);
  });

  it('keeps the age in whole years: 39.9 is 39', () => {
    expect(placed({ ...man, ageYears: 39.9, test: 'push-ups', value: 30 }).category?.word).toBe('excellent');
    expect(placed({ ...man, ageYears: 40, test: 'push-ups', value: 30 }).sentence).toContain('40 to 49');
  });
});
