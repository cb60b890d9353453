import { smoothPath } from './paths.ts';
import type { Pose, Point, V3, ViewName } from './types.ts';
import { combine, dot, RADIANS } from './vectors.ts';

/** A flat camera: what lies right, up and toward the reader, and how outlines are inked. */
export interface View {
  readonly name: ViewName;
  readonly right: V3;
  readonly up: V3;
  readonly toward: V3;
  readonly project: (p: V3) => Point;
  /** A direction on the paper as a direction in the room. */
  readonly unproject: (n: Point) => V3;
  /** A closed smooth outline; flesh never crosses the floor line, it flattens. */
  readonly outline: (points: readonly Point[]) => string;
  /** The same, left open. */
  readonly stroke: (points: readonly Point[]) => string;
  /** Seen from the flank, so that walls and stairs show their side. */
  readonly isFlank: boolean;
}

/** Degrees the camera is turned; from the side a little, so that the far limbs show. */
const TURNS: Record<Exclude<ViewName, 'top'>, number> = { side: 8, front: 90, back: -90, quarter: 40 };

function axes(name: ViewName): { right: V3; up: V3; toward: V3 } {
  if (name === 'top') return { right: [1, 0, 0], up: [0, 0, -1], toward: [0, 1, 0] };
  const a = TURNS[name] * RADIANS;
  return { right: [Math.cos(a), 0, -Math.sin(a)], up: [0, 1, 0], toward: [Math.sin(a), 0, Math.cos(a)] };
}

/** The camera that a pose is seen with. */
export function viewOf(name: ViewName): View {
  const { right, up, toward } = axes(name);
  const floor = name === 'top' ? Infinity : 0;
  return {
    name,
    right,
    up,
    toward,
    project: (p) => [dot(p, right) * 1000, -dot(p, up) * 1000],
    unproject: (n) => combine(right, n[0], up, -n[1]),
    outline: (points) => smoothPath(points, floor, true),
    stroke: (points) => smoothPath(points, floor, false),
    isFlank: name === 'side' || name === 'quarter',
  };
}

/** The view asked for, else the pose's own, else the side. */
export const viewNameOf = (pose: Pose, asked?: ViewName): ViewName => asked ?? pose.view ?? 'side';
