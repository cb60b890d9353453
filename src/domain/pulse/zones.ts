import { MAXIMUM_PULSE_ERROR, maximumPulse } from './maximum-pulse.ts';

export type Intensity = 'very light' | 'light' | 'moderate' | 'vigorous' | 'near-maximal';

/**
 * Intensity by share of the pulse reserve, with the effort on Borg's scale of 6 to 20. Source: Garber CE et al. 2011 (ACSM
 * position stand), read in a table of the BJSM. Another review prints vigorous as 60 to 84 and above it very hard.
 */
export const INTENSITIES = [
  { name: 'very light', fromPercent: 0, borg: 'below 9' },
  { name: 'light', fromPercent: 30, borg: '9 to 11' },
  { name: 'moderate', fromPercent: 40, borg: '12 to 13' },
  { name: 'vigorous', fromPercent: 60, borg: '14 to 17' },
  { name: 'near-maximal', fromPercent: 90, borg: '18 and over' },
] as const satisfies readonly { name: Intensity; fromPercent: number; borg: string }[];

/** The published class of a share of the reserve in per cent; null for a share that is no number or below zero. */
export function intensityOf(reservePercent: number): Intensity | null {
  return INTENSITIES.findLast(({ fromPercent }) => reservePercent >= fromPercent)?.name ?? null;
}

/**
 * Target pulse by reserve: rest + share × (maximum − rest), beats a minute, not rounded. Source: Karvonen MJ et al. Ann
 * Med Exp Biol Fenn 1957;35:307-315 (citation: memory; the formula was read).
 */
export function reservePulse(restingPulse: number, maximum: number, share: number): number {
  return restingPulse + share * (maximum - restingPulse);
}

export interface ZoneQuery {
  readonly ageYears: number | null;
  readonly restingPulse: number | null;
  /** Beta-blockers and other medicines that change the pulse. */
  readonly pulseMedicine: boolean;
  readonly pregnant: boolean;
}

export interface Zone {
  readonly name: Intensity;
  /** Whole beats a minute; the range includes both ends. */
  readonly from: number;
  readonly to: number;
  readonly borg: string;
}

export type Zones =
  | {
      readonly kind: 'zones';
      readonly maximum: number;
      readonly maximumError: number;
      readonly zones: readonly Zone[];
      readonly sentence: string;
    }
  | {
      readonly kind: 'no-zones';
      readonly reason: 'medicines' | 'pregnancy' | 'age-missing' | 'resting-pulse-missing' | 'nonsense';
      readonly sentence: string;
    };

/** What to go by when no pulse can be asked: the talking test. Common practice, no source. */
const BY_TALKING =
  'Go by effort and talk: at an easy effort you can speak in whole sentences, at a hard one only in words.';

/**
 * Ranges of pulse for light, moderate and vigorous effort, by reserve over Tanaka's maximum. None with medicines that
 * change the pulse and none in pregnancy: then effort and the talking test.
 */
export function pulseZones({ ageYears, restingPulse, pulseMedicine, pregnant }: ZoneQuery): Zones {
  if (pulseMedicine)
    return noZones('medicines', `Your medicine changes the pulse, so no range would be true. ${BY_TALKING}`);
  if (pregnant) return noZones('pregnancy', `In pregnancy the pulse misleads. ${BY_TALKING}`);
  if (ageYears === null) return noZones('age-missing', `The ranges go by age. ${BY_TALKING}`);
  if (restingPulse === null)
    return noZones('resting-pulse-missing', `The ranges need your pulse at rest. ${BY_TALKING}`);
  const maximum = maximumPulse(ageYears);
  if (maximum === null || !(restingPulse >= 30 && restingPulse <= 120) || restingPulse > maximum - 30) {
    return noZones('nonsense', `Age and pulse at rest do not fit together. Check both. ${BY_TALKING}`);
  }
  const at = (percent: number) => Math.round(reservePulse(restingPulse, maximum, percent / 100));
  const zones = INTENSITIES.slice(1, 4).map(({ name, fromPercent, borg }, i): Zone => ({
    name,
    from: at(fromPercent),
    to: at(INTENSITIES[i + 2]?.fromPercent ?? 100) - 1,
    borg,
  }));
  return {
    kind: 'zones',
    maximum,
    maximumError: MAXIMUM_PULSE_ERROR,
    zones,
    sentence: `The ceiling of ${Math.round(maximum)} comes from age alone: one person in three is more than ${MAXIMUM_PULSE_ERROR} beats off. Effort outranks it.`,
  };
}

function noZones(reason: Extract<Zones, { kind: 'no-zones' }>['reason'], sentence: string): Zones {
  return { kind: 'no-zones', reason, sentence };
}
