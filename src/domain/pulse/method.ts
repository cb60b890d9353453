import { formatNumber } from '../numbers/format.ts';
import type { MethodEntry } from '../methods/types.ts';
import { MAXIMUM_PULSE_ERROR, MAXIMUM_PULSE_FORMULAS, maximumPulse } from './maximum-pulse.ts';
import { pulseZones } from './zones.ts';

function zonesOfForty(): string {
  const answer = pulseZones({ ageYears: 40, restingPulse: 60, pulseMedicine: false, pregnant: false });
  if (answer.kind !== 'zones') return answer.sentence;
  return `${answer.zones.map(({ name, from, to }) => `${name} ${from} to ${to}`).join(', ')}.`;
}

const [tanaka] = MAXIMUM_PULSE_FORMULAS;

export const PULSE_METHODS: readonly MethodEntry[] = [
  {
    slug: 'maximum-pulse',
    title: 'The highest pulse, from age',
    purpose: 'A ceiling for the ranges of effort when nobody has measured it.',
    formula: `${tanaka.text} (used); ${MAXIMUM_PULSE_FORMULAS.slice(1)
      .map(({ text }) => text)
      .join('; ')} (told beside it)`,
    units: 'beats a minute',
    example: () => ({
      inputs: 'Age 40.',
      result: `${MAXIMUM_PULSE_FORMULAS.map((formula) => formatNumber(maximumPulse(40, formula) ?? NaN, 1)).join(', ')} by the three lines.`,
    }),
    sources: [
      {
        citation: tanaka.citation,
        year: tanaka.year,
        population: 'Healthy adults, many studies pooled (memory)',
        flag: tanaka.flag,
      },
      {
        citation: MAXIMUM_PULSE_FORMULAS[1]?.citation ?? '',
        year: '2007',
        population: 'Adults followed in one fitness programme (memory)',
        flag: 'memory',
      },
    ],
    limits: [
      `One person in three is more than ${MAXIMUM_PULSE_ERROR} beats off.`,
      'Never with medicines that change the pulse, never under 18.',
    ],
    flag: 'published',
  },
  {
    slug: 'pulse-ranges',
    title: 'Ranges of pulse by reserve',
    purpose: 'What light, moderate and vigorous effort mean in beats, for this person.',
    formula:
      'pulse = rest + share × (highest − rest); light 30 to 39, moderate 40 to 59, vigorous 60 to 89 per cent',
    units: 'beats a minute',
    example: () => ({ inputs: 'Age 40, 60 beats at rest.', result: zonesOfForty() }),
    sources: [
      {
        citation:
          'Garber CE et al. Med Sci Sports Exerc 2011 (ACSM position stand), read in a table of the BJSM',
        year: '2011',
        population: 'Adults without heart disease; an expert consensus',
        flag: 'published',
      },
      {
        citation: 'Karvonen MJ et al. 1957 (citation: memory; the formula was read in a secondary copy)',
        year: '1957',
        population: 'Six young men (memory)',
        flag: 'published',
      },
    ],
    limits: [
      'The error of the ceiling goes straight into the ranges. Effort and talk outrank them.',
      'None with medicines that change the pulse, and none in pregnancy.',
      'Another review prints vigorous as 60 to 84 per cent.',
    ],
    flag: 'published',
  },
];
