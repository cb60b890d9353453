import { bandLimits } from '#domain/standing/age-band';
import { standingOf, type Placed, type Sex, type StandingQuery } from '#domain/standing/standing-of';

export const SEXES = ['male', 'female'] as const;
export const PEOPLE: Record<Sex, string> = { male: 'man', female: 'woman' };

/** An age inside a printed band that Newel serves. */
export function ageIn(band: string): number {
  const [from, to] = bandLimits(band);
  return Math.min(Math.max(18, from) + 1, to);
}

/** The place of a result; throws the sentence of a standing without one. */
export function placed(query: StandingQuery): Placed {
  const standing = standingOf(query);
  if (standing.kind !== 'placed') throw new Error(standing.sentence);
  return standing;
}

/** One edge of a table of words: `cut` stands in `word`, one step less in `before`. */
export interface Edge {
  readonly name: string;
  readonly sex: Sex;
  readonly band: string;
  readonly cut: number;
  readonly word: string;
  readonly before: string;
}
