import { formatNumber } from '../numbers/format.ts';
import type { MethodEntry } from '../methods/types.ts';
import { figureClimb, stairPowerWatts } from './climb.ts';
import { convertSteps, SAME_STEP_MM } from './compare.ts';
import { FOUR_FLIGHTS_SOURCE, readFourFlights } from './four-flights.ts';

const climb = () => figureClimb({ steps: 90, stepHeightMm: 175, seconds: 180, massKg: 70 });
const print = (value: number | null | undefined, decimals: number) => formatNumber(value ?? NaN, decimals);

export const STAIRS_METHODS: readonly MethodEntry[] = [
  {
    slug: 'stairs-height-and-power',
    title: 'Stairs in metres and watts',
    purpose: 'What a count of stairs is worth in height and in work against gravity.',
    formula: 'height = steps × step height; power = mass × 9.81 × height ÷ time',
    units: 'metres, metres a minute, watts, watts a kilogram',
    example: () => ({
      inputs: '90 steps of 17.5 cm in 180 s, a body of 70 kg.',
      result: `${print(climb()?.heightM, 2)} m, ${print(climb()?.metresPerMinute, 2)} m a minute, ${print(climb()?.watts, 0)} W, ${print(climb()?.wattsPerKg, 2)} W/kg. The published example (54 kg, 3 m, 5 s) gives ${print(stairPowerWatts(54, 3, 5), 0)} W.`,
    }),
    sources: [
      {
        citation:
          'Textbook example of stair power (54 kg, 3 m, 5 s: 318 W); height checked with Teh KC, Aziz AR. MSSE 2002;34(4):695-699',
        year: '2002',
        population: 'Arithmetic; the height on one public staircase of 180 steps',
        flag: 'published',
      },
    ],
    limits: [
      'Only lifting counts: balance, the way down and the heat of the muscles are not in it.',
      'It is the mean over the whole time, the way down with it. Carry nothing.',
    ],
    flag: 'published',
  },
  {
    slug: 'stairs-oxygen-cost',
    title: 'Oxygen cost of the stairs',
    purpose: 'How hard the stairs were, in METs and kilocalories.',
    formula:
      'VO2 = 0.2 f + 1.33 × 1.8 × H × f + 3.5; METs = VO2 ÷ 3.5; kcal = METs × 3.5 × kg ÷ 1000 × 5 × minutes',
    units: 'f steps up a minute, H metres, VO2 mL/kg/min',
    example: () => ({
      inputs: '90 steps of 17.5 cm up and down in 180 s, a body of 70 kg.',
      result: `${print(climb()?.vo2, 1)} mL/kg/min, ${print(climb()?.mets, 1)} METs, ${print(climb()?.kcal, 0)} kcal.`,
    }),
    sources: [
      {
        citation: 'ACSM GETP10 Table 6.3; Latin RW et al. MSSE 2001 (PMID 11581567)',
        year: '2001/2018',
        population: '55 adults on a step, 0.1 to 0.3 m, 20 to 25 rounds a minute',
        flag: 'derived',
      },
    ],
    limits: [
      'From 12 to 30 steps a minute and 0.04 to 0.40 m; outside it is left out.',
      'The equation was made on one step. That a flight up and down costs the same step by step is our inference.',
      'Standard error 1.7 mL/kg/min.',
    ],
    flag: 'derived',
  },
  {
    slug: 'stairs-conversion',
    title: 'A count on other stairs',
    purpose: 'What a count made elsewhere would be here, by height.',
    formula: 'steps here = steps there × step height there ÷ step height here',
    units: 'steps',
    example: () => ({
      inputs: '90 steps of 17.5 cm, told on steps of 15 cm.',
      result:
        convertSteps(90, { stepHeightMm: 175, stairCount: 13 }, { stepHeightMm: 150, stairCount: 16 })
          ?.sentence ?? '',
    }),
    sources: [
      {
        citation: 'Common practice, no source',
        year: null,
        population: 'Nobody was measured',
        flag: 'common practice, no source',
      },
    ],
    limits: [
      `The same stairs means as many steps and ${SAME_STEP_MM} mm of height at most between them. Only then do counts compare as they are.`,
      'A longer flight has fewer turns and a steeper one tires otherwise.',
    ],
    flag: 'common practice, no source',
  },
  {
    slug: 'four-flights',
    title: 'Four flights against the clock',
    purpose: 'What one study of heart patients says about the time for 60 steps.',
    formula: 'under 60 s, 60 to 90 s, 90 s and over',
    units: 'seconds',
    example: () => ({ inputs: '60 steps in 58 s.', result: readFourFlights(60, 58)?.sentence ?? '' }),
    sources: [{ ...FOUR_FLIGHTS_SOURCE, flag: 'published' }],
    limits: [
      'One hospital, heart patients, an abstract. It says little about anyone else.',
      'A good time rules nothing out. With chest pain, fainting or new breathlessness see a doctor, whatever the time.',
    ],
    flag: 'published',
  },
];
