import type { BenchmarkUnit } from '../benchmark/types.ts';
import { formatNumber } from '../numbers/format.ts';

interface ChangeFacts {
  readonly verdict: string;
  readonly unit: BenchmarkUnit;
  readonly better: 'more' | 'less';
  readonly count: number;
  readonly smallestRealChange95: number;
  readonly difference: { readonly value: number; readonly marks: number };
}

const WORDS = 'no one two three four five six seven eight nine ten eleven twelve'.split(' ');

/** Names of one and of several, and what a rise and a fall are called. Reps and stairs are counted without a name. */
const UNIT_WORDS: Readonly<
  Record<BenchmarkUnit, readonly [one: string, many: string, up: string, down: string]>
> = {
  reps: ['', '', 'more', 'fewer'],
  steps: ['', '', 'more', 'fewer'],
  seconds: ['second', 'seconds', 'longer', 'shorter'],
  beats: ['beat', 'beats', 'higher', 'lower'],
  metres: ['metre', 'metres', 'further', 'shorter'],
  kilograms: ['kilogram', 'kilograms', 'more', 'less'],
  centimetres: ['centimetre', 'centimetres', 'more', 'less'],
};

/**
 * The judgement in words. The error named is the smallest real change between two marks at 95 %, the smear on the
 * jamb. The difference named is that of the marks as they stand; where the model says otherwise, it is told why.
 */
export function describeChange(facts: ChangeFacts): string {
  const { verdict, difference, count, smallestRealChange95 } = facts;
  const error = `the error of this test on you is ${tidyNumber(smallestRealChange95)}`;
  if (count < 2) return `One mark so far. Two more and a change can be told from a good day; ${error}.`;
  const amount = sizeInWords(difference.marks, facts);
  const isBeyondError = Math.abs(difference.marks) >= smallestRealChange95;
  const isTrendOther = Math.sign(difference.marks) !== Math.sign(difference.value);
  if (verdict === 'too early') return `${amount}; too early to say, ${error}.`;
  if (verdict === 'no real change yet') {
    return isBeyondError
      ? `${amount} on the last day; the other marks do not say so yet, and ${error}.`
      : `${amount}; ${error}, so this may be the day and not you.`;
  }
  if (isTrendOther) {
    const trend = sizeInWords(difference.value, facts).toLowerCase();
    const sureness = verdict.startsWith('probably') ? ', likely and not certain' : '';
    return `${amount} on the last day, but over ${inWords(count)} marks ${trend}${sureness}; ${error}.`;
  }
  if (verdict.startsWith('probably')) {
    if (count === 2) return `${amount}; likely, not certain: two marks are few, and ${error}.`;
    return isBeyondError
      ? `${amount}; ${error}, but the marks as a whole make it likely and not certain.`
      : `${amount}; likely, not certain: ${error}.`;
  }
  return isBeyondError
    ? `${amount}; ${error}.`
    : `${amount}, and ${inWords(count)} marks agree; between two marks alone ${error}.`;
}

function sizeInWords(difference: number, { unit, better }: ChangeFacts): string {
  const [one, many, up, down] = UNIT_WORDS[unit];
  const size = tidyNumber(Math.abs(difference));
  if (size === '0') return 'The same as before';
  const isRace = unit === 'seconds' && better === 'less';
  const direction = difference > 0 ? (isRace ? 'slower' : up) : isRace ? 'faster' : down;
  const text = [WORDS[Number(size)] ?? size, size === '1' ? one : many, direction].filter(Boolean).join(' ');
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function inWords(count: number): string {
  return WORDS[count] ?? formatNumber(count);
}

/** One decimal below ten, none above; no trailing nought. */
function tidyNumber(amount: number): string {
  return formatNumber(amount, amount < 9.95 ? 1 : 0);
}
