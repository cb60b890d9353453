import type { TestId } from '../benchmark/types.ts';
import type { Flag } from '../methods/types.ts';

export type Sex = 'male' | 'female';

/** Every test that standing is asked about: the benchmarks, and two that only tables know. */
export type StandingTest = TestId | 'curl-up' | 'vo2max';

/** Age band → its row of cells; what the cells mean is said beside each table. */
export type CellTable = Readonly<Record<Sex, Readonly<Record<string, readonly number[]>>>>;

/** A published table as it is cited. */
export interface PublishedTable {
  readonly id: string;
  readonly title: string;
  readonly citation: string;
  readonly year: string;
  /** Who was measured. */
  readonly population: string;
}

/** What some tests need to know beside the number. */
export interface StandingDetail {
  /** Push-ups: without a clock (the product's own test, and the default) or within one minute. */
  readonly protocol?: 'to-failure' | 'one-minute';
  /** Step test: the height of the step that was used. */
  readonly stepHeightMm?: number | null;
  /** Walk: body mass and the pulse at the end. */
  readonly massKg?: number | null;
  readonly endPulse?: number | null;
  /** Waist: stature. */
  readonly heightCm?: number | null;
  /** Medicines that slow the pulse. */
  readonly pulseMedicine?: boolean;
  readonly pregnant?: boolean;
}

export interface StandingQuery {
  readonly test: StandingTest;
  readonly form?: string | null;
  /** In the unit of the test (see its benchmark); mL/kg/min for VO2max. */
  readonly value: number;
  readonly ageYears: number | null;
  readonly sex: Sex | null;
  readonly detail?: StandingDetail;
}

/** A word of a table with its place among the others: rank 0 is the lowest of `of`. */
export interface Category {
  readonly word: string;
  readonly rank: number;
  readonly of: number;
}

/** A percentile inside the table's limits, or which limit it lies beyond: never 137th. */
export type Percentile = { readonly value: number } | { readonly above: number } | { readonly below: number };

export interface Neighbours {
  /** The next cut that is better: how much is missing, in the unit of the test, and its name. */
  readonly up: { readonly cut: number; readonly needed: number; readonly name: string } | null;
  /** The cut that the result stands on, and by how much it clears it. */
  readonly down: { readonly cut: number; readonly margin: number; readonly name: string } | null;
}

/** A tick for the chart: where a word or a percentile begins. */
export interface Band {
  readonly value: number;
  readonly word: string;
}

/** Another table that says otherwise of the same result. */
export interface Disagreement {
  readonly title: string;
  readonly citation: string;
  readonly flag: Flag;
  readonly sentence: string;
}

export interface Placed {
  readonly kind: 'placed';
  readonly table: PublishedTable;
  readonly category?: Category;
  readonly percentile?: Percentile;
  /** mL/kg/min, when the table is one of VO2max and the test only estimates it. */
  readonly vo2max?: number;
  readonly neighbours: Neighbours;
  readonly bands: readonly Band[];
  readonly sentence: string;
  readonly citation: string;
  readonly population: string;
  readonly year: string;
  /** The weakest flag among the cells that placed the result. */
  readonly flag: Flag;
  readonly disagreements: readonly Disagreement[];
  /** What scales of other populations say, told as such. */
  readonly elsewhere: readonly string[];
}

export type NoNumberReason =
  | 'nonsense'
  | 'no-table'
  | 'other-protocol'
  | 'other-population'
  | 'age-missing'
  | 'age-outside'
  | 'sex-missing'
  | 'detail-missing'
  | 'medicines'
  | 'pregnancy';

export interface NoNumber {
  readonly kind: 'no-number';
  readonly reason: NoNumberReason;
  readonly sentence: string;
  readonly elsewhere: readonly string[];
}

/** Where a result sits in a published table, or the sentence that says why no table fits. */
export type Standing = Placed | NoNumber;
