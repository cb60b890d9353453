import { expect, test } from 'vitest';
import { countWords, lessonWords, readingMinutes } from './reading-time.ts';

test('markup and components are not read', () => {
  expect(countWords('## Two words\n\n<Figure movement="march" /> and **three** more')).toBe(5);
});

test('facts are read with the body, however deep they stand', () => {
  expect(lessonWords({ title: 'One two', faults: [{ see: 'three four' }], week: 2 }, 'five')).toBe(5);
});

test('a short text takes a minute and 900 words five', () => {
  expect([readingMinutes(12), readingMinutes(900)]).toEqual([1, 5]);
});
