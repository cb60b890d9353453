import { describe, expect, test } from 'vitest';
import { byName, outside } from '#support/outside';
import published from '../../../tests/published/statistics.json' with { type: 'json' };
import { normalCdf, student95, studentCdf } from './student-t.ts';

const { studentT, normal } = published;

describe('Student’s t', () => {
  const cases = studentT.degrees.map((degrees, i) => {
    const point = studentT.points[i] ?? Number.NaN;
    return { name: outside(`${degrees} degrees: ${point}`, studentT.source, 'memory'), degrees, point };
  });

  test.each(byName(cases))('%s', (_, { degrees, point }) => {
    expect(Math.abs(student95(degrees) - point)).toBeLessThan(0.001);
    expect(Math.abs(studentCdf(point, degrees) - 0.975)).toBeLessThan(0.002);
    expect(studentCdf(-point, degrees)).toBeCloseTo(1 - studentCdf(point, degrees), 12);
  });
});

describe('standard normal', () => {
  const cases = normal.z.map((z, i) => {
    const below = normal.below[i] ?? Number.NaN;
    return { name: outside(`below ${z}: ${below}`, normal.source, 'memory'), z, below };
  });

  test.each(byName(cases))('%s', (_, { z, below }) => {
    expect(Math.abs(normalCdf(z) - below)).toBeLessThan(0.00001);
    expect(normalCdf(-z)).toBeCloseTo(1 - normalCdf(z), 7);
  });
});
