import { outside } from '#support/outside';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import stairs from '../../../tests/published/stairs.json' with { type: 'json' };
import { metsOf } from '../aerobic/oxygen-cost.ts';
import { climbHeightM, figureClimb, kcalPerStep } from './climb.ts';
import { convertSteps, isSameStairs } from './compare.ts';
import { readFourFlights } from './four-flights.ts';

describe('figureClimb', () => {
  it('gives height, speed, watts and oxygen cost of 90 steps of 17.5 cm in three minutes', () => {
    const climb = figureClimb({ steps: 90, stepHeightMm: 175, seconds: 180, massKg: 70 });
    expect(climb?.heightM).toBeCloseTo(15.75, 9);
    expect(climb?.metresPerMinute).toBeCloseTo(5.25, 9);
    expect(climb?.watts).toBeCloseTo(60.09, 2);
    expect(climb?.wattsPerKg).toBeCloseTo(0.858, 3);
    // 0.2 × 30 + 1.33 × 1.8 × 0.175 × 30 + 3.5
    expect(climb?.vo2).toBeCloseTo(22.0685, 4);
    expect(climb?.mets).toBeCloseTo(6.305, 3);
    expect(climb?.kcal).toBeCloseTo(23.17, 2);
  });

  it('leaves the oxygen cost out beyond the range of the equation, and says so', () => {
    for (const steps of [35, 91]) {
      const climb = figureClimb({ steps, stepHeightMm: 175, seconds: 180, massKg: 70 });
      expect([climb?.vo2, climb?.mets, climb?.kcal]).toEqual([null, null, null]);
      expect(climb?.sentence).toContain('12 to 30');
    }
    for (const steps of [36, 90]) {
      expect(figureClimb({ steps, stepHeightMm: 175, seconds: 180 })?.vo2).not.toBeNull();
    }
  });

  it.each([undefined, null, 0, -70, 900])('knows no watts for a body of %s kg', (massKg) => {
    const climb = figureClimb({ steps: 90, stepHeightMm: 175, seconds: 180, massKg });
    expect([climb?.watts, climb?.kcal]).toEqual([null, null]);
    expect(climb?.wattsPerKg).toBeGreaterThan(0);
  });

  it.each([
    { steps: NaN, stepHeightMm: 175, seconds: 180 },
    { steps: Infinity, stepHeightMm: 175, seconds: 180 },
    { steps: -1, stepHeightMm: 175, seconds: 180 },
    { steps: 90, stepHeightMm: 79, seconds: 180 },
    { steps: 90, stepHeightMm: 301, seconds: 180 },
    { steps: 90, stepHeightMm: 175, seconds: 0 },
    { steps: 90, stepHeightMm: 175, seconds: NaN },
  ])('answers null to %o', (climb) => {
    expect(figureClimb(climb)).toBeNull();
  });

  it(
    outside('six steps of 17.5 cm are 1.05 m', 'stair power of older adults, men of 75', 'published'),
    () => {
      expect(stairs.items.some(({ name }) => name.includes('6 x 17.5 cm = 1.05 m'))).toBe(true);
      expect(climbHeightM(6, 175)).toBeCloseTo(1.05, 12);
    },
  );

  it(outside('descent of 17.0 mL/kg/min is 4.9 METs', 'Teh and Aziz, MSSE 2002;34:695', 'published'), () => {
    expect(metsOf(17.0)).toBeCloseTo(4.9, 1);
  });

  it(
    outside(
      'down at 2.9 METs, 70 kg, 70 steps a minute: 0.05 kcal a step',
      'Bassett, MSSE 1997;29:1250',
      'published',
    ),
    () => {
      expect(kcalPerStep(2.9, 70, 70)).toBeCloseTo(0.05, 2);
    },
  );
});

describe('other stairs', () => {
  const here = { stepHeightMm: 175, stairCount: 13 };

  it('compares as it is on the same stairs, 3 mm forgiven', () => {
    expect(isSameStairs(here, { stepHeightMm: 178, stairCount: 13 })).toBe(true);
    expect(isSameStairs(here, { stepHeightMm: 179, stairCount: 13 })).toBe(false);
    expect(isSameStairs(here, { stepHeightMm: 175, stairCount: 14 })).toBe(false);
    expect(convertSteps(90, here, here)).toMatchObject({ steps: 90, isConverted: false });
  });

  it('converts by height otherwise, and says so', () => {
    const conversion = convertSteps(90, here, { stepHeightMm: 150, stairCount: 16 });
    expect(conversion?.steps).toBeCloseTo(105, 9);
    expect(conversion?.sentence).toBe(
      'Other stairs: 90 there climb as high as 105 here. Height is all that compares.',
    );
  });

  it('answers null to nonsense', () => {
    expect(convertSteps(NaN, here, here)).toBeNull();
    expect(convertSteps(-1, here, here)).toBeNull();
    expect(convertSteps(Infinity, here, here)).toBeNull();
    expect(convertSteps(90, here, { stepHeightMm: 0, stairCount: 13 })).toBeNull();
  });

  it('keeps the height there and back again', () => {
    const heights = fc.integer({ min: 80, max: 300 });
    fc.assert(
      fc.property(heights, heights, fc.integer({ min: 0, max: 400 }), (a, b, steps) => {
        const [from, to] = [
          { stepHeightMm: a, stairCount: 13 },
          { stepHeightMm: b, stairCount: 15 },
        ];
        const there = convertSteps(steps, from, to);
        expect(climbHeightM(there?.steps ?? NaN, b)).toBeCloseTo(climbHeightM(steps, a), 9);
        expect(convertSteps(there?.steps ?? NaN, to, from)?.steps).toBeCloseTo(steps, 9);
      }),
    );
  });
});

describe('four flights', () => {
  const published = stairs.items.find(({ name }) => name.startsWith('Four flights'))?.results;

  it(
    outside('60 s and 90 s cuts carry their predictive values', 'EACVI 2020 abstract 226872', 'published'),
    () => {
      if (!published || !('cut_60s' in published) || !published.cut_60s || !published.cut_90s)
        throw new Error('No cuts');
      expect(readFourFlights(60, 59.9)).toMatchObject({
        band: 'under 60 s',
        predictiveValue: published.cut_60s.ppv,
        mets: 10,
      });
      expect(readFourFlights(60, 90)).toMatchObject({
        band: '90 s and over',
        predictiveValue: published.cut_90s.ppv,
        mets: 8,
      });
    },
  );

  it('says nothing firm in between, and keeps the weak side in the sentence', () => {
    expect(readFourFlights(60, 60)).toMatchObject({ band: '60 to 90 s', predictiveValue: null, mets: null });
    expect(readFourFlights(60, 89)).toMatchObject({ band: '60 to 90 s' });
    expect(readFourFlights(60, 50)?.sentence).toContain('41 did not');
    expect(readFourFlights(60, 120)?.sentence).toContain('tell your doctor');
  });

  it.each([
    [59, 50],
    [60, 9],
    [60, NaN],
    [60, 4000],
  ])('answers null to %d steps in %d s', (steps, seconds) => {
    expect(readFourFlights(steps, seconds)).toBeNull();
  });
});
