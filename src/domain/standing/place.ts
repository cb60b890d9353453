import { weakestFlag } from '../methods/flags.ts';
import type { Flag } from '../methods/types.ts';
import { ordinal, type Speech } from './speech.ts';
import type {
  Band,
  Category,
  Neighbours,
  NoNumber,
  NoNumberReason,
  Percentile,
  Placed,
  PublishedTable,
} from './types.ts';

/** A cut of a table: the value at which `word` (or a percentile) begins. */
export interface Cut {
  readonly value: number;
  readonly flag: Flag;
  /** True when the word begins beyond the value and not at it. */
  readonly isStrict?: boolean;
}

export interface PlaceInput {
  readonly table: PublishedTable;
  readonly speech: Speech;
  readonly value: number;
  /** 'men of 30 to 39'. */
  readonly people: string;
}

/** 0.1 + 0.2 as a person means it. */
const withoutBinaryRest = (value: number): number => Number(value.toFixed(6));

/** A difference in whole steps of the test, rounded up; a strict cut needs one step beyond it. */
function needed(speech: Speech, value: number, cut: Cut): number {
  const gap = Math.abs(cut.value - value) / speech.step;
  // 1e-9 forgives the binary rest of sums such as 0.1 + 0.2.
  const steps = cut.isStrict ? Math.floor(gap + 1e-9) + 1 : Math.ceil(gap - 1e-9);
  return withoutBinaryRest(steps * speech.step);
}

function meets(speech: Speech, value: number, { value: cut, isStrict }: Cut): boolean {
  const lead = speech.better === 'more' ? value - cut : cut - value;
  return isStrict ? lead > 0 : lead >= 0;
}

const quote = (word: string): string => `‘${word}’`;

function neighboursOf(
  { speech, value }: PlaceInput,
  up: (Cut & { name: string }) | undefined,
  down: (Cut & { name: string }) | undefined,
): Neighbours {
  return {
    up: up ? { cut: up.value, needed: needed(speech, value, up), name: up.name } : null,
    down: down
      ? { cut: down.value, margin: withoutBinaryRest(Math.abs(value - down.value)), name: down.name }
      : null,
  };
}

function finish(
  input: PlaceInput,
  verdict: string,
  neighbours: Neighbours,
  nameOf: (name: string) => string,
) {
  const { table, speech, value, people } = input;
  const next = neighbours.up
    ? `${speech.sayNeeded(neighbours.up.needed)} to ${nameOf(neighbours.up.name)}.`
    : 'The table ends there.';
  return {
    kind: 'placed' as const,
    table,
    neighbours,
    sentence: `${speech.say(value)}: ${verdict} for ${people}. ${next}`,
    citation: table.citation,
    population: table.population,
    year: table.year,
    disagreements: [],
    elsewhere: [],
  };
}

/** Puts a result under one of a table's words. `cuts[i]` begins `words[i + 1]`, from the lowest word to the highest. */
export function placeByWords(input: PlaceInput, words: readonly string[], cuts: readonly Cut[]): Placed {
  const { speech, value } = input;
  const named = cuts.map((cut, i) => ({ ...cut, name: words[i + 1] ?? '' }));
  const rank = named.filter((cut) => meets(speech, value, cut)).length;
  const [down, up] = [named[rank - 1], named[rank]];
  const category: Category = { word: words[rank] ?? '', rank, of: words.length };
  const bands: Band[] = named.map((cut) => ({ value: cut.value, word: cut.name }));
  const flags = [down, up].flatMap((cut) => (cut ? [cut.flag] : []));
  return {
    ...finish(input, quote(category.word), neighboursOf(input, up, down), quote),
    category,
    bands,
    flag: weakestFlag(flags),
  };
}

/** A cell of a percentile table. */
export interface PercentileCell extends Cut {
  readonly percentile: number;
}

/** Where two cells hold the same value, the higher percentile speaks for it. */
function withoutTies(cells: readonly PercentileCell[]): readonly PercentileCell[] {
  return cells.filter((cell, i) => cells[i + 1]?.value !== cell.value);
}

/**
 * Percentile by straight lines between neighbouring cells, rounded to a whole one; beyond the outermost cells only the
 * side is told. Never falls when the result gets better. `cells` ascend in percentile.
 */
export function percentileOf(
  value: number,
  cells: readonly PercentileCell[],
  better: 'more' | 'less',
): { readonly percentile: Percentile; readonly flag: Flag } | null {
  const goodness = (v: number) => (better === 'more' ? v : -v);
  const knots = withoutTies(cells);
  const [lowest, first, last] = [cells[0], knots[0], knots.at(-1)];
  if (!lowest || !first || !last || !Number.isFinite(value)) return null;
  if (goodness(value) < goodness(first.value))
    return { percentile: { below: lowest.percentile }, flag: lowest.flag };
  if (goodness(value) > goodness(last.value))
    return { percentile: { above: last.percentile }, flag: last.flag };
  const index = knots.findIndex((knot) => goodness(knot.value) >= goodness(value));
  const high = knots[index] ?? last;
  if (high.value === value) return { percentile: { value: high.percentile }, flag: high.flag };
  const low = knots[index - 1] ?? first;
  const share = (value - low.value) / (high.value - low.value);
  const between = low.percentile + share * (high.percentile - low.percentile);
  return { percentile: { value: Math.round(between) }, flag: weakestFlag(['derived', low.flag, high.flag]) };
}

function sayPercentile(percentile: Percentile): string {
  if ('above' in percentile) return `above the ${ordinal(percentile.above)} percentile`;
  if ('below' in percentile) return `below the ${ordinal(percentile.below)} percentile`;
  return `the ${ordinal(percentile.value)} percentile`;
}

/** Which percentiles make ticks on a chart; a few, so that the table is not reprinted. */
const TICKS = [10, 20, 25, 30, 50, 70, 75, 90];

/** Puts a result at a percentile. `cells` ascend in percentile and hold at least one. */
export function placeByPercentile(
  input: PlaceInput,
  cells: readonly [PercentileCell, ...PercentileCell[]],
): Placed {
  const { speech, value } = input;
  const found = percentileOf(value, cells, speech.better);
  const percentile = found?.percentile ?? { below: cells[0].percentile };
  const named = withoutTies(cells).map((cell) => ({ ...cell, name: ordinal(cell.percentile) }));
  const down = named.filter((cell) => meets(speech, value, cell)).at(-1);
  const up = named.find((cell) => !meets(speech, value, cell));
  return {
    ...finish(input, sayPercentile(percentile), neighboursOf(input, up, down), (name) => `the ${name}`),
    percentile,
    bands: cells
      .filter((cell) => cells.length === 1 || TICKS.includes(cell.percentile))
      .map((cell) => ({ value: cell.value, word: ordinal(cell.percentile) })),
    flag: found?.flag ?? cells[0].flag,
  };
}

export function noNumber(
  reason: NoNumberReason,
  sentence: string,
  elsewhere: readonly string[] = [],
): NoNumber {
  return { kind: 'no-number', reason, sentence, elsewhere };
}

/** Which half of the table a placing lies in; the middle is no half. */
export function tiltOf({
  category,
  percentile,
}: Pick<Placed, 'category' | 'percentile'>): 'above' | 'below' | 'middle' {
  if (category) {
    const middle = (category.of - 1) / 2;
    const offset = category.rank - middle;
    return Math.abs(offset) < 1 ? 'middle' : offset > 0 ? 'above' : 'below';
  }
  if (!percentile) return 'middle';
  if ('above' in percentile) return percentile.above >= 60 ? 'above' : 'middle';
  if ('below' in percentile) return percentile.below <= 40 ? 'below' : 'middle';
  return percentile.value >= 60 ? 'above' : percentile.value <= 40 ? 'below' : 'middle';
}
