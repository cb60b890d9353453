import { peopleOf, rowFor } from './age-band.ts';
import { ageOutside, type Person } from './needs.ts';
import { noNumber, placeByWords } from './place.ts';
import { SPEAK_BEATS } from './speech.ts';
import { STEP_HOME, STEP_HOME_CUTS, STEP_WORDS, STEP_YMCA, STEP_YMCA_CUTS } from './tables/step.ts';
import type { Disagreement, NoNumber, Placed, Sex, Standing, StandingQuery } from './types.ts';

/** 12 inches, the step of both tables. */
export const TABLE_STEP_MM = 305;
/** How far a step may differ and still be that step. Common practice, no source. */
export const STEP_TOLERANCE_MM = 10;

/** Pulse after three minutes of stepping at 96 beats, counted sitting for one minute. */
export function placeStepTest({ value, detail }: StandingQuery, person: Person): Standing {
  if (detail?.pulseMedicine) {
    return noNumber(
      'medicines',
      'With a medicine that slows the pulse no table fits. Effort and breath are the measure.',
    );
  }
  const height = detail?.stepHeightMm;
  if (!height)
    return noNumber(
      'detail-missing',
      'The tables know one step only: 30.5 cm. Without its height there is no place.',
    );
  if (Math.abs(height - TABLE_STEP_MM) > STEP_TOLERANCE_MM) {
    return noNumber(
      'other-protocol',
      `The tables were made on a step of 30.5 cm. This one is ${height / 10} cm. Your own marks on it are the measure.`,
    );
  }
  const row = rowFor(STEP_YMCA_CUTS, person.sex, person.ageYears);
  if (!row) return ageOutside('The table of the step test', person.ageYears);
  const placed = placeByWords(
    { table: STEP_YMCA, speech: SPEAK_BEATS, value, people: peopleOf(person.sex, row.band) },
    STEP_WORDS,
    row.cells.map((cut) => ({ value: cut, flag: 'memory' })),
  );
  return { ...placed, disagreements: homeTableSays(placed, value, person) };
}

/** The home table beside it. Its copies differ on how the pulse was taken, so it never places, it only disagrees. */
function homeTableSays(placed: Placed, value: number, person: Person): readonly Disagreement[] {
  const other = placeOnHomeTable(value, person);
  if (!other?.category || other.category.word === placed.category?.word) return [];
  return [
    {
      title: STEP_HOME.title,
      citation: STEP_HOME.citation,
      flag: 'published',
      sentence: `A home table calls it ‘${other.category.word}’. Its copies differ on how the pulse was counted.`,
    },
  ];
}

/** The result on the home table alone. Excellent begins below its cut, not at it. */
export function placeOnHomeTable(value: number, { ageYears, sex }: Person): Placed | null {
  const row = rowFor(STEP_HOME_CUTS, sex, ageYears);
  if (!row) return null;
  return placeByWords(
    { table: STEP_HOME, speech: SPEAK_BEATS, value, people: peopleOf(sex, row.band) },
    STEP_WORDS,
    row.cells.map((cut, i) => ({ value: cut, flag: 'published', isStrict: i === row.cells.length - 1 })),
  );
}

/** Mean resting pulse of adults of 20 and over in the United States: NHANES 1999 to 2008, 35,302 people, NHSR 41. */
export const RESTING_PULSE_MEANS: Readonly<Record<Sex, number>> = { male: 71, female: 74 };

/** No table of percentiles of the pulse at rest was read; the mean is told, and no place is given. */
export function placeRestingPulse(sex: Sex | null): NoNumber {
  const mean =
    sex === null
      ? `${RESTING_PULSE_MEANS.male} in men and ${RESTING_PULSE_MEANS.female} in women`
      : `${RESTING_PULSE_MEANS[sex]} in ${sex === 'male' ? 'men' : 'women'}`;
  return noNumber(
    'no-table',
    `The mean pulse at rest is ${mean} (United States, 20 and over). No table of percentiles was found.`,
  );
}
