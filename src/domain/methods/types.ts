/**
 * How far a figure may be trusted: read in its source or in a copy of it; worked out from figures that were read;
 * remembered and not found; or a rule of the trade.
 */
export type Flag = 'published' | 'derived' | 'memory' | 'common practice, no source';

export interface MethodSource {
  readonly citation: string;
  /** Year of publication, as printed on the page; null for a rule without a source. */
  readonly year: string | null;
  /** Who was measured, and how many. */
  readonly population: string;
  readonly flag: Flag;
}

/** A worked example: inputs in words, and the result that the running code gives for them. */
export interface MethodExample {
  readonly inputs: string;
  readonly result: string;
}

/** One number of the product and all that its methods page says about it. */
export interface MethodEntry {
  /** Stable address of the page: `/methods/<slug>`. */
  readonly slug: string;
  readonly title: string;
  /** What the number is for, in one sentence. */
  readonly purpose: string;
  readonly formula: string;
  readonly units: string;
  /** Runs the production code, so that the page can never print what the code would not. */
  readonly example: () => MethodExample;
  readonly sources: readonly [MethodSource, ...MethodSource[]];
  /** When not to believe it. */
  readonly limits: readonly [string, ...string[]];
  /** The weakest flag among what the number rests on. */
  readonly flag: Flag;
}
