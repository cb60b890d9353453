import { formatDuration } from '../numbers/format.ts';
import type { Person } from './needs.ts';
import { noNumber, placeByPercentile, type PercentileCell } from './place.ts';
import { SPEAK_HOLD } from './speech.ts';
import type { PublishedTable, Sex, Standing, StandingQuery } from './types.ts';

export const PLANK_LINFIELD: PublishedTable = {
  id: 'linfield-plank',
  title: 'Plank on the elbows, seconds: quartiles of students',
  citation: 'Linfield College student symposium 2014',
  year: '2014',
  population: '168 students of one college in the United States, 18 to 25',
};

/** Seconds at the 25th, 50th and 75th percentile. */
export const PLANK_QUARTILES: Readonly<Record<Sex, readonly [number, number, number]>> = {
  male: [77, 106, 128.5],
  female: [63, 90, 121],
};

/** Mean of the larger group of students: Strand 2014, n = 471. */
export const PLANK_MEANS: Readonly<Record<Sex, number>> = { male: 124, female: 83 };

/** A plank held, in seconds: quartiles of students of 18 to 25, and nobody else. */
export function placePlank({ value }: StandingQuery, { ageYears, sex }: Person): Standing {
  if (ageYears >= 26) {
    return noNumber(
      'other-population',
      'Only students of 18 to 25 were measured. Your own marks are the measure.',
    );
  }
  const [low, middle, high] = PLANK_QUARTILES[sex];
  const cell = (percentile: number, seconds: number): PercentileCell => ({
    percentile,
    value: seconds,
    flag: 'published',
  });
  const input = {
    table: PLANK_LINFIELD,
    speech: SPEAK_HOLD,
    value,
    people: sex === 'male' ? 'male students of 18 to 25' : 'female students of 18 to 25',
  };
  const placed = placeByPercentile(input, [cell(25, low), cell(50, middle), cell(75, high)]);
  const mean = PLANK_MEANS[sex];
  if (value >= middle === value >= mean) return placed;
  return {
    ...placed,
    disagreements: [
      {
        title: 'A larger group of students',
        citation: 'Strand 2014, J Hum Kinet 2014;40:93-102 (471 students)',
        flag: 'published',
        sentence: `A larger group of students held ${formatDuration(mean)} on average. By that it is ${
          value >= mean ? 'above' : 'below'
        } the middle.`,
      },
    ],
  };
}
