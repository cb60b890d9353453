import { byName, outside, type OutsideFlag } from '#support/outside';
import { ageIn, PEOPLE, placed, SEXES, type Edge } from '#support/standing';
import { describe, expect, it } from 'vitest';
import police from '../../../tests/published/gov-police-cutoffs.json' with { type: 'json' };
import stepHome from '../../../tests/published/step-home-canadian.json' with { type: 'json' };
import stepYmca from '../../../tests/published/step-ymca.json' with { type: 'json' };
import vo2maxClasses from '../../../tests/published/vo2max-categories-cooper.json' with { type: 'json' };
import friend from '../../../tests/published/vo2max-friend-2015.json' with { type: 'json' };
import { friendPercentile } from './place-breath.ts';
import { placeOnHomeTable } from './place-pulse.ts';
import type { Sex, StandingQuery } from './types.ts';

const place = (query: Omit<StandingQuery, 'sex' | 'ageYears'>, sex: Sex, ageYears: number) =>
  placed({ ...query, sex, ageYears });

const seconds = (clock: string): number => {
  const [minutes = 0, rest = 0] = clock.split(':').map(Number);
  return minutes * 60 + rest;
};

describe('step test', () => {
  const best = ['excellent', 'good', 'above average', 'average', 'below average', 'poor', 'very poor'];
  const edgesOf = (table: Record<Sex, Record<string, number[]>>, source: string, flag: OutsideFlag) =>
    SEXES.flatMap((sex) =>
      Object.entries(table[sex]).flatMap(([band, cuts]) =>
        cuts.map((cut, i): Edge & { index: number } => ({
          name: outside(`${PEOPLE[sex]} ${band}: ${cut} ends ${best[i] ?? ''}`, source, flag),
          sex,
          band,
          cut,
          word: best[i] ?? '',
          before: best[i + 1] ?? '',
          index: i,
        })),
      ),
    );
  // A band '65+' beside '56-65' begins at 66.
  const age = (band: string) => (band === '65+' ? 70 : ageIn(band));

  it.each(byName(edgesOf(stepYmca.table, 'YMCA manual 2000', 'memory')))(
    '%s',
    (_, { sex, band, cut, word, before }) => {
      const at = (value: number) =>
        place({ test: 'step-test', value, detail: { stepHeightMm: 305 } }, sex, age(band)).category?.word;
      expect(at(cut)).toBe(word);
      expect(at(cut + 1)).toBe(before);
    },
  );

  it.each(byName(edgesOf(stepHome.table, 'home step test, secondary copies', 'published')))(
    '%s',
    (_, { sex, band, cut, word, before, index }) => {
      // Excellent is printed as 'below', every other word as 'up to'.
      const last = index === 0 ? cut - 1 : cut;
      const at = (value: number) => placeOnHomeTable(value, { sex, ageYears: age(band) })?.category?.word;
      expect(at(last)).toBe(word);
      expect(at(last + 1)).toBe(before);
    },
  );
});

describe('VO2max', () => {
  const words = ['very poor', 'poor', 'fair', 'good', 'excellent', 'superior'];
  const classes = SEXES.flatMap((sex) =>
    Object.entries(vo2maxClasses[sex]).flatMap(([band, cuts]) =>
      cuts.map((cut, i): Edge => ({
        name: outside(
          `${PEOPLE[sex]} ${band}: ${cut} mL/kg/min, ${words[i + 1] ?? ''}`,
          'Cooper in Heyward 1998',
          'published',
        ),
        sex,
        band,
        cut,
        word: words[i + 1] ?? '',
        before: words[i] ?? '',
      })),
    ),
  );
  it.each(byName(classes))('%s', (_, { sex, band, cut, word, before }) => {
    const at = (value: number) => place({ test: 'vo2max', value }, sex, ageIn(band)).category?.word;
    const isStrict = word === 'superior';
    expect(at(isStrict ? cut + 0.1 : cut)).toBe(word);
    expect(at(isStrict ? cut : cut - 0.1)).toBe(before);
  });

  const cells = SEXES.flatMap((sex) =>
    Object.entries(friend.table[sex]).flatMap(([percentile, row]) =>
      row.map((vo2max, i) => {
        const band = friend.ages[i] ?? '';
        const flag: OutsideFlag =
          percentile === '50' && ['20-29', '70-79'].includes(band) ? 'published' : 'memory';
        return {
          name: outside(`${PEOPLE[sex]} ${band}: ${vo2max} is the ${percentile}th`, 'FRIEND 2015', flag),
          sex,
          band,
          vo2max,
          percentile: Number(percentile),
          flag,
        };
      }),
    ),
  );
  it.each(byName(cells))('%s', (_, { sex, band, vo2max, percentile, flag }) => {
    expect(friendPercentile(vo2max, { sex, ageYears: ageIn(band) })).toEqual({
      percentile: { value: percentile },
      flag,
    });
  });
});

describe('one and a half miles', () => {
  const run = police.sets.flatMap((set) => {
    const lines: { sex: Sex; percentile: number; times: readonly string[] }[] = [];
    for (const sex of SEXES) {
      const printed = set[sex]?.run_1_5mi;
      if (printed)
        lines.push({ sex, percentile: set.name.startsWith('Pennsylvania') ? 30 : 20, times: printed });
      if (set.p50) lines.push({ sex, percentile: 50, times: set.p50[`${sex}_run_1_5mi`] });
      if (set.p70) lines.push({ sex, percentile: 70, times: set.p70[`${sex}_run_1_5mi`] });
    }
    return lines.flatMap(({ sex, percentile, times }) =>
      times.map((time, i) => {
        const band = set.ages[i] ?? '';
        const flag: OutsideFlag = percentile === 20 ? 'derived' : 'published';
        return {
          name: outside(`${PEOPLE[sex]} ${band}: ${time} is the ${percentile}th`, set.name, flag),
          sex,
          band,
          time,
          percentile,
          flag,
        };
      }),
    );
  });
  it.each(byName(run))('%s', (_, { sex, band, time, percentile, flag }) => {
    const age = band === '18-29' ? 25 : ageIn(band);
    const standing = place({ test: 'run-1-5-mile', value: seconds(time) }, sex, age);
    expect(standing.percentile).toEqual({ value: percentile });
    expect(standing.flag).toBe(flag);
  });
});
