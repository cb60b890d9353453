import { outside } from '#support/outside';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import body from '../../../tests/published/body-measures.json' with { type: 'json' };
import smoothing from '../../../tests/published/smoothing.json' with { type: 'json' };
import { bodyMassIndex } from './body-mass-index.ts';
import { fitBar, fitChair, fitHands, fitMat, fitStep } from './fit.ts';
import { smoothDailyWeights, smoothWeights } from './smoothed-weight.ts';
import { bodyFatRange, tapeBodyFat, tapeBodyFatInches, TAPE_ERROR } from './tape-body-fat.ts';
import { waistToHeight } from './waist-to-height.ts';

describe('waist over height', () => {
  const adult = { massKg: null, pregnant: false, ageYears: 40 };
  const wordAt = (waistCm: number, heightCm = 200) => {
    const answer = waistToHeight({ ...adult, waistCm, heightCm });
    return answer.ok ? answer.band.word : answer.reason;
  };

  it.each([
    [79.9, 'below the range'],
    [80, 'healthy'],
    [99.9, 'healthy'],
    [100, 'increased'],
    [119.9, 'increased'],
    [120, 'high'],
  ])(outside('%d cm of 200 cm: %s', 'NICE NG246', 'published'), (waistCm, word) => {
    expect(body.whtr_nice.healthy).toBe('0.40-0.49');
    expect(wordAt(waistCm)).toBe(word);
  });

  it(
    outside(
      '81 of 163 cm is 0.497 and healthy; 32 of 64 in is 0.500 and increased',
      'NICE 2022 press example',
      'published',
    ),
    () => {
      expect(wordAt(81, 163)).toBe('healthy');
      expect(wordAt(32 * 2.54, 64 * 2.54)).toBe('increased');
    },
  );

  it.each([
    ['in pregnancy', { pregnant: true }, 'pregnancy'],
    ['at 17', { ageYears: 17.9 }, 'age-outside'],
    ['at no age', { ageYears: NaN }, 'age-outside'],
    ['at an index of 35', { massKg: 140 }, 'other-population'],
    ['of 30 cm', { waistCm: 30 }, 'nonsense'],
    ['of 201 cm', { waistCm: 201 }, 'nonsense'],
    ['of no number', { waistCm: NaN }, 'nonsense'],
    ['on a body of 90 cm', { heightCm: 90 }, 'nonsense'],
    ['on a body of 251 cm', { heightCm: 251 }, 'nonsense'],
  ])('is not told %s', (_, change, reason) => {
    const answer = waistToHeight({ ...adult, waistCm: 95, heightCm: 200, ...change });
    expect(answer.ok ? 'ok' : answer.reason).toBe(reason);
  });

  it('is told with an index just below 35', () => {
    expect(waistToHeight({ ...adult, waistCm: 95, heightCm: 200, massKg: 139.9 }).ok).toBe(true);
  });
});

describe('body mass index', () => {
  it.each([NaN, 0, -1, 500])('is null for %d kg', (kg) => {
    expect(bodyMassIndex(kg, 170)).toBeNull();
  });
  it.each([99, 251, NaN])('is null for %d cm', (cm) => {
    expect(bodyMassIndex(70, cm)).toBeNull();
  });
});

describe('weight trend', () => {
  const {
    weights,
    start_trend: start,
    trend_unrounded: exact,
    trend_published: pencil,
  } = smoothing.hackers_diet;

  it(outside('four days, unrounded', 'Walker, The Hacker’s Diet', 'published'), () => {
    smoothDailyWeights(weights, start).forEach((trend, i) => expect(trend).toBeCloseTo(exact[i] ?? NaN, 4));
  });

  it(outside('four days, with the pencil', 'Walker, The Hacker’s Diet', 'published'), () => {
    expect(smoothDailyWeights(weights, start, { pencil: true })).toEqual(pencil);
  });

  it('begins at the first weight and has nothing to say of none', () => {
    expect(smoothDailyWeights([80, 81])).toEqual([80, 80.1]);
    expect(smoothDailyWeights([])).toEqual([]);
    expect(smoothWeights([])).toEqual([]);
  });

  it('is the same over even days and takes up more after a gap', () => {
    const daily = [80, 81, 80.5, 79].map((kg, day) => ({ day, kg }));
    const trends = smoothWeights(daily).map(({ trendKg }) => trendKg);
    smoothDailyWeights([80, 81, 80.5, 79]).forEach((trend, i) => expect(trends[i]).toBeCloseTo(trend, 12));
    const [, week] = smoothWeights([
      { day: 0, kg: 80 },
      { day: 7, kg: 81 },
    ]);
    expect(week?.trendKg).toBeCloseTo(80 + (1 - 0.9 ** 7), 12);
  });

  it('puts days in order, drops what is no weight, and stays between the extremes', () => {
    const odd = smoothWeights([
      { day: 7, kg: 81 },
      { day: 0, kg: 80 },
      { day: 3, kg: NaN },
      { day: 4, kg: -1 },
    ]);
    expect(odd.map(({ day }) => day)).toEqual([0, 7]);
    const readings = fc.array(
      fc.record({ day: fc.integer({ min: 0, max: 700 }), kg: fc.double({ min: 40, max: 150, noNaN: true }) }),
      { minLength: 1 },
    );
    fc.assert(
      fc.property(readings, (list) => {
        const all = list.map(({ kg }) => kg);
        for (const { trendKg } of smoothWeights(list)) {
          expect(trendKg).toBeGreaterThanOrEqual(Math.min(...all) - 1e-9);
          expect(trendKg).toBeLessThanOrEqual(Math.max(...all) + 1e-9);
        }
      }),
    );
  });
});

describe('body fat by the tape', () => {
  const man = { sex: 'male', heightCm: 177.8, neckCm: 40.64, waistCm: 91.44 } as const;
  const woman = { sex: 'female', heightCm: 165, neckCm: 33, waistCm: 74, hipCm: 100 } as const;

  it(
    outside('36, 16 and 70 in: 19.43, where a public page misprints 19.41', 'NHRC TD 99-2B', 'published'),
    () => {
      expect(tapeBodyFatInches(man)).toBeCloseTo(19.43, 2);
      expect(tapeBodyFat(man)).toBeCloseTo(19.32, 2);
    },
  );

  it(
    outside(
      'both forms lie within the error of each other for a woman',
      'NHRC 84-29 and TD 99-2B',
      'derived',
    ),
    () => {
      const gap = (tapeBodyFat(woman) ?? NaN) - (tapeBodyFatInches(woman) ?? NaN);
      expect(Math.abs(gap)).toBeLessThan(1);
    },
  );

  it(outside('errors 3.5 and 3.7', 'Hodgdon and Beckett 1984', 'published'), () => {
    const { male, female } = body.bodyfat.navy_1984_metric.R_SEE;
    expect(Number(male.split(', ')[1])).toBeCloseTo(TAPE_ERROR.male, 1);
    expect(Number(female.split(', ')[1])).toBeCloseTo(TAPE_ERROR.female, 1);
  });

  it('comes as a range', () => {
    const answer = bodyFatRange(man, 40, false);
    expect(answer.sentence).toBe('About 19 per cent, and two times in three between 16 and 23.');
    expect(bodyFatRange(woman, 40, false).ok).toBe(true);
  });

  it.each([
    ['in pregnancy', woman, 30, true, 'pregnancy'],
    ['at 17', man, 17, false, 'age-outside'],
    ['without hips', { ...woman, hipCm: undefined }, 30, false, 'nonsense'],
    ['with a neck past the waist', { ...man, neckCm: 95 }, 30, false, 'nonsense'],
    ['with no neck', { ...man, neckCm: 0 }, 30, false, 'nonsense'],
    ['on a body of 80 cm', { ...man, heightCm: 80 }, 30, false, 'nonsense'],
    ['with a waist of 4 m', { ...man, waistCm: 400 }, 30, false, 'nonsense'],
    ['with no number', { ...man, waistCm: NaN }, 30, false, 'nonsense'],
  ])('is not told %s', (_, tape, age, pregnant, reason) => {
    const answer = bodyFatRange(tape, age, pregnant);
    expect(answer.ok ? 'ok' : answer.reason).toBe(reason);
    if (reason === 'nonsense') expect(tapeBodyFatInches(tape)).toBeNull();
  });
});

describe('fit to the body and the house', () => {
  it.each([
    [fitStep(305).suits, true],
    [fitStep(294).suits, false],
    [fitStep(316).suits, false],
    [fitStep(null).suits, null],
    [fitChair(1720, 430).suits, true],
    [fitChair(1720, 399).suits, false],
    [fitChair(1720, 461).suits, false],
    [fitChair(1720, NaN).suits, null],
    [fitMat(1720, 1720, 600).suits, true],
    [fitMat(1720, 1719, 600).suits, false],
    [fitMat(1720, 1800, 599).suits, false],
    [fitMat(1720, null, 599).suits, false],
    [fitMat(1720, 1800, null).suits, null],
    [fitBar(1720, 2000).suits, true],
    [fitBar(1720, 1719).suits, false],
    [fitBar(1720, 2500).suits, false],
    [fitHands().suits, null],
  ])('case %#: %s is %s', (given, expected) => {
    expect(given).toBe(expected);
  });

  it('says the heights and always how it should feel', () => {
    expect(fitChair(1720, null).sentence).toContain('between 40 cm and 46 cm');
    for (const fit of [
      fitStep(null),
      fitHands(),
      fitChair(1720, null),
      fitMat(1720, null, null),
      fitBar(1720, null),
    ]) {
      expect(fit.feltCheck).toMatch(/\.$/);
      expect(fit.source).not.toBe('');
    }
  });
});
