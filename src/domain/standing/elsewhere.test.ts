import { byName, outside } from '#support/outside';
import { ageIn, placed, SEXES } from '#support/standing';
import { describe, expect, it } from 'vitest';
import police from '../../../tests/published/gov-police-cutoffs.json' with { type: 'json' };
import navy from '../../../tests/published/navy-prt-20-24.json' with { type: 'json' };
import airForce from '../../../tests/published/usaf-afi36-2905-2010.json' with { type: 'json' };
import run2022 from '../../../tests/published/usaf-2022-run-male-under25.json' with { type: 'json' };
import marines from '../../../tests/published/usmc-pft-pullups.json' with { type: 'json' };
import {
  airForceLine2010,
  airForceRunPoints2022,
  airForceSays,
  marinesSay,
  navyLevel,
  pennsylvaniaLine,
} from './elsewhere.ts';
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

  const [pennsylvania] = police.sets;
  const lines = SEXES.flatMap((sex) =>
    (pennsylvania?.ages ?? []).map((band, i) => {
      const row = pennsylvania?.[sex];
      const [minutes = NaN, rest = NaN] = (row?.run_1_5mi[i] ?? '').split(':').map(Number);
      const name = outside(`Pennsylvania, ${sex} ${band}`, 'Pennsylvania MPOETC', 'published');
      return {
        name,
        sex,
        band,
        expected: [row?.situps_1min[i], row?.pushups_1min?.[i], minutes * 60 + rest],
      };
    }),
  );
  it.each(byName(lines))('%s', (_, { sex, band, expected }) => {
    const events = ['sit-ups', 'push-ups', 'run-1-5-mile'] as const;
    expect(events.map((event) => pennsylvaniaLine(event, sex, ageIn(band)))).toEqual(expected);
  });

  const levels = navy.levels.map((level) => {
    const [word, points] = [
      level.slice(0, level.lastIndexOf(' ')).replace('Med', 'Medium'),
      Number(level.split(' ').at(-1)),
    ];
    return {
      name: outside(`${points} points are ${word}`, 'US Navy, point levels', 'published'),
      word,
      points,
    };
  });
  it.each(byName(levels))('%s', (_, { word, points }) => {
    expect(navyLevel([points])?.level).toBe(word);
    expect(navyLevel([points - 0.1])?.level).not.toBe(word);
  });

  it(outside('85, 65 and 55 points: Good Medium', 'US Navy worked example', 'published'), () => {
    expect(navyLevel([85, 65, 55])?.level).toBe('Good Medium');
    expect(navyLevel([20])?.level).toBe('Below the scale');
    for (const nonsense of [[], [NaN], [-1], [101]]) expect(navyLevel(nonsense)).toBeNull();
  });

  const anchors = SEXES.flatMap((sex) =>
    (
      [
        ['push-ups', 'pushups', 'pushup_min', 'pushup_max'],
        ['sit-ups', 'situps', 'situp_min', 'situp_max'],
      ] as const
    ).map(([event, key, min, max]) => {
      const cells: Record<string, number> = airForce[`${sex}_under_30`][key];
      const quarters = Number(Object.entries(cells).find(([, points]) => points === 7.5)?.[0]);
      const ends = airForce.min_and_max_by_age[sex];
      const name = outside(
        `Air Force, ${sex} under 30, ${event}: pass, three quarters, full`,
        'AFI 36-2905, lines read',
        'published',
      );
      return { name, sex, event, cells, pass: ends[min][0] ?? NaN, quarters, full: ends[max][0] ?? NaN };
    }),
  );
  it.each(byName(anchors))('%s', (_, { sex, event, cells, pass, quarters, full }) => {
    const at = (count: number) => airForceLine2010(event, count, sex, 29);
    expect(at(pass - 1)).toBeNull();
    for (const reps of [pass, quarters, full]) expect(at(reps)).toMatchObject({ reps, points: cells[reps] });
    expect(at(quarters - 1)?.reps).toBe(pass);
    expect(at(full - 1)?.reps).toBe(quarters);
    expect(airForceLine2010(event, full, sex, 30)).toBeNull();
    expect(airForceSays(event, pass, sex, 29)).toBe(
      `The US Air Force (2010 to 2021, under 30) called ${pass} in a minute a pass.`,
    );
  });

  it('says from memory where the Marines’ two papers differ', () => {
    expect(marinesSay('male', 45)).not.toContain('memory');
    expect(marinesSay('male', 46)).toContain('memory');
    expect(marinesSay('male', 16)).toBeNull();
    expect(refused({ sex: null, ageYears: 30, test: 'pull-ups', value: 8 }).elsewhere).toEqual([]);
    expect(refused({ sex: 'male', ageYears: 17, test: 'pull-ups', value: 8 }).elsewhere).toEqual([]);
  });
});
