import { outside } from '#support/outside';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import heart from '../../../tests/published/heart-rate.json' with { type: 'json' };
import { MAXIMUM_PULSE_ERROR, MAXIMUM_PULSE_FORMULAS, maximumPulse } from './maximum-pulse.ts';
import { INTENSITIES, intensityOf, pulseZones, reservePulse, type ZoneQuery } from './zones.ts';

describe('the highest pulse', () => {
  it.each([
    [20, 194],
    [60, 166],
    [80, 152],
  ])(outside('age %d: %d beats', 'Tanaka 2001', 'derived'), (age, beats) => {
    expect(maximumPulse(age)).toBeCloseTo(beats, 9);
  });

  it(
    outside('unrounded line at 50: 173.4 beats', 'Gellish as a stroke programme prints it', 'derived'),
    () => {
      expect(maximumPulse(50, MAXIMUM_PULSE_FORMULAS[2])).toBeCloseTo(173.4, 9);
    },
  );

  it(outside('three lines as printed', 'Tanaka 2001, Gellish 2007', 'published'), () => {
    const printed = heart.hrmax.map(({ name, formula }) => (formula ?? name).replaceAll(' ', ''));
    for (const { start, perYear } of MAXIMUM_PULSE_FORMULAS)
      expect(printed).toContain(`${start}-${perYear}*age`);
  });

  it(outside('the error told lies inside 7 to 12 beats', 'review in heart-rate.json', 'published'), () => {
    expect(heart.error).toContain('10-12');
    expect(MAXIMUM_PULSE_ERROR).toBeGreaterThanOrEqual(7);
    expect(MAXIMUM_PULSE_ERROR).toBeLessThanOrEqual(12);
  });

  it.each([17.9, 0, 130, NaN, -5])('is not told at the age of %d', (age) => {
    expect(maximumPulse(age)).toBeNull();
  });
});

describe('intensity by reserve', () => {
  const bands = heart.intensity_acsm_2011;
  it.each([
    ['light', bands.light.HRR],
    ['moderate', bands.moderate.HRR],
    ['vigorous', bands.vigorous.HRR],
  ] as const)(
    outside('%s holds both printed ends', 'Garber 2011 via BJSM', 'published'),
    (name, [from = NaN, to = NaN]) => {
      expect(intensityOf(from)).toBe(name);
      expect(intensityOf(to)).toBe(name);
      expect(intensityOf(from - 0.1)).not.toBe(name);
      expect(intensityOf(to + 1)).not.toBe(name);
    },
  );

  it.each([
    ['light', bands.light.RPE],
    ['moderate', bands.moderate.RPE],
    ['vigorous', bands.vigorous.RPE],
  ] as const)(outside('%s carries its effort', 'Garber 2011 via BJSM', 'published'), (name, [from, to]) => {
    expect(INTENSITIES.find((intensity) => intensity.name === name)?.borg).toBe(`${from} to ${to}`);
  });

  it(outside('near-maximal from 90', 'Garber 2011 via BJSM', 'published'), () => {
    expect(intensityOf(bands.near_maximal.HRR_min)).toBe('near-maximal');
    expect(intensityOf(120)).toBe('near-maximal');
  });

  it('knows very light, and no class for nonsense', () => {
    expect(intensityOf(29.9)).toBe('very light');
    expect(intensityOf(0)).toBe('very light');
    expect(intensityOf(-1)).toBeNull();
    expect(intensityOf(NaN)).toBeNull();
  });

  it(outside('200 at most, 60 at rest, 60 per cent: 144', 'Karvonen, secondary copy', 'published'), () => {
    expect(reservePulse(60, 200, 0.6)).toBeCloseTo(144, 9);
  });
});

describe('zones', () => {
  const person: ZoneQuery = { ageYears: 40, restingPulse: 60, pulseMedicine: false, pregnant: false };

  it('are three ranges that touch and do not overlap', () => {
    const answer = pulseZones(person);
    if (answer.kind !== 'zones') throw new Error(answer.sentence);
    expect(answer.zones.map(({ name, from, to }) => [name, from, to])).toEqual([
      ['light', 96, 107],
      ['moderate', 108, 131],
      ['vigorous', 132, 167],
    ]);
    expect(answer.sentence).toContain('ceiling of 180');
    expect(answer.sentence).toContain('10 beats off');
  });

  it.each<[string, Partial<ZoneQuery>, string, RegExp]>([
    ['with a medicine', { pulseMedicine: true }, 'medicines', /medicine.*talk/],
    ['in pregnancy', { pregnant: true }, 'pregnancy', /pregnancy.*talk/],
    ['without an age', { ageYears: null }, 'age-missing', /go by age/],
    ['without a pulse at rest', { restingPulse: null }, 'resting-pulse-missing', /pulse at rest/],
    ['at 17', { ageYears: 17 }, 'nonsense', /Check both/],
    ['at 130', { ageYears: 130 }, 'nonsense', /Check both/],
    ['with a pulse of 29', { restingPulse: 29 }, 'nonsense', /Check both/],
    ['with a pulse of 121', { restingPulse: 121 }, 'nonsense', /Check both/],
    ['with a pulse near the ceiling', { ageYears: 105, restingPulse: 115 }, 'nonsense', /Check both/],
    ['with no number', { restingPulse: NaN }, 'nonsense', /Check both/],
  ])('are none %s', (_, change, reason, sentence) => {
    expect(pulseZones({ ...person, ...change })).toMatchObject({ kind: 'no-zones', reason });
    expect(pulseZones({ ...person, ...change }).sentence).toMatch(sentence);
  });

  it('rise from zone to zone whatever the person', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 18, max: 100 }),
        fc.integer({ min: 35, max: 100 }),
        (ageYears, restingPulse) => {
          const answer = pulseZones({ ...person, ageYears, restingPulse });
          if (answer.kind !== 'zones') return;
          answer.zones.forEach((zone, i) => {
            expect(zone.from).toBeGreaterThan(restingPulse);
            expect(zone.to).toBeGreaterThanOrEqual(zone.from);
            expect(zone.to).toBeLessThan(answer.maximum);
            const next = answer.zones[i + 1];
            if (next) expect(next.from).toBe(zone.to + 1);
          });
        },
      ),
    );
  });
});
