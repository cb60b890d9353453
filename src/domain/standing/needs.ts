import { MINIMUM_AGE, OLDEST_AGE } from '../minimum-age.ts';
import { noNumber } from './place.ts';
import type { NoNumber, Sex } from './types.ts';

/** A person whom a table can be asked about. */
export interface Person {
  readonly ageYears: number;
  readonly sex: Sex;
}

/** Age alone, checked; the answer without a number when it is missing or no age at all. */
export function needAge(ageYears: number | null): number | NoNumber {
  if (ageYears === null) {
    return noNumber(
      'age-missing',
      'The tables go by age. Without a date of birth there is no place, and nothing else is lost.',
    );
  }
  if (!Number.isFinite(ageYears) || ageYears < 0 || ageYears > OLDEST_AGE) {
    return noNumber('nonsense', 'That is not an age. Check the date of birth.');
  }
  if (ageYears < MINIMUM_AGE) {
    return noNumber('age-outside', `Newel gives no place to anyone under ${MINIMUM_AGE}.`);
  }
  return ageYears;
}

/** Age and sex, both checked. */
export function needPerson(ageYears: number | null, sex: Sex | null): Person | NoNumber {
  const age = needAge(ageYears);
  if (typeof age !== 'number') return age;
  if (sex === null) {
    return noNumber(
      'sex-missing',
      'The tables go by sex. Without it there is no place, and nothing else is lost.',
    );
  }
  return { ageYears: age, sex };
}

export const isNoNumber = (answer: number | Person | NoNumber): answer is NoNumber =>
  typeof answer === 'object' && 'kind' in answer;

/** The sentence for a person older or younger than a table. */
export function ageOutside(table: string, ageYears: number): NoNumber {
  return noNumber(
    'age-outside',
    `${table} has no row for the age of ${Math.floor(ageYears)}. Your own marks are the measure.`,
  );
}
