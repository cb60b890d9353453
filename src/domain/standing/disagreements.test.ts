import { outside } from '#support/outside';
import { placed } from '#support/standing';
import { describe, expect, it } from 'vitest';
import mayo from '../../../tests/published/pushup-mayo-targets.json' with { type: 'json' };

const man = { sex: 'male', ageYears: 35 } as const;
const woman = { sex: 'female', ageYears: 35 } as const;

describe('tables that disagree', () => {
  it(
    outside(
      'men of 40 to 49: 22 was excellent in 1986 and is not now',
      'Canadian Standardized Test 1986 v CSEP 2003',
      'published',
    ),
    () => {
      const says = (value: number) =>
        placed({ sex: 'male', ageYears: 44, test: 'push-ups', value }).disagreements.map((d) => d.title);
      expect(says(22)).toContain('Canadian Standardized Test, 1986');
      expect(says(21)).not.toContain('Canadian Standardized Test, 1986');
      expect(says(25)).not.toContain('Canadian Standardized Test, 1986');
    },
  );

  const targets = Object.entries(mayo.table).flatMap(([age, row]) =>
    (['male', 'female'] as const).map((sex) => ({
      age: Number(age),
      sex,
      target: typeof row[sex] === 'number' ? row[sex] : 10,
    })),
  );
  it.each(targets)(
    outside('$sex of $age: target $target', 'Mayo Clinic staff 2022, secondary copy', 'published'),
    ({ age, sex, target }) => {
      const form = sex === 'male' ? 'floor' : 'knees';
      const about = (value: number) => {
        const standing = placed({ sex, ageYears: age, test: 'push-ups', form, value });
        return {
          isGood: (standing.category?.rank ?? 0) >= 2,
          says: standing.disagreements.find(({ title }) => title.startsWith('One target'))?.sentence,
        };
      };
      for (const [value, isReached] of [
        [target, true],
        [target - 1, false],
      ] as const) {
        const { isGood, says } = about(value);
        if (isGood === isReached) expect(says).toBeUndefined();
        else
          expect(says).toContain(
            `${target} as the sign of good fitness at ${age}. By that it is ${isReached ? 'reached' : 'not reached yet'}`,
          );
      }
    },
  );

  it(
    outside('plank: two groups of students have other middles', 'Strand 2014 v Linfield 2014', 'published'),
    () => {
      const says = (value: number) =>
        placed({ sex: 'male', ageYears: 20, test: 'plank', value }).disagreements.length;
      expect([says(105), says(106), says(123), says(124)]).toEqual([0, 1, 1, 0]);
    },
  );

  it('sets the home step table beside the other one when the words differ', () => {
    const step = { ...man, test: 'step-test', detail: { stepHeightMm: 305 } } as const;
    expect(placed({ ...step, value: 88 }).disagreements[0]?.sentence).toContain('‘good’');
    expect(placed({ ...step, value: 101 }).disagreements).toEqual([]);
  });

  it('sets FRIEND beside the classes when they point apart', () => {
    const [friend] = placed({ ...woman, ageYears: 57, test: 'vo2max', value: 25 }).disagreements;
    expect(friend?.sentence).toBe(
      '25 mL/kg/min stands at the 60th percentile among people measured on a treadmill.',
    );
    expect(friend?.flag).toBe('memory');
    expect(placed({ ...woman, ageYears: 57, test: 'vo2max', value: 40 }).disagreements).toEqual([]);
  });

  it('sets the class of the VO2max beside the run when the two point apart', () => {
    const run = (value: number) => placed({ sex: 'male', ageYears: 35, test: 'run-1-5-mile', value });
    // 13:30 is below the middle of the candidates, and 39.3 mL/kg/min is the middle class.
    expect(run(810).disagreements[0]?.sentence).toBe(
      'Turned into VO2max (39.3 mL/kg/min) the classes call it ‘fair’.',
    );
    expect(run(650).disagreements).toEqual([]);
    expect(run(650).vo2max).toBeCloseTo(48.08, 2);
  });
});
