import { outside } from '#support/outside';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  cooperRunDistance,
  cooperRunVo2max,
  mileAndHalfSeconds,
  mileAndHalfVo2max,
  MILE_M,
  riegelSeconds,
  rockportSeconds,
  rockportVo2max,
  rockportVo2maxLitres,
} from './field-tests.ts';
import { kcalPerMinute, runningVo2, steppingVo2, steppingVo2Latin, walkingVo2 } from './oxygen-cost.ts';
import { harvardIndex, harvardIndexShort, harvardWord, queensCollegeVo2max } from './step-tests.ts';

describe('runs and the walk', () => {
  it.each([
    [2400, 42.4],
    [2800, 51.3],
  ])(outside('%d m in twelve minutes is %d mL/kg/min', 'Cooper 1968', 'published'), (metres, vo2max) => {
    expect(cooperRunVo2max(metres)).toBeCloseTo(vo2max, 1);
  });

  it(
    outside('the form in miles, 35.97 miles − 11.29, agrees within 0.05', 'Cooper 1968', 'published'),
    () => {
      for (const miles of [1, 1.5, 2]) {
        expect(Math.abs(cooperRunVo2max(miles * MILE_M) - (35.97 * miles - 11.29))).toBeLessThan(0.05);
      }
    },
  );

  it(outside('10 km in 45:30 is 3:29:19 over a marathon, not 3:25:23', 'Riegel 1981', 'published'), () => {
    expect(Math.round(riegelSeconds(2730, 10_000, 42_195) ?? NaN)).toBe(3 * 3600 + 29 * 60 + 19);
  });

  it('keeps Riegel inside 3.5 to 230 minutes on both sides', () => {
    expect(riegelSeconds(209, 1000, 2000)).toBeNull();
    expect(riegelSeconds(2730, 10_000, 500)).toBeNull();
    expect(riegelSeconds(10_000, 42_195, 100_000)).toBeNull();
    expect(riegelSeconds(NaN, 10_000, 42_195)).toBeNull();
    expect(riegelSeconds(600, 2000, 2000)).toBe(600);
  });

  it(
    outside(
      'woman of 57, 123 lb, 18:00, pulse 112: 25.0; absolute form the same within its error',
      'Kline 1987',
      'published',
    ),
    () => {
      const walk = {
        massKg: 123 * 0.45359237,
        ageYears: 57,
        sex: 'female',
        endPulse: 112,
        seconds: 1080,
      } as const;
      expect(rockportVo2max(walk)).toBeCloseTo(25.0, 1);
      const perKg = ((rockportVo2maxLitres(walk) ?? NaN) * 1000) / walk.massKg;
      expect(Math.abs(perKg - 25)).toBeLessThan(5);
    },
  );

  it(
    outside('a man stands 6.315 above a woman, 0.5955 L/min in the absolute form', 'Kline 1987', 'published'),
    () => {
      const walk = { massKg: 70, ageYears: 45, endPulse: 120, seconds: 900 };
      const gap = (f: typeof rockportVo2max) =>
        (f({ ...walk, sex: 'male' }) ?? NaN) - (f({ ...walk, sex: 'female' }) ?? NaN);
      expect(gap(rockportVo2max)).toBeCloseTo(6.315, 9);
      expect(gap(rockportVo2maxLitres)).toBeCloseTo(0.5955, 9);
    },
  );

  it.each(['massKg', 'ageYears', 'endPulse', 'seconds'] as const)(
    'answers null to a walk whose %s is no number',
    (key) => {
      const walk = { massKg: 70, ageYears: 45, sex: 'male', endPulse: 120, seconds: 900 } as const;
      for (const value of [NaN, 0, -1, Infinity]) {
        expect(rockportVo2max({ ...walk, [key]: value })).toBeNull();
        expect(rockportVo2maxLitres({ ...walk, [key]: value })).toBeNull();
      }
    },
  );

  it('turns each line round again', () => {
    const walker = { massKg: 70, ageYears: 45, sex: 'female', endPulse: 120 } as const;
    fc.assert(
      fc.property(fc.double({ min: 10, max: 80, noNaN: true }), (vo2max) => {
        expect(cooperRunVo2max(cooperRunDistance(vo2max))).toBeCloseTo(vo2max, 9);
        expect(mileAndHalfVo2max(mileAndHalfSeconds(vo2max))).toBeCloseTo(vo2max, 9);
        const seconds = rockportSeconds(walker, vo2max);
        if (seconds > 0) expect(rockportVo2max({ ...walker, seconds })).toBeCloseTo(vo2max, 9);
      }),
    );
  });
});

describe('step tests', () => {
  it.each([
    [120, 'male', 60.93],
    [170, 'male', 39.93],
    [120, 'female', 43.646],
    [170, 'female', 34.411],
  ] as const)(
    outside('pulse %d, %s: %d mL/kg/min', 'Queens College, McArdle 1972', 'derived'),
    (pulse, sex, vo2max) => {
      expect(queensCollegeVo2max(pulse, sex)).toBeCloseTo(vo2max, 3);
    },
  );

  it.each([49, 221, NaN, -1])('answers null to a pulse of %d', (pulse) => {
    expect(queensCollegeVo2max(pulse, 'male')).toBeNull();
  });

  it.each([
    [90, 'excellent'],
    [89.9, 'good'],
    [80, 'good'],
    [79.9, 'high average'],
    [65, 'high average'],
    [64.9, 'low average'],
    [55, 'low average'],
    [54.9, 'poor'],
  ])(outside('Harvard index %d is %s', 'Brouha 1943, secondary copies', 'published'), (index, word) => {
    expect(harvardWord(index)).toBe(word);
  });

  it('answers null to times and counts that cannot be', () => {
    expect(harvardIndex(301, [90, 80, 70])).toBeNull();
    expect(harvardIndex(0, [90, 80, 70])).toBeNull();
    expect(harvardIndex(300, [90, 0, 70])).toBeNull();
    expect(harvardIndex(300, [90, NaN, 70])).toBeNull();
    expect(harvardIndexShort(300, 0)).toBeNull();
    expect(harvardIndexShort(301, 90)).toBeNull();
    expect(harvardIndexShort(0, 90)).toBeNull();
  });
});

describe('oxygen cost', () => {
  it.each([
    [30, 0.3048, 31.4],
    [24, 0.381, 30.2],
  ])(
    outside('stepping %d rounds at %d m: %d mL/kg/min', 'ACSM, secondary copy', 'published'),
    (rounds, height, vo2) => {
      expect(steppingVo2(rounds, height)).toBeCloseTo(vo2, 1);
    },
  );

  it(outside('both forms agree within their standard error of 1.7', 'Latin 2001', 'published'), () => {
    for (const [rounds, height] of [
      [20, 0.1],
      [25, 0.3],
    ] as const) {
      const gap = (steppingVo2(rounds, height) ?? NaN) - (steppingVo2Latin(rounds, height) ?? NaN);
      expect(Math.abs(gap)).toBeLessThan(1.7);
    }
  });

  it.each([
    [11.9, 0.2],
    [30.1, 0.2],
    [20, 0.03],
    [20, 0.41],
    [NaN, 0.2],
  ])('answers null to %d rounds at %d m', (rounds, height) => {
    expect(steppingVo2(rounds, height)).toBeNull();
    expect(steppingVo2Latin(rounds, height)).toBeNull();
  });

  it(
    outside('walking 80 m/min on the level 11.5, up 5 per cent 18.7', 'ACSM walking equation', 'derived'),
    () => {
      expect(walkingVo2(80, 0)).toBeCloseTo(11.5, 9);
      expect(walkingVo2(80, 0.05)).toBeCloseTo(18.7, 9);
    },
  );

  it(outside('running 160 m/min up 5 per cent 42.7', 'ACSM running equation', 'derived'), () => {
    expect(runningVo2(160, 0.05)).toBeCloseTo(42.7, 9);
  });

  it('turns METs into energy: 10 METs of 70 kg are 12.25 kcal a minute', () => {
    expect(kcalPerMinute(10, 70)).toBeCloseTo(12.25, 9);
  });
});
