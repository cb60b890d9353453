import { DateTime } from 'luxon';

/** Weeks of one flight: the programme's twelve treads. */
export const FLIGHT_WEEKS = 12;

/** Weeks that are landings: test days. Common practice, no source: a retest every four weeks. */
export const LANDING_WEEKS: readonly number[] = [4, 8, 12];

/** Short sessions asked each week. Within the 2 to 3 days for novices (Ratamess 2009, Med Sci Sports Exerc 41:687). */
export const SESSIONS_A_WEEK = 3;

const DAYS_A_WEEK = 7;
const DAY_MS = 86_400_000;

/** The ISO date of a count of days since 1970; null outside the years 0 to 9999. */
function isoOf(day: number): string | null {
  const date = new Date(day * DAY_MS);
  const year = date.getUTCFullYear();
  return year >= 0 && year <= 9999 ? date.toISOString().slice(0, 10) : null;
}

/** An ISO date as a count of days since 1970, plain arithmetic: a queue asks it a thousand times. */
function dayOf(iso: string): number {
  const day = /^\d{4}-\d{2}-\d{2}$/.test(iso) ? Date.parse(iso) / DAY_MS : NaN;
  // Engines may read 29 February of a short year as 1 March: it is a date only if it reads back the same.
  if (Number.isNaN(day) || isoOf(day) !== iso) throw new RangeError(`Not an ISO date: ${iso}`);
  return day;
}

/** The calendar date of a moment where the person lives, ISO. Throws a RangeError for an unknown time zone. */
export function localDate(now: Date, timeZone: string): string {
  const date = DateTime.fromJSDate(now, { zone: timeZone }).toISODate();
  if (date === null) throw new RangeError(`Not a moment in a known time zone: ${timeZone}`);
  return date;
}

/** The date `days` later (earlier when negative), ISO. Throws a RangeError when either makes no date. */
export function addDays(iso: string, days: number): string {
  const date = Number.isInteger(days) ? isoOf(dayOf(iso) + days) : null;
  if (date === null) throw new RangeError(`Not a whole number of days: ${days}`);
  return date;
}

/** Whole days from `from` to `to`; negative when `to` comes first. Throws a RangeError when either is no date. */
export const daysBetween = (from: string, to: string): number => dayOf(to) - dayOf(from);

/** The week of a flight that `today` lies in: 1 on the first day, 13 and more once it is over, 0 and less before. */
export function weekOfFlight(startsOn: string, today: string): number {
  return Math.floor(daysBetween(startsOn, today) / DAYS_A_WEEK) + 1;
}

/** The first day of the flight's week that `today` lies in, ISO. */
export function weekStart(startsOn: string, today: string): string {
  return addDays(startsOn, (weekOfFlight(startsOn, today) - 1) * DAYS_A_WEEK);
}

/** Whether a week of a flight ends in a test day. */
export const isLanding = (week: number): boolean => LANDING_WEEKS.includes(week);
