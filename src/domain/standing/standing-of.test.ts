import { outside } from '#support/outside';
import { placed } from '#support/standing';
import { describe, expect, it } from 'vitest';
import plank from '../../../tests/published/plank.json' with { type: 'json' };

const man = { sex: 'male', ageYears: 35 } as const;
const woman = { sex: 'female', ageYears: 35 } as const;

describe('a place', () => {
  it('says word, people and the way to the next word', () => {
    const standing = placed({ ...man, test: 'push-ups', form: 'floor', value: 19 });
    expect(standing.sentence).toBe('19 push-ups: ‘good’ for men of 30 to 39. 3 more to ‘very good’.');
    expect(standing.category).toEqual({ word: 'good', rank: 2, of: 5 });
    expect(standing.neighbours).toEqual({
      up: { cut: 22, needed: 3, name: 'very good' },
      down: { cut: 17, margin: 2, name: 'good' },
    });
    expect(standing.bands).toEqual([
      { value: 12, word: 'fair' },
      { value: 17, word: 'good' },
      { value: 22, word: 'very good' },
      { value: 30, word: 'excellent' },
    ]);
    expect(standing.citation).toContain('CPAFLA');
    expect(standing.year).toBe('2003');
  });

  it('draws a percentile straight between two cells and says that it is derived or from memory', () => {
    // 30 to 39: 41 is the 70th, 42 the 75th, 43 the 80th, 45 the 85th; 44 lies half-way.
    const standing = placed({ ...man, test: 'sit-ups', value: 44 });
    expect(standing.percentile).toEqual({ value: 83 });
    expect(standing.flag).toBe('memory');
    expect(standing.sentence).toBe(
      '44 sit-ups: the 83rd percentile for men of 30 to 39. 1 more to the 85th.',
    );
  });

  it('never leaves the table', () => {
    expect(placed({ ...man, test: 'sit-ups', value: 120 }).percentile).toEqual({ above: 95 });
    expect(placed({ ...man, test: 'sit-ups', value: 120 }).sentence).toContain('above the 95th percentile');
    expect(placed({ ...man, test: 'sit-ups', value: 0 }).percentile).toEqual({ below: 5 });
    expect(placed({ ...man, test: 'sit-ups', value: 120 }).neighbours.up).toBeNull();
    expect(placed({ ...man, test: 'sit-ups', value: 0 }).neighbours.down).toBeNull();
  });

  it('rounds half a repetition up to a whole one', () => {
    // Men of 50 to 59 in one minute: the 25th is printed as 9.5.
    const standing = placed({
      sex: 'male',
      ageYears: 55,
      test: 'push-ups',
      value: 9,
      detail: { protocol: 'one-minute' },
    });
    expect(standing.neighbours.up).toEqual({ cut: 9.5, needed: 1, name: '25th' });
  });

  it('turns the cuts of VO2max into metres, seconds and minutes of the field test', () => {
    const run = placed({ ...man, test: 'run-12', value: 2400 });
    expect(run.category?.word).toBe('good');
    expect(run.vo2max).toBeCloseTo(42.37, 2);
    expect(run.sentence).toBe(
      '2,400 m, about 42.4 mL/kg/min: ‘good’ for men of 30 to 39. 118 m more to ‘excellent’.',
    );
    expect(placed({ ...man, test: 'run-12', value: 2400 + 118 }).category?.word).toBe('excellent');
    expect(placed({ ...man, test: 'run-12', value: 2400 + 117 }).category?.word).toBe('good');

    const walk = { ...woman, test: 'walk', detail: { massKg: 60, endPulse: 120 } } as const;
    const first = placed({ ...walk, value: 1000 });
    const faster = placed({ ...walk, value: 1000 - (first.neighbours.up?.needed ?? NaN) });
    expect(faster.category?.word).toBe(first.neighbours.up?.name);
  });

  it('counts fewer beats as better', () => {
    const standing = placed({ ...man, test: 'step-test', value: 100, detail: { stepHeightMm: 305 } });
    expect(standing.sentence).toBe(
      '100 beats a minute: ‘average’ for men of 26 to 35. 6 fewer to ‘above average’.',
    );
  });

  it('compares waist and height before rounding', () => {
    expect(placed({ ...woman, test: 'waist', value: 81, detail: { heightCm: 163 } }).sentence).toBe(
      '81 cm is 0.497 of your height: healthy.',
    );
    expect(placed({ ...woman, test: 'waist', value: 81, detail: { heightCm: 163 } }).category?.word).toBe(
      'healthy',
    );
    expect(placed({ ...woman, test: 'waist', value: 81.5, detail: { heightCm: 163 } }).category?.word).toBe(
      'increased',
    );
    expect(
      placed({ ...woman, test: 'waist', value: 70, detail: { heightCm: 163 } }).neighbours.up,
    ).toBeNull();
    const over = placed({ ...woman, test: 'waist', value: 90, detail: { heightCm: 163 } }).neighbours.up;
    expect(over?.needed).toBeCloseTo(8.6, 9);
  });

  it.each(
    plank.items.flatMap((item) =>
      item.name.startsWith('Linfield')
        ? (['male', 'female'] as const).map((sex) => ({ sex, row: item[sex] }))
        : [],
    ),
  )(outside('plank of $sex students: quartiles', 'Linfield 2014', 'published'), ({ sex, row }) => {
    if (typeof row !== 'object' || !('p25' in row)) throw new Error('No quartiles');
    const at = (value: number) => placed({ sex, ageYears: 20, test: 'plank', value }).percentile;
    expect(at(row.p25)).toEqual({ value: 25 });
    expect(at(row.p50)).toEqual({ value: 50 });
    expect(at(row.p75)).toEqual({ value: 75 });
    expect(at(row.p75 + 1)).toEqual({ above: 75 });
  });
});
