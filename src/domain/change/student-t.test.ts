import { describe, expect, test } from 'vitest';
import published from '../../../tests/published/statistics.json' with { type: 'json' };
import { normalCdf, student95, studentCdf } from './student-t.ts';

const { studentT, normal } = published;

describe('Student’s t, table of two-sided 95 % points (memory)', () => {
  test.each(studentT.degrees.map((degrees, i) => [degrees, studentT.points[i] ?? 0]))(
    '%i degrees: %f',
    (degrees, point) => {
      expect(Math.abs(student95(degrees) - point)).toBeLessThan(0.001);
      expect(Math.abs(studentCdf(point, degrees) - 0.975)).toBeLessThan(0.002);
      expect(studentCdf(-point, degrees)).toBeCloseTo(1 - studentCdf(point, degrees), 12);
    },
  );
});

describe('standard normal table (memory)', () => {
  test.each(normal.z.map((z, i) => [z, normal.below[i] ?? 0]))('z %f: %f', (z, below) => {
    expect(Math.abs(normalCdf(z) - below)).toBeLessThan(0.00001);
    expect(normalCdf(-z)).toBeCloseTo(1 - normalCdf(z), 7);
  });
});
