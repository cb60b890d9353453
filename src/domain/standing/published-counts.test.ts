import { byName, outside, type OutsideFlag } from '#support/outside';
import { ageIn, PEOPLE, placed, SEXES, type Edge } from '#support/standing';
import { describe, expect, it } from 'vitest';
import chair from '../../../tests/published/chair-stand-30s.json' with { type: 'json' };
import curlUps from '../../../tests/published/partial-curlup-csep.json' with { type: 'json' };
import pushUps from '../../../tests/published/pushup-csep.json' with { type: 'json' };
import type { Sex, StandingQuery } from './types.ts';

const place = (query: Omit<StandingQuery, 'sex' | 'ageYears'>, sex: Sex, ageYears: number) =>
  placed({ ...query, sex, ageYears });

describe('push-ups to failure', () => {
  const words = ['needs improvement', 'fair', 'good', 'very good', 'excellent'];
  const keys = ['fair_min', 'good_min', 'very_good_min', 'excellent_min'] as const;
  const edges = SEXES.flatMap((sex) =>
    Object.entries(pushUps.table[sex]).flatMap(([band, row]) =>
      keys.map((key, i): Edge => {
        const isRead =
          (sex === 'male' && ['15-19', '20-29'].includes(band)) ||
          key === 'good_min' ||
          key === 'excellent_min';
        const name = outside(
          `${PEOPLE[sex]} ${band}: ${row[key]} is ${words[i + 1] ?? ''}`,
          'CSEP 2003',
          isRead ? 'published' : 'memory',
        );
        return { name, sex, band, cut: row[key], word: words[i + 1] ?? '', before: words[i] ?? '' };
      }),
    ),
  );
  it.each(byName(edges))('%s', (_, { sex, band, cut, word, before }) => {
    const form = sex === 'male' ? 'floor' : 'knees';
    const at = (value: number) => place({ test: 'push-ups', form, value }, sex, ageIn(band)).category?.word;
    expect(at(cut)).toBe(word);
    expect(at(cut - 1)).toBe(before);
  });
});

describe('curl-ups', () => {
  const words = ['needs improvement', 'fair', 'good', 'very good', 'excellent'];
  const edges = SEXES.flatMap((sex) =>
    Object.entries(curlUps.table[sex]).flatMap(([band, mins]) =>
      mins.toReversed().map((cut, i): Edge => ({
        name: outside(
          `${PEOPLE[sex]} ${band}: ${cut} is ${words[i + 1] ?? ''}`,
          'CSEP 2003 in ACSM',
          'memory',
        ),
        sex,
        band,
        cut,
        word: words[i + 1] ?? '',
        before: words[i] ?? '',
      })),
    ),
  );
  it.each(byName(edges))('%s', (_, { sex, band, cut, word, before }) => {
    const at = (value: number) => place({ test: 'curl-up', value }, sex, ageIn(band)).category?.word;
    expect(at(cut)).toBe(word);
    expect(at(cut - 1)).toBe(before);
  });
});

describe('chair stand', () => {
  const rows = SEXES.flatMap((sex) =>
    Object.entries(chair.table).map(([band, row]) => {
      const flag: OutsideFlag = band === '60-64' || band === '65-69' ? 'published' : 'memory';
      return {
        name: outside(`${PEOPLE[sex]} ${band}: below average under ${row[sex]}`, 'CDC STEADI', flag),
        sex,
        band,
        least: row[sex],
      };
    }),
  );
  it.each(byName(rows))('%s', (_, { sex, band, least }) => {
    const at = (value: number) => place({ test: 'chair-stand', value }, sex, ageIn(band)).category?.word;
    expect(at(least - 1)).toBe('below average');
    expect(at(least)).toMatch(/^average/);
  });

  const ranges = SEXES.flatMap((sex) =>
    Object.entries(chair.average_range_retrieved).map(([band, row]) => ({
      name: outside(
        `${PEOPLE[sex]} ${band}: average to ${row[sex][1] ?? 0}`,
        'Rikli and Jones 1999, secondary copy',
        'published',
      ),
      sex,
      band,
      most: row[sex][1] ?? NaN,
    })),
  );
  it.each(byName(ranges))('%s', (_, { sex, band, most }) => {
    const at = (value: number) => place({ test: 'chair-stand', value }, sex, ageIn(band)).category?.word;
    expect(at(most)).toBe('average');
    expect(at(most + 1)).toBe('above average');
  });
});
