import { MINIMUM_AGE } from '../minimum-age.ts';
import { peopleOf, rowFor } from './age-band.ts';
import { airForceSays, marinesSay, pennsylvaniaSays } from './elsewhere.ts';
import { ageOutside, type Person } from './needs.ts';
import { noNumber, placeByPercentile, placeByWords, type PercentileCell } from './place.ts';
import { SPEAK_CURL_UPS, speakCount } from './speech.ts';
import { CHAIR_STAND_CUTS, CHAIR_STAND_STEADI, isChairBandRead } from './tables/chair.ts';
import {
  COOPER_PERCENTILES,
  isPushUpCellRead,
  isSitUpCellRead,
  KNEE_PUSH_UP_MEDIANS,
  KNEE_PUSH_UPS_COOPER,
  PUSH_UP_CELLS,
  PUSH_UPS_COOPER,
  SIT_UP_CELLS,
  SIT_UPS_COOPER,
} from './tables/cooper-minute.ts';
import {
  CSEP_WORDS,
  CURL_UP_CSEP,
  CURL_UP_CUTS,
  isCsepCutRead,
  MAYO_TARGETS,
  OLDER_EDITION_EXCELLENT,
  PUSH_UP_CUTS,
  PUSH_UPS_CSEP,
} from './tables/csep.ts';
import type { Disagreement, NoNumber, Placed, Sex, Standing, StandingQuery } from './types.ts';

function cooperCells(
  cells: readonly number[],
  isRead: (percentile: number) => boolean,
): readonly [PercentileCell, ...PercentileCell[]] {
  const [first, ...rest] = COOPER_PERCENTILES.map((percentile, i): PercentileCell => ({
    percentile,
    value: cells[i] ?? NaN,
    flag: isRead(percentile) ? 'published' : 'memory',
  }));
  if (!first) throw new RangeError('A percentile table needs a cell');
  return [first, ...rest];
}

/** Sit-ups in one minute with the feet held: Cooper percentiles. */
export function placeSitUps({ value, form }: StandingQuery, { ageYears, sex }: Person): Standing {
  if (form === 'feet free') {
    return noNumber(
      'other-protocol',
      'The table counted sit-ups with the feet held. With the feet free the number is another one. Your own marks are the measure.',
    );
  }
  const row = rowFor(SIT_UP_CELLS, sex, ageYears);
  if (!row) return ageOutside('The table of sit-ups', ageYears);
  const input = {
    table: SIT_UPS_COOPER,
    speech: speakCount('sit-ups'),
    value,
    people: peopleOf(sex, row.band),
  };
  const placed = placeByPercentile(
    input,
    cooperCells(row.cells, (percentile) => isSitUpCellRead(sex, row.band, percentile)),
  );
  const elsewhere = [
    pennsylvaniaSays('sit-ups', sex, ageYears),
    airForceSays('sit-ups', value, sex, ageYears),
  ];
  return { ...placed, elsewhere: elsewhere.filter((line) => line !== null) };
}

/** 50 beats a minute are 25 curl-ups. */
const CURL_UPS_MOST = 25;

/** Partial curl-ups to a beat: another test than sit-ups, another table, all of it from memory. */
export function placeCurlUps({ value }: StandingQuery, { ageYears, sex }: Person): Standing {
  if (value > CURL_UPS_MOST)
    return noNumber('nonsense', `The curl-up test ends at ${CURL_UPS_MOST}. Check the number.`);
  const row = rowFor(CURL_UP_CUTS, sex, ageYears);
  if (!row) return ageOutside('The table of curl-ups', ageYears);
  return placeByWords(
    { table: CURL_UP_CSEP, speech: SPEAK_CURL_UPS, value, people: peopleOf(sex, row.band) },
    CSEP_WORDS,
    row.cells.map((cut) => ({ value: cut, flag: 'memory' })),
  );
}

/** Push-ups: to failure (men on the toes, women on the knees) or in one minute (toes; knees for the median of women). */
export function placePushUps(query: StandingQuery, person: Person): Standing {
  const form = query.form ?? 'floor';
  return query.detail?.protocol === 'one-minute'
    ? placePushUpMinute(query.value, form, person)
    : placePushUpsToFailure(query.value, form, person);
}

function placePushUpsToFailure(value: number, form: string, { ageYears, sex }: Person): Standing {
  if (form !== (sex === 'male' ? 'floor' : 'knees')) {
    const sentence =
      sex === 'male'
        ? 'The table measured men on the toes. On the knees there is none. Your own marks are the measure.'
        : 'The table without a clock measured women on the knees. On the toes there is one only for push-ups in a minute.';
    return noNumber('other-protocol', sentence);
  }
  const row = rowFor(PUSH_UP_CUTS, sex, ageYears);
  if (!row) return ageOutside('The table of push-ups', ageYears);
  const placed = placeByWords(
    { table: PUSH_UPS_CSEP, speech: speakCount('push-ups'), value, people: peopleOf(sex, row.band) },
    CSEP_WORDS,
    row.cells.map((cut, step) => ({
      value: cut,
      flag: isCsepCutRead(sex, row.band, step) ? 'published' : 'memory',
    })),
  );
  const said = [olderEditionSays(placed, value, sex, row.band), mayoSays(placed, value, sex, ageYears)];
  return { ...placed, disagreements: said.filter((line) => line !== null) };
}

function olderEditionSays(placed: Placed, value: number, sex: Sex, band: string): Disagreement | null {
  const { from, ...older } = OLDER_EDITION_EXCELLENT;
  if (older.sex !== sex || older.band !== band || value < from || placed.category?.word === 'excellent')
    return null;
  return {
    title: 'Canadian Standardized Test, 1986',
    citation: 'Canadian Standardized Test of Fitness, edition of 1986',
    flag: 'published',
    sentence: `The edition of 1986 called ${from} ‘excellent’. The one of 2003 asks more.`,
  };
}

/** The target of the decade, set beside 'good': the page names one age and no form, so it is a second opinion only. */
function mayoSays(placed: Placed, value: number, sex: Sex, ageYears: number): Disagreement | null {
  const targets: Readonly<Record<string, number>> = MAYO_TARGETS[sex];
  const age = Math.floor(ageYears / 10) * 10 + 5;
  const target = targets[age];
  if (target === undefined || value >= target === (placed.category?.rank ?? 0) >= CSEP_WORDS.indexOf('good'))
    return null;
  return {
    title: 'One target for good fitness',
    citation: MAYO_TARGETS.citation,
    flag: 'published',
    sentence: `Mayo Clinic staff give ${target} as the sign of good fitness at ${age}. By that it is ${
      value >= target ? 'reached' : 'not reached yet'
    }.`,
  };
}

function placePushUpMinute(value: number, form: string, { ageYears, sex }: Person): Standing {
  if (form === 'knees') return placeKneePushUpMinute(value, { ageYears, sex });
  const row = rowFor(PUSH_UP_CELLS, sex, ageYears);
  if (!row) return ageOutside('The table of push-ups in a minute', ageYears);
  const placed = placeByPercentile(
    { table: PUSH_UPS_COOPER, speech: speakCount('push-ups'), value, people: peopleOf(sex, row.band) },
    cooperCells(row.cells, (percentile) => isPushUpCellRead(sex, row.band, percentile)),
  );
  const elsewhere = [
    pennsylvaniaSays('push-ups', sex, ageYears),
    airForceSays('push-ups', value, sex, ageYears),
  ];
  return { ...placed, elsewhere: elsewhere.filter((line) => line !== null) };
}

function placeKneePushUpMinute(value: number, { ageYears, sex }: Person): Standing {
  if (sex === 'male') {
    return noNumber('other-protocol', 'The table measured men on the toes. On the knees there is none.');
  }
  const medians = Object.fromEntries(
    Object.entries(KNEE_PUSH_UP_MEDIANS).map(([band, median]) => [band, [median]]),
  );
  const row = rowFor({ female: medians, male: {} }, sex, ageYears);
  if (!row) return ageOutside('The table of push-ups on the knees', ageYears);
  const input = {
    table: KNEE_PUSH_UPS_COOPER,
    speech: speakCount('push-ups'),
    value,
    people: peopleOf(sex, row.band),
  };
  return placeByPercentile(input, [{ percentile: 50, value: row.cells[0] ?? NaN, flag: 'published' }]);
}

/** No population table of pull-ups for adults was found; the Marines' scale is told as theirs. */
export function placePullUps({ ageYears, sex }: StandingQuery): NoNumber {
  const marines =
    ageYears !== null && ageYears >= MINIMUM_AGE && sex !== null ? marinesSay(sex, ageYears) : null;
  return noNumber(
    'other-population',
    'No table of pull-ups for people in general was found. Your own marks are the measure.',
    marines ? [marines] : [],
  );
}

/** Chair stands in 30 s, 60 to 94: below average, average, and above it where the upper end was read. */
export function placeChairStands({ value }: StandingQuery, { ageYears, sex }: Person): Standing {
  const row = rowFor(CHAIR_STAND_CUTS, sex, ageYears);
  if (!row) {
    return noNumber(
      'age-outside',
      'The table of chair stands begins at 60 and ends at 94. Your own marks are the measure.',
    );
  }
  const flag = isChairBandRead(row.band) ? 'published' : 'memory';
  const [least = NaN, most] = row.cells;
  const words =
    most === undefined
      ? ['below average', 'average or better']
      : ['below average', 'average', 'above average'];
  return placeByWords(
    { table: CHAIR_STAND_STEADI, speech: speakCount('chair-stand'), value, people: peopleOf(sex, row.band) },
    words,
    [{ value: least, flag }, ...(most === undefined ? [] : [{ value: most, flag, isStrict: true } as const])],
  );
}
