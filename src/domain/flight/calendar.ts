import { DateTime } from 'luxon';

/** Weeks of one flight: the programme's twelve treads. */
export const FLIGHT_WEEKS = 12;

/** Weeks that are landings: test days. Common practice, no source: a retest every four weeks. */
export const LANDING_WEEKS: readonly number[] = [4, 8, 12];

/** Short sessions asked each week. Within the 2 to 3 days for novices (Ratamess 2009, Med Sci Sports Exerc 41:687). */
export const SESSIONS_A_WEEK = 3;

const DAYS_A_WEEK = 7;

/** An ISO date as a UTC day. Throws a RangeError when `iso` is not a calendar date. */
function dayOf(iso: string): DateTime {
  const day = DateTime.fromISO(iso, { zone: 'utc' });
  if (!day.isValid || !/^\d{4}-\d{2}-\d{2}$/.test(iso)) throw new RangeError(`Not an ISO date: ${iso}`);
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
  const date = Number.isInteger(days) ? dayOf(iso).plus({ days }).toISODate() : null;
  if (date === null) throw new RangeError(`Not a whole number of days: ${days}`);
  return date;
}

/** Whole days from `from` to `to`; negative when `to` comes first. */
export function daysBetween(from: string, to: string): number {
  return Math.round(dayOf(to).diff(dayOf(from), 'days').days);
}

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
