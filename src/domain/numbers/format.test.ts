import { describe, expect, it } from 'vitest';
import {
  formatDay,
  formatDuration,
  formatDurationWords,
  formatIsoDay,
  formatNumber,
  formatSigned,
  formatTime,
  formatWeekday,
  isoDayIn,
} from './format.ts';

describe('numbers', () => {
  it.each([
    [1000, 0, '1,000'],
    [12.5, 1, '12.5'],
    [12, 1, '12'],
    [12.25, 1, '12.3'],
    [-2, 0, '−2'],
    [-0.04, 1, '0'],
    [0, 0, '0'],
    [NaN, 0, '–'],
    [Infinity, 0, '–'],
  ])('prints %d with %d decimals as %s', (value, decimals, printed) => {
    expect(formatNumber(value, decimals)).toBe(printed);
  });

  it.each([
    [5, 0, '+5'],
    [-2, 0, '−2'],
    [0, 0, '±0'],
    [-0.04, 1, '±0'],
    [0.4, 0, '±0'],
    [3.45, 1, '+3.5'],
    [-1200, 0, '−1,200'],
    [NaN, 0, '–'],
  ])('signs %d as %s', (value, decimals, printed) => {
    expect(formatSigned(value, decimals)).toBe(printed);
  });
});

describe('durations', () => {
  it.each([
    [0, '0:00', '0 s'],
    [45, '0:45', '45 s'],
    [180, '3:00', '3 min'],
    [185, '3:05', '3 min 5 s'],
    [184.6, '3:05', '3 min 5 s'],
    [3599.7, '1:00:00', '1 h'],
    [3723, '1:02:03', '1 h 2 min 3 s'],
    [NaN, '–', '–'],
    [-1, '–', '–'],
  ])('prints %d s as %s and %s', (seconds, clock, words) => {
    expect(formatDuration(seconds)).toBe(clock);
    expect(formatDurationWords(seconds)).toBe(words);
  });
});

describe('dates and times', () => {
  const moment = new Date('2026-11-06T23:10:00Z');

  it('prints the day and the time where the reader lives', () => {
    expect(formatDay(moment, 'Europe/London')).toBe('6 Nov');
    expect(formatDay(moment, 'Asia/Tokyo')).toBe('7 Nov');
    expect(formatDay(moment, 'Asia/Tokyo', true)).toBe('7 Nov 2026');
    expect(formatTime(moment, 'Asia/Tokyo')).toBe('08:10');
    expect(formatTime(new Date('2026-11-07T00:05:00Z'), 'Europe/London')).toBe('00:05');
    expect(formatWeekday(moment, 'Asia/Tokyo')).toBe('Saturday');
    expect(formatWeekday(moment, 'Europe/London', 'short')).toBe('Fri');
  });

  it('keeps the day across the change to summer time', () => {
    expect(isoDayIn(new Date('2026-03-29T00:30:00Z'), 'Europe/London')).toBe('2026-03-29');
    expect(formatTime(new Date('2026-03-29T01:30:00Z'), 'Europe/London')).toBe('02:30');
  });

  it.each([
    ['2026-09-07', '7 Sep'],
    ['1990-11-07', '7 Nov'],
    ['nonsense', '–'],
    ['', '–'],
  ])('prints the ISO day %j as %s', (iso, printed) => {
    expect(formatIsoDay(iso)).toBe(printed);
  });
});
