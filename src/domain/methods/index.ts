import { AEROBIC_METHODS } from '../aerobic/method.ts';
import { BODY_METHODS } from '../body/method.ts';
import { CHANGE_METHODS } from '../change/method.ts';
import { LOAD_METHODS } from '../load/method.ts';
import { PACE_METHODS } from '../pace/method.ts';
import { PULSE_METHODS } from '../pulse/method.ts';
import { READINESS_METHODS } from '../readiness/method.ts';
import { STAIRS_METHODS } from '../stairs/method.ts';
import { STANDING_METHODS } from '../standing/method.ts';
import type { MethodEntry } from './types.ts';

export { FLAG_SENTENCES } from './flags.ts';
export type { MethodEntry } from './types.ts';

/** Every number that Newel works out, one entry each, in the order in which the methods page lists them. */
export const METHODS: readonly MethodEntry[] = [
  ...STANDING_METHODS,
  ...CHANGE_METHODS,
  ...PACE_METHODS,
  ...STAIRS_METHODS,
  ...AEROBIC_METHODS,
  ...PULSE_METHODS,
  ...BODY_METHODS,
  ...LOAD_METHODS,
  ...READINESS_METHODS,
];

/** The entry of a methods page; null when there is no such page. */
export function methodOf(slug: string): MethodEntry | null {
  return METHODS.find((method) => method.slug === slug) ?? null;
}
