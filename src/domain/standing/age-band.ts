import type { CellTable, Sex } from './types.ts';

/** Youngest and oldest whole age of a band as tables print it: '30-39', '60+', '<20' (from 18, the product's minimum). */
export function bandLimits(band: string): readonly [number, number] {
  if (band.startsWith('<')) return [18, Number(band.slice(1)) - 1];
  if (band.endsWith('+')) return [Number(band.slice(0, -1)), Infinity];
  const [from, to] = band.split('-').map(Number);
  return [from ?? NaN, to ?? NaN];
}

/** The first band that holds this age; null when the table does not reach it. Years lived count whole. */
export function bandFor(ageYears: number, bands: readonly string[]): string | null {
  const age = Math.floor(ageYears);
  return (
    bands.find((band) => {
      const [from, to] = bandLimits(band);
      return age >= from && age <= to;
    }) ?? null
  );
}

/** The row of a table for this person, with its band. */
export function rowFor(
  table: CellTable,
  sex: Sex,
  ageYears: number,
): { readonly band: string; readonly cells: readonly number[] } | null {
  const band = bandFor(ageYears, Object.keys(table[sex]));
  const cells = band === null ? undefined : table[sex][band];
  return band === null || cells === undefined ? null : { band, cells };
}

/** 'men of 30 to 39', 'women of 60 and over'. */
export function peopleOf(sex: Sex, band: string): string {
  const [from, to] = bandLimits(band);
  const people = sex === 'male' ? 'men' : 'women';
  return to === Infinity ? `${people} of ${from} and over` : `${people} of ${Math.max(from, 18)} to ${to}`;
}
