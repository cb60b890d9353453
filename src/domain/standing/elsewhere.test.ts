import { outside } from '#support/outside';
import { placed } from '#support/standing';
import { describe, expect, it } from 'vitest';
import run2022 from '../../../tests/published/usaf-2022-run-male-under25.json' with { type: 'json' };
import marines from '../../../tests/published/usmc-pft-pullups.json' with { type: 'json' };
import { airForceRunPoints2022, marinesSay } from './elsewhere.ts';
import { standingOf } from './standing-of.ts';
import type { StandingQuery } from './types.ts';

function refused(query: StandingQuery) {
  const standing = standingOf(query);
  if (standing.kind !== 'no-number') throw new Error(standing.sentence);
  return standing;
}

describe('scales of other populations', () => {
  const pullUps = marines.ages.map((band, i) => ({
    age: band === '51+' ? 53 : Number(band.slice(0, 2)) + 2,
    full: marines.male_retrieved.max[i] ?? 0,
    pass: marines.male_retrieved.min[i] ?? 0,
  }));
  it.each(pullUps)(
    outside(
      'Marines, man of $age: $pass to pass, $full in full',
      'US Marine Corps 2017, secondary copy',
      'published',
    ),
    ({ age, full, pass }) => {
      const standing = refused({ sex: 'male', ageYears: age, test: 'pull-ups', value: 8 });
      expect(standing.reason).toBe('other-population');
      expect(standing.elsewhere[0]).toContain(`need ${pass} to pass and ${full} for full points`);
      expect(standing.elsewhere[0]?.includes('memory')).toBe(age >= 46);
    },
  );

  const women = marines.ages.map((band, i) => ({
    age: band === '51+' ? 53 : Number(band.slice(0, 2)) + 2,
    full: marines.female.max[i] ?? 0,
    pass: marines.female.min[i] ?? 0,
  }));
  it.each(women)(
    outside('Marines, woman of $age: $pass to pass, $full in full', 'US Marine Corps order', 'memory'),
    ({ age, full, pass }) => {
      expect(marinesSay('female', age)).toContain(
        `need ${pass} to pass and ${full} for full points (from memory)`,
      );
    },
  );

  const rows = run2022.table.map(({ time, points }) => {
    const slowest = time.replace('<=', '').split('-').at(-1) ?? '';
    const [minutes = 0, rest = 0] = slowest.split(':').map(Number);
    return { slowest, seconds: minutes * 60 + rest, points };
  });
  it.each(rows)(
    outside('Air Force, man under 25: $slowest is $points points', 'USAF 2022 chart', 'published'),
    ({ seconds, points }) => {
      expect(airForceRunPoints2022(seconds, 'male', 22)).toBe(points);
      expect(airForceRunPoints2022(seconds + 1, 'male', 22)).toBeLessThan(points);
    },
  );

  it('tells them beside a place and never as one', () => {
    const standing = placed({ sex: 'male', ageYears: 22, test: 'run-1-5-mile', value: 740 });
    expect(standing.elsewhere).toEqual([
      'Pennsylvania asks 13:16 of police candidates of that age and sex.',
      'The US Air Force (2022, men under 25) gives it 53.5 of 60 points.',
    ]);
    expect(airForceRunPoints2022(740, 'female', 22)).toBeNull();
    expect(airForceRunPoints2022(740, 'male', 25)).toBeNull();
    expect(airForceRunPoints2022(1200, 'male', 22)).toBe(0);
  });
});
