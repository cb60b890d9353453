import { formatNumber } from '../numbers/format.ts';
import type { Unit } from '../movement/types.ts';

const WORDS: Readonly<Record<Unit, readonly [one: string, many: string]>> = {
  reps: ['rep', 'reps'],
  seconds: ['second', 'seconds'],
  flights: ['flight', 'flights'],
};

/** An amount with its unit in words: '1 rep', '12 reps', '40 seconds'. */
export const unitWords = (amount: number, unit: Unit): string =>
  `${formatNumber(amount)} ${WORDS[unit][amount === 1 ? 0 : 1]}`;

/** Sets and amount in words: '3 sets of 12 reps'. */
export const setsOf = (sets: number, amount: number, unit: Unit): string =>
  `${sets} ${sets === 1 ? 'set' : 'sets'} of ${unitWords(amount, unit)}`;
