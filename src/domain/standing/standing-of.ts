import { isTestId, limitProblem } from '../benchmark/tests.ts';
import { isNoNumber, needAge, needPerson, type Person } from './needs.ts';
import { noNumber } from './place.ts';
import { placeMileAndHalf, placeTwelveMinuteRun, placeVo2max, placeWalk } from './place-breath.ts';
import { placeChairStands, placeCurlUps, placePullUps, placePushUps, placeSitUps } from './place-counts.ts';
import { placePlank } from './place-plank.ts';
import { placeRestingPulse, placeStepTest } from './place-pulse.ts';
import { placeWaist } from './place-waist.ts';
import type { Standing, StandingQuery, StandingTest } from './types.ts';

export type * from './types.ts';

type ByPerson = (query: StandingQuery, person: Person) => Standing;

/** The tests whose tables go by age and sex. */
const BY_PERSON: Partial<Record<StandingTest, ByPerson>> = {
  'sit-ups': placeSitUps,
  'push-ups': placePushUps,
  'curl-up': placeCurlUps,
  'chair-stand': placeChairStands,
  plank: placePlank,
  'step-test': placeStepTest,
  'run-12': placeTwelveMinuteRun,
  'run-1-5-mile': placeMileAndHalf,
  walk: placeWalk,
  vo2max: placeVo2max,
};

function problemWith({ test, value }: StandingQuery): string | null {
  if (!Number.isFinite(value)) return 'That is not a number.';
  if (isTestId(test)) return limitProblem(test, value);
  return value < 0 ? 'A count cannot be below zero.' : null;
}

/**
 * Where a result sits in the published table that fits its protocol, sex and age: word or percentile, neighbours,
 * citation, population, flag and the tables that say otherwise. When none fits: no number, and a sentence that says why.
 * Percentiles are drawn straight between the cells and never beyond them.
 */
export function standingOf(query: StandingQuery): Standing {
  const { test, ageYears, sex } = query;
  const problem = problemWith(query);
  if (problem) return noNumber('nonsense', problem);

  if (test === 'stairs') {
    return noNumber(
      'no-table',
      'No table counts stairs in three minutes. Your own marks, on the same stairs, are the measure.',
    );
  }
  if (test === 'weight') {
    return noNumber(
      'no-table',
      'Weight has no place in a table here. Muscle comes before fat goes, so weight alone says little.',
    );
  }
  const place = BY_PERSON[test];
  if (place) {
    const person = needPerson(ageYears, sex);
    return isNoNumber(person) ? person : place(query, person);
  }
  if (test === 'pull-ups') return placePullUps(query);
  if (test === 'resting-pulse') return placeRestingPulse(sex);
  const age = needAge(ageYears);
  return isNoNumber(age) ? age : placeWaist(query, age);
}
