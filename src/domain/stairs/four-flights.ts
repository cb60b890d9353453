/** The steps of the published test: four flights of 15. */
export const FOUR_FLIGHTS_STEPS = 60;

export const FOUR_FLIGHTS_SOURCE = {
  citation: 'Peteiro Vazquez JC et al. EACVI Best of Imaging 2020, abstract 226872',
  year: '2020',
  population: '165 patients of one hospital sent for an exercise test of the heart',
} as const;

export interface FourFlights {
  readonly band: 'under 60 s' | '60 to 90 s' | '90 s and over';
  /** Share of people in the band for whom the statement held; null in the band between. */
  readonly predictiveValue: number | null;
  /** The capacity in METs that the band speaks of; null in the band between. */
  readonly mets: number | null;
  readonly sentence: string;
}

/**
 * What the time for four flights (60 steps, brisk walk, no stop) said in the one study: a weak sign, and only about heart
 * patients. Under 60 s: 59 in a hundred reached 10 METs (negative predictive value 0.93); 90 s and over: 83 in a hundred
 * stayed under 8. Press versions leave the 59 out. Null when it was not 60 steps or not a time.
 */
export function readFourFlights(steps: number, seconds: number): FourFlights | null {
  if (steps !== FOUR_FLIGHTS_STEPS || !(seconds >= 10 && seconds <= 1800)) return null;
  if (seconds < 60) {
    return {
      band: 'under 60 s',
      predictiveValue: 0.59,
      mets: 10,
      sentence:
        'Under 60 s. Of 165 heart patients, 59 in 100 of those as quick reached 10 METs, and 41 did not. A weak sign, and no test of the heart.',
    };
  }
  if (seconds < 90) {
    return {
      band: '60 to 90 s',
      predictiveValue: null,
      mets: null,
      sentence: 'Between 60 and 90 s. The study says nothing firm about this range.',
    };
  }
  return {
    band: '90 s and over',
    predictiveValue: 0.83,
    mets: 8,
    sentence:
      '90 s or more. Of 165 heart patients, 83 in 100 of those as slow stayed under 8 METs. A weak sign; if stairs have become hard, tell your doctor.',
  };
}
