/** A seeded source of chance: the same seed tells the same lives. */
export interface Chance {
  /** From 0 up to, not including, 1. */
  next(): number;
  /** True with probability `p`. */
  happens(p: number): boolean;
  /** A whole number from `low` to `high`, both included. */
  whole(low: number, high: number): number;
  /** Normally distributed. */
  normal(mean: number, sd: number): number;
  pick<T>(list: readonly T[]): T;
  uuid(): string;
}

/** Mulberry32 (Tommy Ettinger, public domain): small, fast and good enough for lives. */
export function seededChance(seed: number): Chance {
  let state = seed >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  const hex = (digits: number) =>
    Array.from({ length: digits }, () => Math.floor(next() * 16).toString(16)).join('');
  return {
    next,
    happens: (p) => next() < p,
    whole: (low, high) => low + Math.floor(next() * (high - low + 1)),
    normal: (mean, sd) => mean + sd * Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next()),
    pick: (list) => {
      const one = list[Math.floor(next() * list.length)];
      if (one === undefined) throw new RangeError('nothing to pick from');
      return one;
    },
    uuid: () => `${hex(8)}-${hex(4)}-4${hex(3)}-${'89ab'[Math.floor(next() * 4)] ?? '8'}${hex(3)}-${hex(12)}`,
  };
}
