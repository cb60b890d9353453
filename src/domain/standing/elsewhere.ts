import { formatDuration, formatNumber } from '../numbers/format.ts';
import { bandFor } from './age-band.ts';
import { PENNSYLVANIA_LINES } from './tables/police.ts';
import { AIR_FORCE_LINES_2010, AIR_FORCE_RUN_2022, MARINE_PULL_UPS, NAVY_LEVELS } from './tables/services.ts';
import type { Sex } from './types.ts';

/**
 * Scales of other populations (soldiers, police candidates): told in a sentence as theirs, never as a place.
 * Sources: see the tables; each sentence is null where the scale does not reach.
 */

const EVENTS = { 'sit-ups': 'sitUps', 'push-ups': 'pushUps', 'run-1-5-mile': 'runSeconds' } as const;

/** Pennsylvania's line for police candidates, the 30th percentile: repetitions in a minute, or seconds for the run. */
export function pennsylvaniaLine(event: keyof typeof EVENTS, sex: Sex, ageYears: number): number | null {
  const lines = PENNSYLVANIA_LINES[sex];
  const band = bandFor(ageYears, Object.keys(lines));
  return (band !== null && lines[band]?.[EVENTS[event]]) || null;
}

export function pennsylvaniaSays(event: keyof typeof EVENTS, sex: Sex, ageYears: number): string | null {
  const line = pennsylvaniaLine(event, sex, ageYears);
  if (line === null) return null;
  const said = event === 'run-1-5-mile' ? formatDuration(line) : formatNumber(line);
  return `Pennsylvania asks ${said} of police candidates of that age and sex.`;
}

/** The highest Air Force line of 2010 that a count reaches, with its points of 10; null below a pass or from 30 on. */
export function airForceLine2010(
  event: 'push-ups' | 'sit-ups',
  count: number,
  sex: Sex,
  ageYears: number,
): { readonly reps: number; readonly points: number; readonly word: string } | null {
  if (ageYears >= 30) return null;
  const reached = AIR_FORCE_LINES_2010[sex][event].filter(([reps]) => count >= reps).at(-1);
  return reached ? { reps: reached[0], points: reached[1], word: reached[2] } : null;
}

export function airForceSays(
  event: 'push-ups' | 'sit-ups',
  count: number,
  sex: Sex,
  ageYears: number,
): string | null {
  const line = airForceLine2010(event, count, sex, ageYears);
  return line && `The US Air Force (2010 to 2021, under 30) called ${line.reps} in a minute ${line.word}.`;
}

/** Points of 60 of the US Air Force, 2022, men under 25, for a 1.5-mile time; 0 beyond the last row, null for others. */
export function airForceRunPoints2022(seconds: number, sex: Sex, ageYears: number): number | null {
  if (sex !== 'male' || ageYears >= 25) return null;
  return AIR_FORCE_RUN_2022.find(([slowest]) => Math.round(seconds) <= slowest)?.[1] ?? 0;
}

export function airForceRunSays(seconds: number, sex: Sex, ageYears: number): string | null {
  const points = airForceRunPoints2022(seconds, sex, ageYears);
  return points
    ? `The US Air Force (2022, men under 25) gives it ${formatNumber(points, 1)} of 60 points.`
    : null;
}

/** The Marines' scale of pull-ups: a pass and full points at this age. */
export function marinesSay(sex: Sex, ageYears: number): string | null {
  const rows = MARINE_PULL_UPS[sex];
  const band = bandFor(ageYears, Object.keys(rows));
  const row = band === null ? undefined : rows[band];
  if (!row) return null;
  const [full, pass] = row;
  const memory = sex === 'female' || ageYears >= 46 ? ' (from memory)' : '';
  return `Serving US Marines of that age and sex need ${pass} to pass and ${full} for full points${memory}.`;
}

/** The level of the US Navy test: the mean of the events' points, cut to whole ones, and the level it reaches. */
export function navyLevel(
  points: readonly number[],
): { readonly mean: number; readonly level: string } | null {
  if (points.length === 0 || points.some((p) => !(p >= 0 && p <= 100))) return null;
  const mean = points.reduce((sum, p) => sum + p, 0) / points.length;
  return { mean, level: NAVY_LEVELS.find(([, least]) => mean >= least)?.[0] ?? 'Below the scale' };
}
