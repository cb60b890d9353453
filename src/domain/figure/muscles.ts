import { item } from './items.ts';
import { limbEdges } from './limbs.ts';
import { bentStroke } from './paths.ts';
import type { Skeleton } from './skeleton.ts';
import { trunkEdges } from './trunk.ts';
import { SIDES, type Limb, type Point, type Side } from './types.ts';
import { dot } from './vectors.ts';
import type { View } from './view.ts';

/** Segment, from and to along it, from and to across it (-1 back to 1 front), the face it lies on. */
type Area = readonly [
  segment: Limb | 'trunk',
  number,
  number,
  number,
  number,
  face: 'front' | 'back' | 'side',
];

/** Muscles by anatomical name; areas are our own, rough lenses along one segment. */
// prettier-ignore
const MUSCLES: Readonly<Record<string, Area>> = {
  'pectoralis major': ['trunk', 0.215, 0.285, 0.15, 0.98, 'front'],
  'rectus abdominis': ['trunk', 0.02, 0.2, 0.5, 0.97, 'front'],
  'obliquus externus': ['trunk', 0.06, 0.18, -0.25, 0.5, 'side'],
  'erector spinae': ['trunk', 0.05, 0.28, -0.97, -0.62, 'back'],
  'latissimus dorsi': ['trunk', 0.11, 0.24, -0.85, -0.1, 'back'],
  'trapezius': ['trunk', 0.22, 0.312, -0.95, -0.35, 'back'],
  'gluteus maximus': ['trunk', -0.05, 0.07, -0.96, -0.1, 'back'],
  'gluteus medius': ['trunk', 0.01, 0.075, -0.4, 0.3, 'side'],
  'iliopsoas': ['trunk', -0.03, 0.06, 0.35, 0.9, 'front'],
  'transversus abdominis': ['trunk', 0.05, 0.13, -0.1, 0.95, 'front'],
  'serratus anterior': ['trunk', 0.17, 0.235, -0.1, 0.55, 'side'],
  'rhomboidei': ['trunk', 0.22, 0.29, -0.95, -0.5, 'back'],
  'deltoideus': ['upperArm', 0.02, 0.46, -0.75, 0.85, 'side'],
  'triceps brachii': ['upperArm', 0.22, 0.92, -0.95, -0.1, 'back'],
  'biceps brachii': ['upperArm', 0.25, 0.92, 0.1, 0.95, 'front'],
  'forearm flexors': ['foreArm', 0.04, 0.66, 0.05, 0.95, 'front'],
  'quadriceps femoris': ['thigh', 0.1, 0.93, 0.1, 0.95, 'front'],
  'hamstrings': ['thigh', 0.14, 0.93, -0.95, -0.15, 'back'],
  'adductors': ['thigh', 0.08, 0.6, -0.4, 0.3, 'front'],
  'gastrocnemius': ['shank', 0.04, 0.52, -0.96, -0.15, 'back'],
  'soleus': ['shank', 0.4, 0.8, -0.9, -0.2, 'back'],
  'tibialis anterior': ['shank', 0.1, 0.7, 0.35, 0.95, 'front'],
};
export const MUSCLE_NAMES: readonly string[] = Object.keys(MUSCLES);

/** Fibres of the muscles that this view shows, as one path. */
export function musclePath(S: Skeleton, view: View, names: readonly string[], isSide: boolean): string {
  return names
    .flatMap((name) => {
      const area = MUSCLES[name];
      if (!area) throw new RangeError(`no muscle is called ${name}`);
      const sides: readonly Side[] = area[0] === 'trunk' || isSide ? ['R'] : SIDES;
      return sides.map((side) => fibres(S, view, area, side));
    })
    .join('');
}

function fibres(S: Skeleton, view: View, [segment, from, to, low, high, face]: Area, side: Side): string {
  const isFlank = Math.abs(dot(view.toward, S.R.pelvis.s)) > 0.7;
  const facing = dot(view.toward, S.R.pelvis.f);
  if (!isFlank && ((face === 'front' && facing < 0) || (face === 'back' && facing > 0))) return '';
  const isTrunk = segment === 'trunk';
  const broad = isTrunk ? 0.7 : 0.62;
  const [first, last] = isFlank ? [low, high] : [-broad, broad];
  const count = isTrunk ? 8 : 6;
  const middle = (first + last) / 2;
  const at = isTrunk ? onTrunk(S, view) : onLimb(S, view, segment, side);
  let path = '';
  for (let i = 0; i < count; i += 1) {
    const share = i / (count - 1);
    const across = first + (last - first) * share;
    const length = Math.sin(Math.PI * (0.12 + 0.76 * share));
    const start = from + (to - from) * 0.5 * (1 - length);
    const end = to - (to - from) * 0.5 * (1 - length);
    const drawnIn = isFlank ? middle + (across - middle) * 0.86 : across * 0.84;
    const a = at(start, drawnIn);
    const m = at((start + end) / 2, across);
    const b = at(end, drawnIn);
    path += bentStroke(a, [2 * m[0] - (a[0] + b[0]) / 2, 2 * m[1] - (a[1] + b[1]) / 2], b);
  }
  return path;
}

/** A point along a segment, `across` from -1 (back) to 1 (front). */
type Across = (t: number, across: number) => Point;

function onLimb(S: Skeleton, view: View, limb: Limb, side: Side): Across {
  const edges = limbEdges(S, view, limb, side);
  const back = edges.front === 0 ? 1 : 0;
  return (t, across) => edges.at(t, across >= 0 ? edges.front : back, Math.abs(across));
}

function onTrunk(S: Skeleton, view: View): Across {
  return (t, across) => {
    const trunk = trunkEdges(S, view, [t]);
    const edge = across >= 0 ? trunk.front : trunk.front === 0 ? 1 : 0;
    const centre = item(trunk.centres, 0);
    const out = item(trunk.points[edge], 0);
    const share = Math.abs(across);
    return [centre[0] + (out[0] - centre[0]) * share, centre[1] + (out[1] - centre[1]) * share];
  };
}
