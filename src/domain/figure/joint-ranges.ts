import type { Angle, SideAngle } from './types.ts';

type Range = readonly [least: number, most: number];

/** Degrees. AAOS joint motion (memory); ankle, toes and wrist widened for loaded end positions (memory). */
const RANGES: Partial<Record<Angle | SideAngle, Range>> = {
  lum: [-30, 60],
  tho: [-25, 45],
  neck: [-60, 50],
  sh: [-60, 182],
  abd: [-40, 180],
  elb: [-3, 150],
  wri: [-80, 92],
  hip: [-30, 125],
  hab: [-30, 50],
  knee: [-3, 150],
  ank: [-50, 38],
  mtp: [-35, 92],
};
export const ANKLE_RANGE: Range = [-50, 38];
export const TOE_RANGE: Range = [-35, 92];

/** The range of a joint in degrees, or null where none is kept. */
export function rangeOf(angle: Angle): Range | null {
  return RANGES[angle] ?? RANGES[angle.slice(0, -1) as SideAngle] ?? null;
}

/** Degrees beyond a range, one degree early so that a solved joint stays inside; 0 within. */
export function beyond(value: number, [least, most]: Range): number {
  return Math.max(0, value - most + 1) - Math.max(0, least + 1 - value);
}
