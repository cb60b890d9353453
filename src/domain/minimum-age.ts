/** The one minimum age of the product, in years. Common practice, no source: adults only. */
export const MINIMUM_AGE = 18;

/** An age beyond this is a slip of the pen, not a person (the oldest known person reached 122: memory). */
export const OLDEST_AGE = 120;

/** A moment as its UTC date; an ISO date as it is. */
const isoDateOf = (day: string | Date): string =>
  typeof day === 'string' ? day : day.toISOString().slice(0, 10);

/** Whole years lived on `today`. Dates are ISO ('1990-11-07') or a moment, read in UTC. 29 February counts up on 1 March. */
export function ageOn(birthDate: string, today: string | Date): number {
  const day = isoDateOf(today);
  const years = Number(day.slice(0, 4)) - Number(birthDate.slice(0, 4));
  return day.slice(5) < birthDate.slice(5) ? years - 1 : years;
}

/** Why an ISO date of birth cannot stand, in a sentence for the field; null when it can. */
export function birthDateProblem(birthDate: string, today: string | Date): string | null {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(birthDate)) return 'That is not a date. Write it like 7 Nov 1990.';
  if (birthDate > isoDateOf(today)) return 'This date is still to come. Check the year.';
  const age = ageOn(birthDate, today);
  if (age > OLDEST_AGE) return `That makes ${age} years. Check the year.`;
  if (age < MINIMUM_AGE)
    return `Newel is for people of ${MINIMUM_AGE} and over. Nearly every table here was measured on adults.`;
  return null;
}
