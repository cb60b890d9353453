import { describe, expect, it } from 'vitest';
import {
  BENCHMARKS,
  isFormOf,
  isTestId,
  limitProblem,
  REQUIRED_TESTS,
  TEST_IDS,
  unitWordFor,
} from './tests.ts';

describe('the benchmarks', () => {
  it('ask three tests of everyone and hide the body until it is asked for', () => {
    expect(REQUIRED_TESTS).toEqual(['sit-ups', 'push-ups', 'stairs']);
    expect(TEST_IDS.filter((id) => BENCHMARKS[id].offUntilAsked)).toEqual(['weight', 'waist']);
  });

  it.each(TEST_IDS)('%s is whole: named by its key, with set-up, standards, cautions and a source', (id) => {
    const test = BENCHMARKS[id];
    expect(test.id).toBe(id);
    expect(test.question).toMatch(/\?$/);
    for (const lines of [test.setUp, test.standards, test.cautions, [test.practice]]) {
      expect(lines.length).toBeGreaterThan(0);
      for (const line of lines) expect(line).toMatch(/[.]$/);
    }
    expect(test.source).not.toBe('');
    expect(test.limits.min).toBeLessThan(test.limits.max);
    expect(new Set(test.forms.map((form) => form.id)).size).toBe(test.forms.length);
  });

  it.each(TEST_IDS)('%s shouts nowhere', (id) => {
    expect(JSON.stringify(BENCHMARKS[id])).not.toContain('!');
  });

  it.each(TEST_IDS.filter((id) => BENCHMARKS[id].stopWhen.length > 0))(
    '%s rests at least three minutes before it',
    (id) => {
      // At least 3 min between events: US Air Force.
      expect(BENCHMARKS[id].restBefore.seconds).toBeGreaterThanOrEqual(180);
      expect(BENCHMARKS[id].stopWhen).toContain('You want to stop.');
    },
  );

  it.each(TEST_IDS)('%s takes its limits and nothing beyond them', (id) => {
    const { min, max, outside } = BENCHMARKS[id].limits;
    expect(limitProblem(id, min)).toBeNull();
    expect(limitProblem(id, max)).toBeNull();
    expect(limitProblem(id, max + 0.1)).toBe(outside);
    expect(limitProblem(id, min - 0.1)).toBe(outside);
    expect(limitProblem(id, NaN)).toBe(outside);
  });

  it('knows its own words and forms', () => {
    expect(isTestId('sit-ups')).toBe(true);
    expect(isTestId('toString')).toBe(false);
    expect(isFormOf('push-ups', 'knees')).toBe(true);
    expect(isFormOf('push-ups', 'feet held')).toBe(false);
    expect(unitWordFor('sit-ups', 1)).toBe('sit-up');
    expect(unitWordFor('sit-ups', 40)).toBe('sit-ups');
  });
});
