import { expect, test } from 'vitest';
import { minutesInWords, placeInFlight } from './week-words.ts';

test('treads count by week, landings among themselves', () => {
  expect([1, 4, 8, 9, 12].map(placeInFlight)).toEqual([
    'the first tread',
    'the first landing',
    'the second landing',
    'the ninth tread',
    'the third landing',
  ]);
  expect([0, 13].map(placeInFlight)).toEqual([null, null]);
});

test('minutes are words up to twelve', () => {
  expect([1, 6, 14].map(minutesInWords)).toEqual(['one minute', 'six minutes', '14 minutes']);
});
