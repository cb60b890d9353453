import type { Body } from './bodies.ts';
import { item } from './items.ts';
import type { Skeleton } from './skeleton.ts';
import type { Frame, V3 } from './types.ts';
import { add, clamp01, mix, subtract, unit } from './vectors.ts';

/** Rows of [place, values …] with rising place; between two rows the values are mixed. */
export type Profile = readonly (readonly number[])[];

export function profileAt(rows: Profile, t: number): readonly number[] {
  let index = 0;
  while (index < rows.length - 2 && item(item(rows, index + 1), 0) < t) index += 1;
  const low = item(rows, index);
  const high = item(rows, index + 1);
  const share = clamp01((t - item(low, 0)) / (item(high, 0) - item(low, 0)));
  return low.map((value, n) => value + (item(high, n) - value) * share);
}

/** Half depths of the trunk at a height over the hip joint, fractions of stature (EST): height, front, back, side. */
const TRUNK: Profile = [
  [-0.058, 0.012, 0.016, 0.03],
  [-0.04, 0.036, 0.054, 0.08],
  [0, 0.056, 0.074, 0.0985],
  [0.036, 0.06, 0.076, 0.0985],
  [0.072, 0.059, 0.062, 0.091],
  [0.112, 0.057, 0.047, 0.079],
  [0.15, 0.058, 0.047, 0.078],
  [0.198, 0.063, 0.055, 0.085],
  [0.24, 0.065, 0.0625, 0.095],
  [0.264, 0.06, 0.0625, 0.104],
  [0.288, 0.046, 0.06, 0.11],
  [0.299, 0.039, 0.054, 0.101],
  [0.311, 0.033, 0.046, 0.073],
  [0.328, 0.029, 0.037, 0.04],
];

const bump = (t: number, middle: number, width: number) => Math.exp(-(((t - middle) / width) ** 2));

/** Trunk half depths of a body at height t: front, back, side; fractions of stature. */
export function trunkDepths(body: Body, t: number): readonly [front: number, back: number, side: number] {
  const [, front = 0, back = 0, side = 0] = profileAt(TRUNK, t);
  const k = body.trunk + (1 - body.trunk) * clamp01((t - 0.24) / 0.08) * 0.6;
  const hips = t < 0.1 ? body.hips : 1 + (body.hips - 1) * Math.max(0, 1 - (t - 0.1) / 0.05);
  return [
    front * k + body.belly * bump(t, 0.095, 0.062) + body.bust * bump(t, 0.228, 0.034),
    back * k * (t < 0.07 ? hips : 1),
    side * k * (t < 0.15 ? hips : 1),
  ];
}

const KNOTS = [0, 0.07, 0.168, 0.318, 0.373];
const MIDDLES = [0.02, 0.119, 0.243, 0.35];

/** Point and frame on the smooth spine, t in statures over the hip joints. */
export function spineAt(S: Skeleton, t: number): { p: V3; R: Frame } {
  const { J, R, H } = S;
  const points = [J.pelvis, J.lumbar, J.thorax, J.neck, J.head];
  const along = [0, 1, 2, 3].map((i) => unit(subtract(item(points, i + 1), item(points, i))));
  const frames = [R.pelvis, R.lumbar, R.thorax, R.neck];
  let i = 0;
  while (i < 2 && t > item(MIDDLES, i + 1)) i += 1;
  const w = clamp01((t - item(MIDDLES, i)) / (item(MIDDLES, i + 1) - item(MIDDLES, i)));
  const [a, b] = [item(frames, i), item(frames, i + 1)];
  const frame: Frame = { f: unit(mix(a.f, b.f, w)), u: unit(mix(a.u, b.u, w)), s: unit(mix(a.s, b.s, w)) };
  if (t < 0) return { p: add(J.pelvis, R.pelvis.u, t * H), R: frame };
  let k = 0;
  while (k < 3 && t > item(KNOTS, k + 1)) k += 1;
  const height = item(KNOTS, k + 1) - item(KNOTS, k);
  const tangent = (n: number) => unit(add(item(along, Math.max(0, n - 1)), item(along, Math.min(3, n))));
  return {
    p: hermite(
      item(points, k),
      item(points, k + 1),
      tangent(k),
      tangent(k + 1),
      (t - item(KNOTS, k)) / height,
      height * H,
    ),
    R: frame,
  };
}

/** Cubic through two points with unit tangents scaled by `length`. */
function hermite(from: V3, to: V3, leave: V3, arrive: V3, x: number, length: number): V3 {
  const x2 = x * x;
  const x3 = x2 * x;
  const axis = (n: 0 | 1 | 2) =>
    (2 * x3 - 3 * x2 + 1) * from[n] +
    (x3 - 2 * x2 + x) * leave[n] * length +
    (-2 * x3 + 3 * x2) * to[n] +
    (x3 - x2) * arrive[n] * length;
  return [axis(0), axis(1), axis(2)];
}
