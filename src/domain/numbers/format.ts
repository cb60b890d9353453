import { MONTHS } from './months.ts';

/** What stands where a number cannot be given. */
export const NO_NUMBER = '–';

const FORMATS = new Map<number, Intl.NumberFormat>();

/**
 * A number for reading: '1,000', '12.5', at most `decimals` digits after the point and a real minus. A number that is
 * not finite prints as a dash, never as NaN.
 */
export function formatNumber(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return NO_NUMBER;
  let format = FORMATS.get(decimals);
  if (!format) {
    format = new Intl.NumberFormat('en-GB', { maximumFractionDigits: decimals, signDisplay: 'negative' });
    FORMATS.set(decimals, format);
  }
  return format.format(value).replace('-', '−');
}

/** A change with its sign: '+5', '−2', '±0'. A change that rounds to nothing is '±0'. */
export function formatSigned(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return NO_NUMBER;
  const size = formatNumber(Math.abs(value), decimals);
  if (size === '0') return '±0';
  return `${value > 0 ? '+' : '−'}${size}`;
}

const two = (n: number): string => String(n).padStart(2, '0');

/** Seconds as a clock shows them: '0:45', '3:05', '1:02:03'. Rounded to whole seconds. */
export function formatDuration(seconds: number): string {
  if (!Number.isFinite(seconds) || seconds < 0) return NO_NUMBER;
  const whole = Math.round(seconds);
  const [hours, minutes, rest] = [Math.floor(whole / 3600), Math.floor((whole % 3600) / 60), whole % 60];
  return hours > 0 ? `${hours}:${two(minutes)}:${two(rest)}` : `${minutes}:${two(rest)}`;
}

/** Seconds in words: '45 s', '3 min', '3 min 5 s', '1 h 2 min'. */
export function formatDurationWords(seconds: number): string {
  if (!Number.isFinite(seconds) || seconds < 0) return NO_NUMBER;
  const whole = Math.round(seconds);
  const parts: [number, string][] = [
    [Math.floor(whole / 3600), 'h'],
    [Math.floor((whole % 3600) / 60), 'min'],
    [whole % 60, 's'],
  ];
  const said = parts.filter(([amount]) => amount > 0).map(([amount, unit]) => `${amount} ${unit}`);
  return said.join(' ') || '0 s';
}

/** The calendar day of a moment in a time zone, as an ISO date: '2026-11-07'. */
export function isoDayIn(moment: Date, timeZone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).formatToParts(moment);
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find((p) => p.type === type)?.value ?? '';
  return `${part('year').padStart(4, '0')}-${part('month')}-${part('day')}`;
}

/** An ISO date for reading: '7 Nov', or '7 Nov 1990' with its year. */
export function formatIsoDay(isoDate: string, withYear = false): string {
  const [year, month, day] = isoDate.split('-').map(Number);
  const name = MONTHS[(month ?? 0) - 1];
  if (!name || !day) return NO_NUMBER;
  return withYear ? `${day} ${name} ${year}` : `${day} ${name}`;
}

/** The day of a moment where the reader lives: '7 Nov', or '7 Nov 1990' with its year. */
export function formatDay(moment: Date, timeZone: string, withYear = false): string {
  return formatIsoDay(isoDayIn(moment, timeZone), withYear);
}

/** The time of a moment where the reader lives: '06:10'. */
export function formatTime(moment: Date, timeZone: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  }).format(moment);
}

/** The weekday of a moment where the reader lives: 'Tuesday', or 'Tue' when short. */
export function formatWeekday(moment: Date, timeZone: string, style: 'long' | 'short' = 'long'): string {
  return new Intl.DateTimeFormat('en-GB', { timeZone, weekday: style }).format(moment);
}
