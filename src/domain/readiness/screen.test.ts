import { byName, outside } from '#support/outside';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import published from '../../../tests/published/screening.json' with { type: 'json' };
import { QUESTIONS, type ReadinessAnswers } from './questions.ts';
import { screen, validUntil, type ScreenResult } from './screen.ts';

const CLEAR: ReadinessAnswers = {
  activity: 'active',
  disease: ['none'],
  signs: ['none'],
  pregnancy: 'no',
  age: '18-44',
  medicinesPulse: 'no',
  bloodPressure: 'normal',
  recentIllnessOrSurgery: 'no',
  effort: 'light-moderate',
};

const answers = (change: Partial<ReadinessAnswers>): ReadinessAnswers => ({ ...CLEAR, ...change });

/** From loose to strict. */
const STRICTNESS: readonly ScreenResult[] = ['clear', 'gentle', 'doctor'];
const strictness = (result: ScreenResult): number => STRICTNESS.indexOf(result);

/** All combinations of the four published inputs, with our answer and what the source allows at the loosest. */
const TABLE: readonly {
  activity: ReadinessAnswers['activity'];
  disease: boolean;
  signs: boolean;
  effort: ReadinessAnswers['effort'];
  ours: ScreenResult;
  source: ScreenResult;
}[] = [
  {
    activity: 'inactive',
    disease: false,
    signs: false,
    effort: 'light-moderate',
    ours: 'gentle',
    source: 'gentle',
  },
  {
    activity: 'inactive',
    disease: false,
    signs: false,
    effort: 'vigorous',
    ours: 'gentle',
    source: 'gentle',
  },
  {
    activity: 'inactive',
    disease: true,
    signs: false,
    effort: 'light-moderate',
    ours: 'doctor',
    source: 'doctor',
  },
  { activity: 'inactive', disease: true, signs: false, effort: 'vigorous', ours: 'doctor', source: 'doctor' },
  {
    activity: 'inactive',
    disease: false,
    signs: true,
    effort: 'light-moderate',
    ours: 'doctor',
    source: 'doctor',
  },
  { activity: 'inactive', disease: false, signs: true, effort: 'vigorous', ours: 'doctor', source: 'doctor' },
  {
    activity: 'inactive',
    disease: true,
    signs: true,
    effort: 'light-moderate',
    ours: 'doctor',
    source: 'doctor',
  },
  { activity: 'inactive', disease: true, signs: true, effort: 'vigorous', ours: 'doctor', source: 'doctor' },
  {
    activity: 'active',
    disease: false,
    signs: false,
    effort: 'light-moderate',
    ours: 'clear',
    source: 'clear',
  },
  { activity: 'active', disease: false, signs: false, effort: 'vigorous', ours: 'clear', source: 'clear' },
  {
    activity: 'active',
    disease: true,
    signs: false,
    effort: 'light-moderate',
    ours: 'gentle',
    source: 'clear',
  },
  { activity: 'active', disease: true, signs: false, effort: 'vigorous', ours: 'doctor', source: 'clear' },
  {
    activity: 'active',
    disease: false,
    signs: true,
    effort: 'light-moderate',
    ours: 'doctor',
    source: 'doctor',
  },
  { activity: 'active', disease: false, signs: true, effort: 'vigorous', ours: 'doctor', source: 'doctor' },
  {
    activity: 'active',
    disease: true,
    signs: true,
    effort: 'light-moderate',
    ours: 'doctor',
    source: 'doctor',
  },
  { activity: 'active', disease: true, signs: true, effort: 'vigorous', ours: 'doctor', source: 'doctor' },
];

const cases = TABLE.map((row) => ({
  ...row,
  name: outside(
    `${row.activity}, ${row.disease ? 'disease' : 'no disease'}, ${row.signs ? 'signs' : 'no signs'}, ${row.effort}: ${row.ours}`,
    'Riebe 2015, Med Sci Sports Exerc 47:2473-2479',
    // The 12 months of a clearance are remembered; ours asks again whatever the date.
    row.activity === 'active' && row.disease && row.effort === 'vigorous' ? 'memory' : 'published',
  ),
}));

const optionsOf = (id: keyof ReadinessAnswers): string[] =>
  QUESTIONS.find((question) => question.id === id)?.options.map(({ value }) => value as string) ?? [];
const namedOf = (id: 'disease' | 'signs') => optionsOf(id).filter((value) => value !== 'none');

describe('the published decision table', () => {
  it.each(byName(cases))('%s', (_, { activity, disease, signs, effort, ours, source }) => {
    // Every disease and every sign, one at a time, stands for its kind.
    for (const which of disease ? namedOf('disease') : ['none'])
      for (const sign of signs ? namedOf('signs') : ['none']) {
        const given = answers({
          activity,
          effort,
          disease: [which] as ReadinessAnswers['disease'],
          signs: [sign] as ReadinessAnswers['signs'],
        });
        const { result } = screen(given);
        expect(result).toBe(ours);
        expect(strictness(result)).toBeGreaterThanOrEqual(strictness(source));
      }
  });

  it('lists every combination once', () => {
    const keys = TABLE.map(
      ({ activity, disease, signs, effort }) => `${activity} ${disease} ${signs} ${effort}`,
    );
    expect(new Set(keys).size).toBe(16);
  });

  it(outside('has the rows of the source', 'Riebe 2015 as copied in the reference', 'published'), () => {
    for (const row of published.acsm_algorithm.flow) {
      const mustAsk = /clearance recommended|seek clearance/u.test(row.result);
      const found = TABLE.filter(
        ({ activity, disease, signs }) =>
          (activity === 'active') === row.active &&
          signs === row.symptoms &&
          (row.disease === undefined || disease === row.disease),
      );
      expect(found.length).toBeGreaterThan(0);
      if (mustAsk) for (const { ours } of found) expect(ours).toBe('doctor');
    }
  });
});

describe('our own, stricter rules (common practice, no source)', () => {
  it.each([
    ['under 18', { age: 'under-18' }, 'doctor', /people of 18 and over/],
    ['45 to 64', { age: '45-64' }, 'clear', /^Nothing/],
    ['65 and over', { age: '65-plus' }, 'gentle', /From 65 on/],
    ['pregnant', { pregnancy: 'pregnant' }, 'doctor', /midwife or doctor should agree/],
    ['after a birth', { pregnancy: 'birth' }, 'doctor', /After a birth/],
    ['high blood pressure', { bloodPressure: 'high' }, 'doctor', /160 over 100/],
    ['unknown blood pressure', { bloodPressure: 'unknown' }, 'clear', /^Nothing/],
    ['ill lately', { recentIllnessOrSurgery: 'illness' }, 'gentle', /After an illness/],
    ['a fever now', { recentIllnessOrSurgery: 'fever' }, 'doctor', /fever/],
    ['an operation', { recentIllnessOrSurgery: 'surgery' }, 'doctor', /After an operation/],
  ] as const)('%s', (_, change, result, reason) => {
    const given = screen(answers(change));
    expect(given.result).toBe(result);
    expect(given.reasons).toHaveLength(1);
    expect(given.reasons[0]).toMatch(reason);
  });

  it(outside('blood pressure: our limit is below the clinic’s', 'PMC10847087 table 2', 'published'), () => {
    expect(published.bp.defer).toContain('SBP >200 or DBP >110');
    const label = QUESTIONS.find(({ id }) => id === 'bloodPressure')?.options[1].label ?? '';
    const [systolic = NaN, diastolic = NaN] = (label.match(/\d+/gu) ?? []).map(Number);
    expect(systolic).toBeLessThan(200);
    expect(diastolic).toBeLessThan(110);
  });

  it('puts the reasons that decide first', () => {
    const { result, reasons } = screen(
      answers({ activity: 'inactive', age: '65-plus', bloodPressure: 'high' }),
    );
    expect(result).toBe('doctor');
    expect(reasons[0]).toMatch(/160 over 100/);
    expect(reasons).toHaveLength(3);
  });

  it('tells medicines that change the pulse, and takes unsure for yes', () => {
    expect(screen(CLEAR).medicinesAffectPulse).toBe(false);
    expect(screen(answers({ medicinesPulse: 'yes' })).medicinesAffectPulse).toBe(true);
    expect(screen(answers({ medicinesPulse: 'unsure' }))).toMatchObject({
      medicinesAffectPulse: true,
      result: 'clear',
    });
    expect(screen(answers({ pregnancy: 'pregnant' })).pregnant).toBe(true);
    expect(screen(answers({ pregnancy: 'birth' })).pregnant).toBe(false);
  });

  it('counts a named sign beside "none of these"', () => {
    expect(screen(answers({ signs: ['none', 'chest'] })).result).toBe('doctor');
    expect(screen(answers({ disease: ['none', 'renal'], activity: 'inactive' })).result).toBe('doctor');
  });
});

describe('whatever is answered', () => {
  const one = (id: keyof ReadinessAnswers) => fc.constantFrom(...optionsOf(id));
  const many = (id: keyof ReadinessAnswers) => fc.subarray(optionsOf(id));
  const anyAnswers = fc.record({
    activity: one('activity'),
    disease: many('disease'),
    signs: many('signs'),
    pregnancy: one('pregnancy'),
    age: one('age'),
    medicinesPulse: one('medicinesPulse'),
    bloodPressure: one('bloodPressure'),
    recentIllnessOrSurgery: one('recentIllnessOrSurgery'),
    effort: one('effort'),
  }) as fc.Arbitrary<ReadinessAnswers>;

  it('one more sign or disease never makes it looser', () => {
    fc.assert(
      fc.property(
        anyAnswers,
        fc.constantFrom(...namedOf('signs')),
        fc.constantFrom(...namedOf('disease')),
        (given, sign, disease) => {
          const worse = {
            ...given,
            signs: [...given.signs, sign],
            disease: [...given.disease, disease],
          } as ReadinessAnswers;
          expect(screen(worse).result).toBe('doctor');
          const diseased = { ...given, disease: [...given.disease, disease] } as ReadinessAnswers;
          expect(strictness(screen(diseased).result)).toBeGreaterThanOrEqual(
            strictness(screen(given).result),
          );
        },
      ),
      { numRuns: 500 },
    );
  });

  it('always gives a reason, each once, in a sentence', () => {
    fc.assert(
      fc.property(anyAnswers, (given) => {
        const { reasons } = screen(given);
        expect(reasons.length).toBeGreaterThan(0);
        expect(new Set(reasons).size).toBe(reasons.length);
        for (const reason of reasons) expect(reason).toMatch(/^[A-Z].*\.$/u);
      }),
    );
  });
});

describe('the yearly repeat (12 months: memory)', () => {
  it.each([
    ['2026-12-01', '2027-12-01'],
    ['2028-02-29', '2029-02-28'],
    ['2027-03-01', '2028-03-01'],
  ])('answered on %s, counts until %s', (answeredOn, until) => {
    expect(validUntil(answeredOn)).toBe(until);
  });

  it('is an error for what is no date', () => {
    expect(() => validUntil('soon')).toThrow(RangeError);
  });
});
