import { expect, test } from 'vitest';
import { outside } from '#support/outside';
import { BENCHMARKS, TEST_IDS } from '../benchmark/tests.ts';
import { priorTypicalError, TEST_ERRORS } from './test-errors.ts';
import {
  shrunkErrorVariance,
  smallestRealChange,
  standardErrorOfMeasurement,
  typicalErrorFromPairs,
} from './typical-error.ts';

test(outside('MDC95 is 2.7719 and MDC80 1.8124 typical errors', 'Weir 2005', 'memory'), () => {
  expect(smallestRealChange(1, 95)).toBeCloseTo(2.7719, 3);
  expect(smallestRealChange(1, 80)).toBeCloseTo(1.8124, 3);
  expect(smallestRealChange(1.7, 95)).toBeCloseTo(4.71, 2);
});

test('one pair, or none, has no typical error', () => {
  expect(typicalErrorFromPairs([])).toBeNull();
  expect(typicalErrorFromPairs([[20, 22]])).toBeNull();
});

test('a gain that all share is no error', () => {
  expect(
    typicalErrorFromPairs([
      [20, 23],
      [30, 33],
      [25, 28],
    ]),
  ).toBe(0);
});

test('shrinkage: no repeats give the prior, eight repeats the middle of the squares, many the member', () => {
  expect(shrunkErrorVariance(2, 8, 0, 0)).toBe(4);
  expect(shrunkErrorVariance(2, 8, 8 * 16, 8)).toBe(10);
  expect(shrunkErrorVariance(2, 8, 8000 * 16, 8000)).toBeCloseTo(16, 1);
});

test(
  outside('errors of push-ups, step test and pulse', 'JMIR Form Res 2021;5(12):e28040, SD memory', 'derived'),
  () => {
    expect(TEST_ERRORS['push-ups'].absolute).toBeCloseTo(1.732, 3);
    expect(TEST_ERRORS['step-test'].absolute).toBeCloseTo(4.243, 3);
    expect(TEST_ERRORS['resting-pulse'].absolute).toBeCloseTo(4.472, 3);
    expect(standardErrorOfMeasurement(10, 1)).toBe(0);
  },
);

test.each(TEST_IDS)(
  '%s has an error above nought at any result its field takes, with source and flag',
  (id) => {
    const { min, max } = BENCHMARKS[id].limits;
    expect(priorTypicalError(id, min)).toBeGreaterThan(0);
    expect(priorTypicalError(id, max)).toBeLessThan(max / 4);
    expect(TEST_ERRORS[id].source.length).toBeGreaterThan(10);
    expect(TEST_ERRORS[id].flag).not.toBe('published');
  },
);

test('the relative part takes over for large results', () => {
  expect(priorTypicalError('sit-ups', 20)).toBe(1.8);
  expect(priorTypicalError('sit-ups', 50)).toBe(3);
});
