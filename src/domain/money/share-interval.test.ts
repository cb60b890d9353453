import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shareInterval } from './share-interval.ts';

describe('the interval of a share', () => {
  // Newcombe, Statistics in Medicine 17 (1998) 857, table I, method 3, the score interval. Flag: memory.
  it.each([
    [81, 263, 0.2553, 0.3662],
    [15, 148, 0.0624, 0.1605],
    [0, 20, 0, 0.1611],
    [1, 29, 0.0061, 0.1718],
  ])('of %d in %d is as published', (count, of, low, high) => {
    const interval = shareInterval(count, of);
    expect(interval?.low).toBeCloseTo(low, 4);
    expect(interval?.high).toBeCloseTo(high, 4);
  });

  it('is not there when nothing was seen', () => {
    expect(shareInterval(0, 0)).toBeNull();
  });

  it('holds the share, stays within 0 and 1, and mirrors', () => {
    fc.assert(
      fc.property(fc.nat(500), fc.nat(500), (left, stayed) => {
        const of = left + stayed;
        fc.pre(of > 0);
        const interval = shareInterval(left, of);
        const mirrored = shareInterval(stayed, of);
        if (!interval || !mirrored) throw new Error('there is one');
        expect(interval.low).toBeGreaterThanOrEqual(0);
        expect(interval.low).toBeLessThanOrEqual(left / of + 1e-12);
        expect(interval.high).toBeGreaterThanOrEqual(left / of - 1e-12);
        expect(interval.high).toBeLessThanOrEqual(1);
        expect(mirrored.low).toBeCloseTo(1 - interval.high, 10);
      }),
    );
  });
});
