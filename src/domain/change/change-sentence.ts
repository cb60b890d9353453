import type { TestUnit } from './test-errors.ts';

interface ChangeFacts {
  readonly verdict: string;
  readonly unit: TestUnit;
  readonly better: 'more' | 'less';
  readonly count: number;
  readonly smallestRealChange95: number;
  readonly difference: { readonly value: number; readonly marks: number };
}

const WORDS = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];

/** Names of one and of several, and what a rise and a fall are called. Reps and stairs are counted without a name. */
const UNIT_WORDS: Readonly<Record<TestUnit, readonly [one: string, many: string, up: string, down: string]>> =
  {
    reps: ['', '', 'more', 'fewer'],
    steps: ['', '', 'more', 'fewer'],
    points: ['', '', 'more', 'fewer'],
    seconds: ['second', 'seconds', 'longer', 'shorter'],
    beats: ['beat', 'beats', 'more', 'fewer'],
    metres: ['metre', 'metres', 'further', 'shorter'],
    kilograms: ['kilogram', 'kilograms', 'more', 'less'],
    centimetres: ['centimetre', 'centimetres', 'more', 'less'],
  };

/**
 * The judgement in words. The error named is the smallest real change at 95 %, the smear on the jamb.
 * The marks are quoted when they say the same as the trend; otherwise the trend is.
 */
export function describeChange(facts: ChangeFacts): string {
  const { verdict, difference, count } = facts;
  const error = `the error of this test on you is ${trim(facts.smallestRealChange95)}`;
  if (count < 2) return `One mark so far. Two more and a change can be told from a good day; ${error}.`;
  const amount = sizeInWords(difference.marks, facts);
  if (verdict === 'too early') return `${amount}; too early to say, ${error}.`;
  const isTrendTold = Math.sign(difference.marks) !== Math.sign(difference.value);
  if (verdict === 'no real change yet') return `${amount}; ${error}, so this may be the day and not you.`;
  const told = isTrendTold
    ? `The last mark is one day. Over ${inWords(count)} marks: ${sizeInWords(difference.value, facts).toLowerCase()}`
    : amount;
  if (verdict.startsWith('probably')) return `${told}; likely, not certain. For two marks alone ${error}.`;
  return count > 2 && Math.abs(difference.marks) < facts.smallestRealChange95
    ? `${told}, and ${inWords(count)} marks agree; for two marks alone ${error}.`
    : `${told}; ${error}.`;
}

function sizeInWords(difference: number, { unit, better }: ChangeFacts): string {
  const [one, many, up, down] = UNIT_WORDS[unit];
  const rounded = Number(trim(Math.abs(difference)));
  if (rounded === 0) return 'The same as before';
  const isTimed = unit === 'seconds' && better === 'less';
  const direction = difference > 0 ? (isTimed ? 'slower' : up) : isTimed ? 'faster' : down;
  const name = rounded === 1 ? one : many;
  const text = [inWords(rounded), name, direction].filter((word) => word !== '').join(' ');
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function inWords(amount: number): string {
  return WORDS[amount] ?? trim(amount);
}

/** One decimal below ten, none above; no trailing nought. */
function trim(amount: number): string {
  return amount < 10 ? String(Math.round(amount * 10) / 10) : String(Math.round(amount));
}
