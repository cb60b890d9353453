import { byName, outside, type OutsideFlag } from '#support/outside';
import { ageIn, PEOPLE, placed, SEXES } from '#support/standing';
import { describe, expect, it } from 'vitest';
import pushUpsMinute from '../../../tests/published/pushup-1min-cooper.json' with { type: 'json' };
import sitUps from '../../../tests/published/situp-1min-cooper.json' with { type: 'json' };
import { COOPER_PERCENTILES, PUSH_UP_CELLS, SIT_UP_CELLS } from './tables/cooper-minute.ts';
import type { Sex, StandingQuery } from './types.ts';

const place = (query: Omit<StandingQuery, 'sex' | 'ageYears'>, sex: Sex, ageYears: number) =>
  placed({ ...query, sex, ageYears });

/** Which cells of the Cooper percentiles were read in a document, as the reference lists them. */
const READ_SIT_UPS: Record<Sex, Record<string, string[]>> = {
  male: {
    '20': ['20-29', '30-39', '40-49', '50-59'],
    '30': ['20-29', '30-39', '40-49', '50-59', '60+'],
    '50': ['20-29', '30-39', '40-49', '50-59'],
  },
  female: { '20': ['20-29', '30-39', '40-49', '50-59'], '30': ['20-29', '30-39', '40-49', '50-59', '60+'] },
};
const READ_PUSH_UPS: Record<Sex, Record<string, string[]>> = {
  male: {
    '30': ['20-29', '30-39', '40-49', '50-59', '60+'],
    '45': ['30-39'],
    '50': ['20-29', '30-39', '40-49', '50-59'],
  },
  female: { '30': ['20-29', '30-39', '40-49'] },
};

/** Every cell of a percentile table; where two cells are equal the higher percentile is expected. */
function percentileCases(
  table: Record<Sex, Record<string, Record<string, number>>>,
  read: Record<Sex, Record<string, string[]>>,
  source: string,
) {
  return SEXES.flatMap((sex) =>
    Object.entries(table[sex]).flatMap(([band, cells]) =>
      Object.entries(cells).map(([percentile, count]) => {
        const expected = Math.max(
          ...Object.entries(cells).flatMap(([p, c]) => (c === count ? [Number(p)] : [])),
        );
        const flag: OutsideFlag = read[sex][expected]?.includes(band) ? 'published' : 'memory';
        return {
          name: outside(`${PEOPLE[sex]} ${band}: ${count}, cell of the ${percentile}th`, source, flag),
          sex,
          band,
          count,
          expected,
          flag,
        };
      }),
    ),
  );
}

describe('sit-ups in one minute', () => {
  it.each(byName(percentileCases(sitUps.table, READ_SIT_UPS, 'Cooper Institute 2007')))(
    '%s',
    (_, { sex, band, count, expected, flag }) => {
      const standing = place({ test: 'sit-ups', form: 'feet held', value: count }, sex, ageIn(band));
      expect(standing.percentile).toEqual({ value: expected });
      expect(standing.flag).toBe(flag);
    },
  );
});

describe('push-ups in one minute', () => {
  const minute = { test: 'push-ups', detail: { protocol: 'one-minute' } } as const;
  const whole = percentileCases(pushUpsMinute.table, READ_PUSH_UPS, 'Cooper Institute 2007');
  it.each(byName(whole.filter(({ count }) => Number.isInteger(count))))(
    '%s',
    (_, { sex, band, count, expected, flag }) => {
      const standing = place({ ...minute, form: 'floor', value: count }, sex, ageIn(band));
      expect(standing.percentile).toEqual({ value: expected });
      expect(standing.flag).toBe(flag);
    },
  );

  const medians = Object.entries(pushUpsMinute.modified_knee_pushup_female_50th).flatMap(([band, median]) =>
    typeof median === 'number'
      ? [
          {
            band,
            median,
            name: outside(
              `woman ${band} on the knees: ${median}`,
              'Cooper Institute, 50th, secondary copy',
              'published',
            ),
          },
        ]
      : [],
  );
  it.each(byName(medians))('%s', (_, { band, median }) => {
    const at = (value: number) =>
      place({ ...minute, form: 'knees', value }, 'female', ageIn(band)).percentile;
    expect(at(median)).toEqual({ value: 50 });
    expect(at(median - 1)).toEqual({ below: 50 });
    expect(at(median + 1)).toEqual({ above: 50 });
  });
});

// A cell that a straight line between its neighbours would give too is only caught here.
describe('the tables as they are written down', () => {
  it.each([
    ['sit-ups', SIT_UP_CELLS, sitUps.table],
    ['push-ups', PUSH_UP_CELLS, pushUpsMinute.table],
  ] as const)('%s: every row equals the reference', (_, ours, published) => {
    for (const sex of SEXES) {
      const rows: Record<string, Record<string, number>> = published[sex];
      const expected = Object.entries(rows).map(([band, row]) => [
        band,
        COOPER_PERCENTILES.map((p) => row[p]),
      ]);
      expect(Object.entries(ours[sex])).toEqual(expected);
    }
  });

  it('ticks a few percentiles of the chart and not the whole table', () => {
    const { bands } = placed({ test: 'sit-ups', value: 30, sex: 'male', ageYears: 35 });
    expect(bands).toEqual(
      [
        [10, 26],
        [20, 30],
        [25, 31],
        [30, 32],
        [50, 36],
        [70, 41],
        [75, 42],
        [90, 48],
      ].map(([percentile, value]) => ({ word: `${percentile}th`, value })),
    );
  });
});
