import { byName, outside } from '#support/outside';
import { describe, expect, it } from 'vitest';
import checks from '../../../tests/published/checks.json' with { type: 'json' };
import published from '../../../tests/published/training-load.json' with { type: 'json' };
import { LIMITS } from './limits.ts';
import { monotony, sessionLoad, strain, WHO_WEEKLY_MINUTES, weeklyLoad } from './session-load.ts';

const check = (id: string) => {
  const found = checks.find((entry) => entry.id === id);
  if (found === undefined) throw new Error(`No check '${id}' in the reference.`);
  return found;
};

/** Seven days with a given mean and monotony (n − 1): six equal days and one that carries the spread. */
function weekOf(load: number, wanted: number): number[] {
  const mean = load / 7;
  // Six days at mean − d and one at mean + 6d: deviation by n − 1 is d √7.
  const d = mean / wanted / Math.sqrt(7);
  return [...Array.from({ length: 6 }, () => mean - d), mean + 6 * d];
}

describe('session load, monotony and strain', () => {
  it(outside('srpe-1: effort 5 for 40 minutes is 200', 'Foster 2001', 'published'), () => {
    expect(sessionLoad(5, 40)).toBe(check('srpe-1').expected);
  });

  it(
    outside('mono-n1: monotony of a week with two days of rest', 'Foster 1998 definition, n − 1', 'derived'),
    () => {
      const { expected, tolerance } = check('mono-n1');
      const given = monotony([300, 0, 450, 200, 0, 600, 150]);
      expect(Math.abs((given ?? NaN) - Number(expected))).toBeLessThanOrEqual(tolerance);
    },
  );

  it(outside('mono-flat: seven equal days have no monotony', 'arithmetic', 'derived'), () => {
    expect(check('mono-flat').expected).toContain('never infinity');
    expect(monotony([300, 300, 300, 300, 300, 300, 300])).toBeNull();
    expect(strain([300, 300, 300, 300, 300, 300, 300])).toBeNull();
  });

  it(outside('strain-a: 1592 at monotony 1.63', 'a published log using Foster 1998', 'published'), () => {
    const { published_value, tolerance } = check('strain-a');
    const given = strain(weekOf(1592, 1.63));
    expect(Math.abs((given ?? NaN) - Number(published_value))).toBeLessThanOrEqual(tolerance);
  });

  const weeks = published.published_weeks.map((week) => ({
    ...week,
    name: outside(
      `strain of ${week.load} at ${week.monotony}`,
      'a published log using Foster 1998',
      'published',
    ),
  }));
  it.each(byName(weeks))('%s', (_, week) => {
    const days = weekOf(week.load, week.monotony);
    // The log prints monotony to two decimals, so its strain is known to half a hundredth of the load.
    expect(Math.abs((strain(days) ?? NaN) - week.strain)).toBeLessThanOrEqual(week.load * 0.005 + 0.5);
    expect(weeklyLoad(days)).toBeCloseTo(week.load, 6);
  });

  it('keeps days of rest as zeros, and needs seven days', () => {
    expect(monotony([100, 0, 0, 0, 0, 0, 0])).toBeCloseTo(1 / Math.sqrt(7), 12);
    expect(monotony([100, 200, 300])).toBeNull();
    expect(monotony([0, 0, 0, 0, 0, 0, 0])).toBeNull();
    expect(strain([1, 2, 3, 4, 5, 6, 7, 8])).toBeNull();
  });

  it.each([
    [-1, 30],
    [11, 30],
    [NaN, 30],
    [5, -1],
    [5, Infinity],
    [5, NaN],
  ])('effort %d for %d minutes is no load', (effort, minutes) => {
    expect(sessionLoad(effort, minutes)).toBeNull();
  });

  it.each([
    [0, 30, 0],
    [5, 0, 0],
    [10, 1, 10],
  ])('effort %d for %d minutes is %d', (effort, minutes, load) => {
    expect(sessionLoad(effort, minutes)).toBe(load);
  });

  it('a load that makes no sense makes no week', () => {
    expect(weeklyLoad([100, NaN])).toBeNull();
    expect(weeklyLoad([])).toBe(0);
    expect(monotony([1, 2, 3, 4, 5, 6, -7])).toBeNull();
    expect(strain([1, 2, 3, 4, 5, 6, Infinity])).toBeNull();
  });
});

describe('limits against what is published', () => {
  it(outside('WHO weekly minutes', 'WHO 2020, as the OECD reprints it', 'published'), () => {
    const [moderate, vigorous] = [WHO_WEEKLY_MINUTES.moderate, WHO_WEEKLY_MINUTES.vigorous];
    expect(published.who_2020.adults).toContain(`${moderate[0]}-${moderate[1]} min moderate`);
    expect(published.who_2020.adults).toContain(`${vigorous[0]}-${vigorous[1]} min vigorous`);
  });

  it(
    outside('progress-2f2: a rise of 2 to 10 %', 'Ratamess 2009, Med Sci Sports Exerc 41:687', 'published'),
    () => {
      expect(published.progression.acsm_2009).toContain('2-10%');
      expect(LIMITS.risePercent).toBeLessThanOrEqual(10);
      expect(LIMITS.risePercent).toBeGreaterThanOrEqual(2);
    },
  );

  it(outside('progress-2f2: only after two sessions', 'NSCA two-for-two rule', 'memory'), () => {
    expect(published.progression.two_session_condition).toContain('two consecutive sessions');
    expect(LIMITS.upsNeeded).toBe(2);
  });
});
