import { WAIST_BANDS, waistToHeight } from '../body/waist-to-height.ts';
import { formatNumber } from '../numbers/format.ts';
import { noNumber } from './place.ts';
import type { PublishedTable, Standing, StandingQuery } from './types.ts';

export const WAIST_NICE: PublishedTable = {
  id: 'nice-waist',
  title: 'Waist over height',
  citation: 'NICE guideline NG246, Overweight and obesity management',
  year: '2025 (year from memory)',
  population: 'Adults with a body mass index below 35; not in pregnancy',
};

/** Waist in centimetres against stature: the bands of NICE. Nothing here asks for sex. */
export function placeWaist({ value, detail }: StandingQuery, ageYears: number): Standing {
  const { heightCm, massKg, pregnant } = detail ?? {};
  if (!heightCm)
    return noNumber('detail-missing', 'The bands go by height. Without your height there is no place.');
  const answer = waistToHeight({
    waistCm: value,
    heightCm,
    massKg: massKg ?? null,
    pregnant: pregnant ?? false,
    ageYears,
  });
  if (!answer.ok) return noNumber(answer.reason, answer.sentence);
  const rank = WAIST_BANDS.findIndex(({ word }) => word === answer.band.word);
  // Below the healthy band there is nothing to aim at.
  const lower =
    rank > WAIST_BANDS.findIndex(({ word }) => word === 'healthy') ? WAIST_BANDS[rank - 1] : undefined;
  return {
    kind: 'placed',
    table: WAIST_NICE,
    category: { word: answer.band.word, rank, of: WAIST_BANDS.length },
    neighbours: {
      up: lower
        ? {
            cut: answer.band.from * heightCm,
            needed: Math.ceil((value - answer.band.from * heightCm) * 10 + 1e-9) / 10,
            name: lower.word,
          }
        : null,
      down: null,
    },
    bands: WAIST_BANDS.slice(1).map(({ from, word }) => ({ value: from * heightCm, word })),
    sentence: `${formatNumber(value, 1)} cm is ${formatNumber(answer.ratio, 3)} of your height: ${answer.band.word}.`,
    citation: WAIST_NICE.citation,
    population: WAIST_NICE.population,
    year: WAIST_NICE.year,
    flag: 'published',
    disagreements: [],
    elsewhere: [],
  };
}
