import { footPath, handPath } from './hands-feet.ts';
import { item, last } from './items.ts';
import { limbEdges, tube, type LimbEdges } from './limbs.ts';
import type { SolvedPose } from './solve-pose.ts';
import { trunkEdges } from './trunk.ts';
import type { Point, Side } from './types.ts';
import type { View } from './view.ts';

/** Cloth stands off the skin by so much, fractions of stature: thigh, shank. */
const STAND_OFF = {
  leggings: [0.0015, 0.0015],
  shorts: [0.006, 0.0015],
  trousers: [0.007, 0.009],
} as const;

interface LegOptions {
  /** Where the cloth or the skin begins along the thigh. */
  readonly from?: number;
  readonly isCoarse?: boolean;
}

export function legCloth(
  S: SolvedPose,
  view: View,
  side: Side,
  { from = 0, isCoarse = false }: LegOptions = {},
): string {
  const { leg } = S.body;
  const [thighOff, shankOff] = STAND_OFF[leg];
  const isShorts = leg === 'shorts';
  const thigh = limbEdges(S, view, 'thigh', side, {
    from,
    to: isShorts ? 0.62 : 1,
    grow: thighOff,
    isCoarse,
  });
  if (isShorts) return tube(view, thigh, { far: 'cut' });
  const to = leg === 'trousers' ? 0.9 : 0.86;
  const shank = limbEdges(S, view, 'shank', side, { to, grow: shankOff, isCoarse });
  return tube(view, thigh) + tube(view, shank, { far: 'cut' });
}

interface SkinOptions extends LegOptions {
  /** The thigh's upper end is cut where shorts cover it. */
  readonly isCut?: boolean;
}

export function legSkin(
  S: SolvedPose,
  view: View,
  side: Side,
  { from = 0.45, isCut = false, isCoarse = false }: SkinOptions = {},
): string {
  const foot = footPath(S, view, side);
  if (S.body.leg !== 'shorts') {
    return tube(view, limbEdges(S, view, 'shank', side, { from: 0.7, isCoarse })) + foot;
  }
  const thigh = limbEdges(S, view, 'thigh', side, { from, isCoarse });
  return (
    tube(view, thigh, isCut ? { near: 'cut' } : {}) +
    tube(view, limbEdges(S, view, 'shank', side, { isCoarse })) +
    foot
  );
}

export function armSkin(S: SolvedPose, view: View, side: Side, isCoarse = false): string {
  return (
    tube(view, limbEdges(S, view, 'upperArm', side, { from: S.body.sleeve * 0.6, isCoarse })) +
    tube(view, limbEdges(S, view, 'foreArm', side, { isCoarse })) +
    handPath(S, view, side)
  );
}

export const sleeveEdges = (S: SolvedPose, view: View, side: Side, isCoarse = false): LimbEdges =>
  limbEdges(S, view, 'upperArm', side, { to: S.body.sleeve, grow: 0.004, isCoarse });

/** The lower garment about the pelvis. */
export function pelvisCloth(S: SolvedPose, view: View): string {
  const grow = (t: number) => (t > 0.06 ? -0.014 : t > 0.05 ? -0.003 : 0.0005);
  const { points } = trunkEdges(S, view, [-0.058, -0.04, 0, 0.032, 0.054, 0.074], grow);
  return view.outline([...points[0], ...points[1].toReversed()]);
}

const SHIRT = [0.052, 0.085, 0.118, 0.16, 0.2, 0.24, 0.266, 0.29, 0.3, 0.311, 0.322];
const HEM_MM = 12;

/** The shirt with its shoulders; `shoulders` are the arms it covers. */
export function shirtPath(S: SolvedPose, view: View, shoulders: readonly Side[]): string {
  const { points, normals } = trunkEdges(S, view, SHIRT, () => 0.0025);
  const corner = (p: Point): Point => [p[0], p[1], 1];
  const front = points[0].with(0, corner(item(points[0], 0)));
  const back = points[1].with(0, corner(item(points[1], 0))).reverse();
  const [a, b, n] = [item(front, 0), last(back), item(normals, 0)];
  const hem: Point = [(a[0] + b[0]) / 2 + n[1] * HEM_MM, (a[1] + b[1]) / 2 - n[0] * HEM_MM];
  const caps = shoulders.map((side) =>
    tube(view, limbEdges(S, view, 'upperArm', side, { to: 0.2, grow: 0.004 })),
  );
  return view.outline([...front, ...back, hem]) + caps.join('');
}
