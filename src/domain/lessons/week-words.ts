const ORDINALS = [
  'first',
  'second',
  'third',
  'fourth',
  'fifth',
  'sixth',
  'seventh',
  'eighth',
  'ninth',
  'tenth',
  'eleventh',
  'twelfth',
];
const NUMBERS = [
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
const LANDING_EVERY = 4;

/** Where in the flight a lesson stands: week 9 is 'the ninth tread', 8 'the second landing', 0 null. */
export function placeInFlight(week: number): string | null {
  if (week < 1) return null;
  const isLanding = week % LANDING_EVERY === 0;
  const place = ORDINALS[(isLanding ? week / LANDING_EVERY : week) - 1];
  return place ? `the ${place} ${isLanding ? 'landing' : 'tread'}` : null;
}

/** Minutes as a reader says them: 'six minutes'. */
export const minutesInWords = (minutes: number): string =>
  minutes === 1 ? 'one minute' : `${NUMBERS[minutes - 1] ?? minutes} minutes`;
