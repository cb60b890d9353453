import { monthNumber, MONTHS } from './months.ts';
import { read, refuse, tidy, type Parsed } from './result.ts';

const HINT = 'Write a date like 7 Nov 1990.';
const two = (n: number): string => String(n).padStart(2, '0');

/** Days in a month of the Gregorian calendar; `month` counts from 1. */
function daysIn(year: number, month: number): number {
  const isLeap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return month === 2 ? (isLeap ? 29 : 28) : [4, 6, 9, 11].includes(month) ? 30 : 31;
}

function toIso(year: number, month: number, day: number, note?: string): Parsed<string> {
  if (month < 1 || month > 12) return refuse(`There is no month ${month}. ${HINT}`);
  const days = daysIn(year, month);
  if (day < 1 || day > days) return refuse(`${MONTHS[month - 1]} ${year} has ${days} days. Check the day.`);
  return read(`${year}-${two(month)}-${two(day)}`, note);
}

/** Day first. When that is impossible and month first is not, month first; either way it is said which. */
function fromNumbers(first: number, second: number, year: number): Parsed<string> {
  if (second > 12 && first <= 12) {
    return toIso(year, first, second, `Read as ${second} ${MONTHS[first - 1]} ${year}, month first.`);
  }
  const isAmbiguous = first <= 12 && second <= 12 && first !== second;
  return toIso(
    year,
    second,
    first,
    isAmbiguous ? `Read as ${first} ${MONTHS[second - 1]} ${year}, day first.` : undefined,
  );
}

/**
 * A calendar date as people type it, as an ISO date: '1990-11-07', '7 Nov 1990', 'November 7, 1990', '7.11.1990'.
 * '07/11/1990' is read day first and `note` says so. The year needs four digits.
 */
export function parseDate(text: string): Parsed<string> {
  const typed = tidy(text).toLowerCase();
  if (typed === '') return refuse('A date is missing.');
  const iso = /^(\d{4})([-/. ]?)(\d{2}|\d(?=[-/. ]))\2(\d{1,2})$/u.exec(typed);
  if (iso && (iso[2] !== '' || typed.length === 8))
    return toIso(Number(iso[1]), Number(iso[3]), Number(iso[4]));

  const numbers = /^(\d{1,2}) ?[-/. ] ?(\d{1,2}) ?[-/. ] ?(\d{4})$/u.exec(typed);
  if (numbers) return fromNumbers(Number(numbers[1]), Number(numbers[2]), Number(numbers[3]));

  const dayFirst = /^(\d{1,2})(?:st|nd|rd|th)?\.?[- ]?(?:of )?([a-z]+)\.?,?[- ]?(\d{4})$/u.exec(typed);
  const monthFirst = /^([a-z]+)\.?[- ]?(\d{1,2})(?:st|nd|rd|th)?,?[- ](\d{4})$/u.exec(typed);
  const [day, name, year] = dayFirst
    ? [dayFirst[1], dayFirst[2], dayFirst[3]]
    : monthFirst
      ? [monthFirst[2], monthFirst[1], monthFirst[3]]
      : [];
  const month = name === undefined ? null : monthNumber(name);
  if (month !== null) return toIso(Number(year), month, Number(day));

  const lacksCentury = /^\d{1,2}[-/. ](?:\d{1,2}|[a-z]+)[-/. ]\d{2}$/u.test(typed);
  return refuse(lacksCentury ? 'Write the year with four digits, like 1990.' : HINT);
}
