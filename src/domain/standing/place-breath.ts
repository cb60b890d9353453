import { cooperRunDistance, cooperRunVo2max } from '../aerobic/field-tests.ts';
import {
  mileAndHalfSeconds,
  mileAndHalfVo2max,
  rockportSeconds,
  rockportVo2max,
} from '../aerobic/field-tests.ts';
import { formatNumber } from '../numbers/format.ts';
import { peopleOf, rowFor } from './age-band.ts';
import { airForceRunSays, pennsylvaniaSays } from './elsewhere.ts';
import { ageOutside, type Person } from './needs.ts';
import {
  noNumber,
  percentileOf,
  placeByPercentile,
  placeByWords,
  tiltOf,
  type PercentileCell,
} from './place.ts';
import { ordinal, SPEAK_METRES, SPEAK_RACE, SPEAK_VO2MAX, type Speech } from './speech.ts';
import { RUN_POLICE, RUN_POLICE_CELLS } from './tables/police.ts';
import {
  FRIEND_CELLS,
  FRIEND_PERCENTILES,
  isFriendCellRead,
  VO2MAX_COOPER,
  VO2MAX_CUTS,
  VO2MAX_FRIEND,
  VO2MAX_WORDS,
} from './tables/vo2max.ts';
import type { Disagreement, Percentile, Placed, Standing, StandingQuery } from './types.ts';

interface FieldTest {
  readonly speech: Speech;
  readonly value: number;
  readonly vo2max: number;
  /** The result of the test that would give this VO2max: turns the table's cuts into the test's own unit. */
  readonly resultFor: (vo2max: number) => number;
}

/** Cooper's classes, with the cuts told in the unit of the field test; FRIEND's percentiles beside them. */
function placeVo2maxOf({ speech, value, vo2max, resultFor }: FieldTest, person: Person): Placed | null {
  const row = rowFor(VO2MAX_CUTS, person.sex, person.ageYears);
  if (!row) return null;
  const isEstimate = speech !== SPEAK_VO2MAX;
  const say = (result: number) => `${speech.say(result)}, about ${SPEAK_VO2MAX.say(vo2max)}`;
  const placed = placeByWords(
    {
      table: VO2MAX_COOPER,
      speech: isEstimate ? { ...speech, say } : speech,
      value,
      people: peopleOf(person.sex, row.band),
    },
    VO2MAX_WORDS,
    row.cells.map((cut, i) => ({
      value: resultFor(cut),
      flag: isEstimate ? 'derived' : 'published',
      isStrict: i === row.cells.length - 1,
    })),
  );
  return { ...placed, vo2max, disagreements: friendSays(placed, vo2max, person) };
}

/** FRIEND's percentile of a VO2max; null outside 20 to 79. Linear between cells; most cells are from memory. */
export function friendPercentile(
  vo2max: number,
  { ageYears, sex }: Person,
): { readonly percentile: Percentile; readonly flag: Disagreement['flag'] } | null {
  const row = rowFor(FRIEND_CELLS, sex, ageYears);
  if (!row) return null;
  const cells = FRIEND_PERCENTILES.map((percentile, i): PercentileCell => ({
    percentile,
    value: row.cells[i] ?? NaN,
    flag: isFriendCellRead(row.band, percentile) ? 'published' : 'memory',
  }));
  return percentileOf(vo2max, cells, 'more');
}

const sayPercentile = (percentile: Percentile): string =>
  'value' in percentile
    ? `at the ${ordinal(percentile.value)} percentile`
    : 'above' in percentile
      ? `above the ${ordinal(percentile.above)}`
      : `below the ${ordinal(percentile.below)}`;

function friendSays(placed: Placed, vo2max: number, person: Person): readonly Disagreement[] {
  const friend = friendPercentile(vo2max, person);
  if (!friend || tiltOf({ percentile: friend.percentile }) === tiltOf(placed)) return [];
  return [
    {
      title: VO2MAX_FRIEND.title,
      citation: VO2MAX_FRIEND.citation,
      flag: friend.flag,
      sentence: `${SPEAK_VO2MAX.say(vo2max)} stands ${sayPercentile(friend.percentile)} among people measured on a treadmill.`,
    },
  ];
}

/** A VO2max as such, in mL/kg/min. */
export function placeVo2max({ value }: StandingQuery, person: Person): Standing {
  if (!(value >= 5 && value <= 100))
    return noNumber('nonsense', 'A VO2max lies between 5 and 100 mL/kg/min. Check the number.');
  const field = { speech: SPEAK_VO2MAX, value, vo2max: value, resultFor: (vo2max: number) => vo2max };
  return placeVo2maxOf(field, person) ?? ageOutside('The table of VO2max', person.ageYears);
}

/** Twelve-minute run, metres: VO2max by Cooper's equation, then its classes. */
export function placeTwelveMinuteRun({ value }: StandingQuery, person: Person): Standing {
  const field = { speech: SPEAK_METRES, value, vo2max: cooperRunVo2max(value), resultFor: cooperRunDistance };
  return placeVo2maxOf(field, person) ?? ageOutside('The table of VO2max', person.ageYears);
}

/** 1.5 miles, seconds: the percentiles that three police services print; the class of the estimated VO2max beside it. */
export function placeMileAndHalf({ value }: StandingQuery, person: Person): Standing {
  const { ageYears, sex } = person;
  const rows = RUN_POLICE_CELLS[sex];
  const bands = Object.fromEntries(Object.keys(rows).map((band) => [band, []]));
  const band = rowFor({ male: bands, female: bands }, sex, ageYears)?.band;
  const [first, ...rest] = (band === undefined ? [] : (rows[band] ?? [])).map(
    ([percentile, seconds]): PercentileCell => ({
      percentile,
      value: seconds,
      flag: percentile === 20 ? 'derived' : 'published',
    }),
  );
  if (band === undefined || !first) return ageOutside('The table of the run', ageYears);
  const placed = placeByPercentile(
    { table: RUN_POLICE, speech: SPEAK_RACE, value, people: peopleOf(sex, band) },
    [first, ...rest],
  );
  const vo2max = mileAndHalfVo2max(value);
  const byClass = placeVo2maxOf({ speech: SPEAK_RACE, value, vo2max, resultFor: mileAndHalfSeconds }, person);
  const elsewhere = [pennsylvaniaSays('run-1-5-mile', sex, ageYears), airForceRunSays(value, sex, ageYears)];
  return {
    ...placed,
    vo2max,
    disagreements: byClass && tiltOf(byClass) !== tiltOf(placed) ? [classSays(byClass, vo2max)] : [],
    elsewhere: elsewhere.filter((line) => line !== null),
  };
}

function classSays(byClass: Placed, vo2max: number): Disagreement {
  return {
    title: VO2MAX_COOPER.title,
    citation: VO2MAX_COOPER.citation,
    flag: 'derived',
    sentence: `Turned into VO2max (${formatNumber(vo2max, 1)} mL/kg/min) the classes call it ‘${byClass.category?.word ?? ''}’.`,
  };
}

/** One-mile walk, seconds: VO2max by Kline's equation. He measured people of 30 to 69 (memory). */
export function placeWalk({ value, detail }: StandingQuery, person: Person): Standing {
  if (person.ageYears < 30 || person.ageYears >= 70) {
    return noNumber(
      'age-outside',
      'The walk was measured on people of 30 to 69. Your own marks are the measure.',
    );
  }
  if (detail?.pulseMedicine) {
    return noNumber(
      'medicines',
      'With a medicine that slows the pulse the equation says nothing. The time itself is the measure.',
    );
  }
  const { massKg, endPulse } = detail ?? {};
  if (!massKg || !endPulse) {
    return noNumber(
      'detail-missing',
      'The equation needs the weight and the pulse at the end. Without them the time is the measure.',
    );
  }
  const walker = { massKg, ageYears: person.ageYears, sex: person.sex, endPulse };
  const vo2max = rockportVo2max({ ...walker, seconds: value });
  if (vo2max === null || vo2max < 5) {
    return noNumber('nonsense', 'Weight, pulse and time do not fit together. Check the three numbers.');
  }
  const resultFor = (wanted: number) => rockportSeconds(walker, wanted);
  const placed = placeVo2maxOf({ speech: SPEAK_RACE, value, vo2max, resultFor }, person);
  return placed ?? ageOutside('The table of VO2max', person.ageYears);
}
