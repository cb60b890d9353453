import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  addDays,
  FLIGHT_WEEKS,
  daysBetween,
  isLanding,
  LANDING_WEEKS,
  localDate,
  weekOfFlight,
  weekStart,
} from './calendar.ts';

const STARTS_ON = '2026-11-30';

describe('the weeks of a flight', () => {
  it.each([
    ['2026-11-29', 0, '2026-11-23'],
    ['2026-11-30', 1, '2026-11-30'],
    ['2026-12-06', 1, '2026-11-30'],
    ['2026-12-07', 2, '2026-12-07'],
    ['2027-02-21', 12, '2027-02-15'],
    ['2027-02-22', 13, '2027-02-22'],
  ])('%s is in week %i, which began on %s', (today, week, start) => {
    expect(weekOfFlight(STARTS_ON, today)).toBe(week);
    expect(weekStart(STARTS_ON, today)).toBe(start);
  });

  it('lands in weeks 4, 8 and 12', () => {
    expect(LANDING_WEEKS).toEqual([4, 8, 12]);
    expect(LANDING_WEEKS.at(-1)).toBe(FLIGHT_WEEKS);
    expect([3, 4, 5, 8, 12, 13].map(isLanding)).toEqual([false, true, false, true, true, false]);
  });
});

describe('dates', () => {
  it.each([
    ['2026-12-31', 1, '2027-01-01'],
    ['0000-01-02', -1, '0000-01-01'],
    ['9999-12-30', 1, '9999-12-31'],
    ['2028-02-28', 1, '2028-02-29'],
    ['2027-03-01', -1, '2027-02-28'],
    // The clocks change on 28 March 2027 in Europe; a date has no clock.
    ['2027-03-27', 2, '2027-03-29'],
  ])('%s and %i days is %s', (from, days, to) => {
    expect(addDays(from, days)).toBe(to);
    expect(daysBetween(from, to)).toBe(days);
  });

  it.each(['2027-02-29', '1 Dec 2026', '', '2026-12-01T00:00:00Z', '20261201'])('%s is no date', (bad) => {
    expect(() => addDays(bad, 1)).toThrow(RangeError);
    expect(() => daysBetween(bad, STARTS_ON)).toThrow(RangeError);
  });

  it.each([NaN, Infinity, 0.5, 1e7, 1e12])('%d is no number of days to add', (days) => {
    expect(() => addDays(STARTS_ON, days)).toThrow(RangeError);
  });

  it('is the day where the person lives', () => {
    const moment = new Date('2026-12-01T23:30:00Z');
    expect(localDate(moment, 'UTC')).toBe('2026-12-01');
    expect(localDate(moment, 'Europe/Berlin')).toBe('2026-12-02');
    expect(localDate(moment, 'America/New_York')).toBe('2026-12-01');
    expect(() => localDate(moment, 'Skerrow/Harbour')).toThrow(RangeError);
    expect(() => localDate(new Date(NaN), 'UTC')).toThrow(RangeError);
  });

  it('adding and taking away are one thing, and a week start is never more than six days back', () => {
    const day = fc.integer({ min: -2000, max: 20_000 }).map((days) => addDays('2020-01-01', days));
    fc.assert(
      fc.property(day, fc.integer({ min: -5000, max: 5000 }), (from, days) => {
        const to = addDays(from, days);
        expect(daysBetween(from, to)).toBe(days);
        const back = daysBetween(weekStart(from, to), to);
        expect(back).toBeGreaterThanOrEqual(0);
        expect(back).toBeLessThanOrEqual(6);
        expect(daysBetween(from, weekStart(from, to)) / 7).toBe(weekOfFlight(from, to) - 1);
      }),
    );
  });
});
