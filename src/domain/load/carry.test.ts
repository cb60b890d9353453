import { describe, expect, it } from 'vitest';
import { rungOf, type Kit } from '../movement/ladders.ts';
import { setCost, stepDown, stepUp, type Place } from './carry.ts';

const place = (rung: string, amount: number): Place => ({ rung: rungOf(rung), amount });
const read = (at: Place | null) => at && [at.rung.id, at.amount];

describe('from rung to rung at about the same effort (common practice, no source)', () => {
  it('costs amount times the cost of a unit', () => {
    expect(setCost(place('push-up-floor', 10))).toBe(30);
  });

  it.each([
    // 15 × 1.9 = 28.5; 28.5 / 2.2 = 12.95.
    ['push-up-stair-2', 15, ['push-up-knees', 13]],
    // 15 × 1.5 = 22.5; 22.5 / 0.5 = 45: seconds for reps.
    ['row-bag', 15, ['hang-dead', 45]],
    // 3 × 1 = 3; 2 × 1.8 = 3.6: a fifth more and no further.
    ['bridge', 3, ['bridge-one-leg', 2]],
    // 2 × 1 = 2; 2 × 1.8 = 3.6 would be four fifths more.
    ['bridge', 2, null],
    // 5 × 0.5 = 2.5; 2 × 2.1 = 4.2.
    ['stairs-step-up-knee', 5, null],
    ['chin-up', 10, null],
  ])('up from %s × %i', (rung, amount, to) => {
    expect(read(stepUp(place(rung, amount)))).toEqual(to);
  });

  it.each([
    ['push-up-knees', 13, ['push-up-stair-2', 15]],
    // 0.5 / 1.5 is less than one rep.
    ['hang-dead', 2, null],
    ['hang-dead', 3, ['row-bag', 1]],
    ['push-up-wall', 10, null],
  ])('down from %s × %i', (rung, amount, to) => {
    expect(read(stepDown(place(rung, amount)))).toEqual(to);
  });

  it('is not thrown by a hair of rounding', () => {
    // 21 × 1.3 = 13 × 2.1, though not in binary.
    const amounts = Array.from({ length: 60 }, (_, i) => i + 1);
    for (const amount of amounts) {
      const there = stepUp(place('squat-free', amount * 21));
      expect(there?.amount).toBe(amount * 13);
      expect(there && stepDown(there)?.amount).toBe(amount * 21);
    }
  });

  it('passes over rungs that the house does not allow', () => {
    const kit: ReadonlySet<Kit> = new Set();
    expect(read(stepUp(place('push-up-wall', 15), kit))).toEqual(['push-up-floor', 5]);
    expect(read(stepDown(place('push-up-floor', 5), kit))).toEqual(['push-up-wall', 15]);
  });
});
