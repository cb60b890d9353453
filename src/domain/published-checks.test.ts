import { byName, outside, type OutsideFlag } from '#support/outside';
import { describe, expect, it } from 'vitest';
import checks from '../../tests/published/checks.json' with { type: 'json' };
import {
  cooperRunVo2max,
  mileAndHalfVo2max,
  POUNDS_PER_KG,
  riegelSeconds,
  rockportVo2max,
} from './aerobic/field-tests.ts';
import {
  ACSM_METRES_PER_MINUTE_PER_MPH,
  metsOf,
  runningVo2,
  steppingVo2,
  steppingVo2Latin,
} from './aerobic/oxygen-cost.ts';
import { harvardIndex, harvardIndexShort, queensCollegeVo2max } from './aerobic/step-tests.ts';
import { bodyMassIndex, CM_PER_INCH, KG_PER_POUND } from './body/body-mass-index.ts';
import { smoothDailyWeights } from './body/smoothed-weight.ts';
import { tapeBodyFat, tapeBodyFatInches } from './body/tape-body-fat.ts';
import { waistToHeight } from './body/waist-to-height.ts';
import { formatDuration } from './numbers/format.ts';
import { MAXIMUM_PULSE_FORMULAS, maximumPulse } from './pulse/maximum-pulse.ts';
import { intensityOf, reservePulse } from './pulse/zones.ts';
import { climbHeightM, kcalPerStep, stairPowerWatts } from './stairs/climb.ts';
import { readFourFlights } from './stairs/four-flights.ts';
import {
  airForceLine2010,
  airForceRunPoints2022,
  navyLevel,
  pennsylvaniaLine,
} from './standing/elsewhere.ts';
import { ordinal } from './standing/speech.ts';
import { standingOf } from './standing/standing-of.ts';
import type { Standing, StandingQuery } from './standing/types.ts';

const word = (query: StandingQuery): string | undefined => {
  const standing: Standing = standingOf(query);
  return standing.kind === 'placed' ? standing.category?.word : standing.sentence;
};
const percentile = (query: StandingQuery): string => {
  const standing = standingOf(query);
  if (standing.kind !== 'placed' || !standing.percentile || !('value' in standing.percentile))
    return standing.sentence;
  return ordinal(standing.percentile.value);
};
const man = (ageYears: number) => ({ sex: 'male', ageYears }) as const;
const waist = (waistCm: number, heightCm: number) => {
  const answer = waistToHeight({ waistCm, heightCm, massKg: null, pregnant: false, ageYears: 40 });
  return answer.ok ? answer.ratio : answer.sentence;
};

/** What the product's code answers to each check's inputs; the inputs stand in the file and are written out here. */
const ANSWERS: Record<string, () => unknown> = {
  'step-qc-m': () => queensCollegeVo2max(144, 'male'),
  'step-qc-f': () => queensCollegeVo2max(144, 'female'),
  'harvard-long': () => harvardIndex(300, [90, 80, 70]),
  'harvard-short': () => harvardIndexShort(300, 90),
  'acsm-step-12in': () => steppingVo2(30, 0.3048),
  'acsm-step-ymca': () => steppingVo2(24, 0.3048),
  'acsm-step-latin': () => steppingVo2Latin(20, 0.2),
  'stairs-power': () => stairPowerWatts(54, 3, 5),
  'stairs-height': () => climbHeightM(180, 150),
  'stairs-mets': () => metsOf(33.5),
  'stairs-kcal-step': () => 19.7 / (climbHeightM(180, 150) / 0.15),
  'stairs-bassett': () => kcalPerStep(8.6, 70, 70),
  'cooper-2400': () => cooperRunVo2max(2400),
  'run15-12': () => mileAndHalfVo2max(720),
  'rockport-f57': () =>
    rockportVo2max({
      massKg: 123 / POUNDS_PER_KG,
      ageYears: 57,
      sex: 'female',
      endPulse: 112,
      seconds: 1080,
    }),
  'riegel-mar': () => riegelSeconds(2730, 10_000, 42_195),
  'acsm-run': () => runningVo2(6 * ACSM_METRES_PER_MINUTE_PER_MPH, 0),
  'tanaka-40': () => maximumPulse(40),
  'gellish-40': () =>
    maximumPulse(
      40,
      MAXIMUM_PULSE_FORMULAS.find(({ id }) => id === 'gellish'),
    ),
  'karvonen-27': () => reservePulse(70, 193, 0.7),
  'hr-band': () => intensityOf(45),
  'hr-band-edge': () => [39, 40, 59, 60, 89, 90].map(intensityOf),
  'bmi-usa': () => bodyMassIndex(159 * KG_PER_POUND, 70 * CM_PER_INCH),
  'whtr-f-ok': () => waist(74, 163),
  'whtr-m': () => waist(91, 178),
  'bf-dod-m': () => tapeBodyFatInches({ sex: 'male', heightCm: 177.8, neckCm: 40.64, waistCm: 91.44 }),
  'bf-navy-m': () => tapeBodyFat({ sex: 'male', heightCm: 177.8, neckCm: 40.64, waistCm: 91.44 }),
  'hd-pencil': () => smoothDailyWeights([172.5, 171.5, 172, 171.5], 173.6, { pencil: true }),
  'csep-m35-30': () => word({ ...man(35), test: 'push-ups', value: 30 }),
  'csep-m25-28': () =>
    [16, 17, 21, 22, 28, 29, 35, 36].map((value) => word({ ...man(25), test: 'push-ups', value })),
  'cooper-situp-m30': () => `${percentile({ ...man(33), test: 'sit-ups', value: 32 })} percentile`,
  'pushup-m34': () =>
    [25, 27].map((value) =>
      percentile({ ...man(34), test: 'push-ups', value, detail: { protocol: 'one-minute' } }),
    ),
  'pa-pass': () => [
    pennsylvaniaLine('sit-ups', 'female', 55),
    pennsylvaniaLine('push-ups', 'female', 55),
    formatDuration(pennsylvaniaLine('run-1-5-mile', 'female', 55) ?? NaN),
  ],
  'usaf-run': () => airForceRunPoints2022(12 * 60 + 20, 'male', 24),
  'usaf-push': () => airForceLine2010('push-ups', 44, 'male', 25)?.points,
  'navy-mean': () => navyLevel([85, 65, 55])?.mean,
};

/** The reference's words for how a value is known, in the four flags of the product. */
function flagOf(flag: string): OutsideFlag {
  if (flag.startsWith('memory')) return 'memory';
  if (/constructed|recomputed|computed/u.test(flag)) return 'derived';
  return 'published';
}

const mine = checks.flatMap((check) => {
  const answer = ANSWERS[check.id];
  return answer
    ? [{ ...check, answer, name: outside(`${check.id}: ${check.topic}`, check.source, flagOf(check.flag)) }]
    : [];
});

describe('checks of the reference on standing, stairs, breath, pulse and body', () => {
  it.each(byName(mine))('%s', (_, { answer, expected, tolerance }) => {
    const given = answer();
    if (typeof expected !== 'number') return expect(given).toEqual(expected);
    expect(given).toBeTypeOf('number');
    expect(Math.abs(Number(given) - expected)).toBeLessThanOrEqual(tolerance);
  });

  it('runs every answer above', () => {
    expect(mine).toHaveLength(Object.keys(ANSWERS).length);
  });

  it(outside('stairs-60s: four flights in 58 s', 'ESC EACVI 2020 abstract 226872', 'published'), () => {
    const expected = checks.find(({ id }) => id === 'stairs-60s')?.expected;
    const read = readFourFlights(60, 58);
    expect(
      `${read?.band}: consistent with >=${read?.mets} METs in that clinic sample (PPV ${read?.predictiveValue} only)`,
    ).toBe(expected);
    expect(read?.sentence).toContain('59 in 100');
  });

  it(outside('chair: man of 67, 11 stands', 'CDC STEADI', 'published'), () => {
    const standing = standingOf({ ...man(67), test: 'chair-stand', value: 11 });
    if (standing.kind !== 'placed') throw new Error(standing.sentence);
    const expected = checks.find(({ id }) => id === 'chair')?.expected;
    expect(`${standing.category?.word} (<${standing.neighbours.up?.cut})`).toBe(expected);
  });
});
