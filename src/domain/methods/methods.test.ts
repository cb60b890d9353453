import { describe, expect, it } from 'vitest';
import { TEST_IDS } from '../benchmark/tests.ts';
import { FLAG_SENTENCES, methodOf, METHODS } from './index.ts';
import { standingOf } from '../standing/standing-of.ts';
import { weakestFlag } from './flags.ts';

describe('the methods', () => {
  it('have each their own address', () => {
    const slugs = METHODS.map(({ slug }) => slug);
    expect(new Set(slugs).size).toBe(slugs.length);
    for (const slug of slugs) expect(slug).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/);
    expect(methodOf('csep-push-ups')?.title).toContain('Push-ups');
    expect(methodOf('no-such-page')).toBeNull();
  });

  it.each(METHODS.map((method) => [method.slug, method] as const))(
    '%s works its example out',
    (_, method) => {
      const { inputs, result } = method.example();
      expect(inputs).toMatch(/\.$/);
      expect(result).toMatch(/\d/);
      expect(result).toMatch(/[.”]$/);
      expect(`${inputs} ${result}`).not.toMatch(/NaN|undefined|null|Infinity|–/);
    },
  );

  it.each(METHODS.map((method) => [method.slug, method] as const))(
    '%s says its source, its people, its limits',
    (_, method) => {
      for (const source of method.sources) {
        expect(source.citation).not.toBe('');
        expect(source.population).not.toBe('');
        expect(FLAG_SENTENCES[source.flag]).toMatch(/\.$/);
      }
      for (const limit of method.limits) expect(limit).toMatch(/\.$/);
      expect(method.formula).not.toBe('');
      expect(method.units).not.toBe('');
    },
  );

  it.each([
    [
      'csep-push-ups',
      '17 push-ups: ‘good’ for men of 30 to 39. 5 more to ‘very good’. Mayo Clinic staff give 21',
    ],
    ['cooper-sit-ups-minute', '32 sit-ups: the 30th percentile'],
    [
      'stairs-height-and-power',
      '15.75 m, 5.25 m a minute, 60 W, 0.86 W/kg. The published example (54 kg, 3 m, 5 s) gives 318 W.',
    ],
    ['vo2max-mile-walk', '25 mL/kg/min.'],
    ['maximum-pulse', '180, 179, 180.1 by the three lines.'],
    ['weight-trend', '173.49, 173.29, 173.16, 173.'],
    ['tape-body-fat', 'gives 19.43.'],
  ])('%s prints what the code gives', (slug, printed) => {
    expect(methodOf(slug)?.example().result).toContain(printed);
  });
});

it('every place in a table has the page of that table', () => {
  const detail = { stepHeightMm: 305, massKg: 60, endPulse: 120, heightCm: 170 } as const;
  const tests = [...TEST_IDS, 'curl-up', 'vo2max'] as const;
  const tables = tests.flatMap((test) =>
    [20, 35, 67].flatMap((ageYears) =>
      ([undefined, 'one-minute'] as const).flatMap((protocol) =>
        (['male', 'female'] as const).flatMap((sex) => {
          const form = test === 'push-ups' && sex === 'female' ? 'knees' : undefined;
          const value =
            { 'run-1-5-mile': 800, walk: 900, 'run-12': 2000, 'step-test': 100, waist: 80 }[String(test)] ??
            20;
          const standing = standingOf({ test, form, value, ageYears, sex, detail: { ...detail, protocol } });
          return standing.kind === 'placed' ? [standing.table.id] : [];
        }),
      ),
    ),
  );
  expect(new Set(tables).size).toBe(11);
  for (const id of tables) expect(methodOf(id)?.slug).toBe(id);
});

it('a number is as firm as the weakest of what it rests on', () => {
  expect(weakestFlag([])).toBe('published');
  expect(weakestFlag(['published', 'derived'])).toBe('derived');
  expect(weakestFlag(['memory', 'published'])).toBe('memory');
  expect(weakestFlag(['memory', 'common practice, no source', 'derived'])).toBe('common practice, no source');
});
