/** How the value of an outside check is known. A check flagged 'memory' is never called verified. */
export type OutsideFlag = 'published' | 'derived' | 'memory' | 'common practice, no source';

/**
 * The name of a test whose expected value comes from outside: what is checked, then source and flag in one fixed shape,
 * `… [source | flag]`, which the count of outside checks reads.
 */
export const outside = (what: string, source: string, flag: OutsideFlag): string =>
  `${what} [${source} | ${flag}]`;

/** Cases for `it.each(byName(cases))('%s', (_, one) => …)`: the whole name is printed, where `$name` would be cut short. */
export const byName = <T extends { readonly name: string }>(cases: readonly T[]): [string, T][] =>
  cases.map((one) => [one.name, one]);
