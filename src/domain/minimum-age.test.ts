import { describe, expect, it } from 'vitest';
import { ageOn, birthDateProblem, MINIMUM_AGE } from './minimum-age.ts';

describe('ageOn', () => {
  it.each([
    ['1990-11-07', '2026-11-06', 35],
    ['1990-11-07', '2026-11-07', 36],
    ['1990-11-07', '2026-12-01', 36],
    ['2000-02-29', '2026-02-28', 25],
    ['2000-02-29', '2026-03-01', 26],
    ['2026-11-07', '2026-11-07', 0],
  ])('%s on %s is %d', (birth, today, age) => {
    expect(ageOn(birth, today)).toBe(age);
  });

  it('takes a moment too, read in UTC', () => {
    expect(ageOn('1990-11-07', new Date('2026-11-06T23:59:00Z'))).toBe(35);
    expect(ageOn('1990-11-07', new Date('2026-11-07T00:00:00Z'))).toBe(36);
  });
});

describe('birthDateProblem', () => {
  const today = '2026-11-07';

  it('lets adults pass, on the birthday itself too', () => {
    expect(birthDateProblem('2008-11-07', today)).toBeNull();
    expect(birthDateProblem('1906-11-07', today)).toBeNull();
  });

  it.each([
    ['2008-11-08', new RegExp(`${MINIMUM_AGE} and over`)],
    ['2026-11-08', /still to come/],
    ['1905-11-07', /121 years/],
    ['7 Nov 1990', /not a date/],
    ['', /not a date/],
  ])('refuses %j with a sentence', (birth, sentence) => {
    expect(birthDateProblem(birth, today)).toMatch(sentence);
  });
});
