import { item, last } from './items.ts';
import type { Skeleton } from './skeleton.ts';
import { profileAt, type Profile } from './spine.ts';
import type { Limb, Point, Side } from './types.ts';
import { dot } from './vectors.ts';
import type { View } from './view.ts';

/** Half depths along a segment, fractions of stature (EST): place, front, back, outer, inner. */
const PROFILES: Record<Limb, Profile> = {
  thigh: [
    [0, 0.058, 0.062, 0.052, 0.046],
    [0.2, 0.058, 0.056, 0.054, 0.047],
    [0.45, 0.052, 0.047, 0.047, 0.041],
    [0.72, 0.041, 0.036, 0.036, 0.035],
    [0.9, 0.035, 0.032, 0.03, 0.032],
    [1, 0.034, 0.028, 0.028, 0.03],
  ],
  shank: [
    [0, 0.032, 0.029, 0.028, 0.03],
    [0.12, 0.028, 0.035, 0.029, 0.03],
    [0.3, 0.0235, 0.0445, 0.033, 0.034],
    [0.52, 0.0215, 0.034, 0.027, 0.027],
    [0.76, 0.019, 0.0225, 0.0185, 0.0185],
    [1, 0.0195, 0.0205, 0.019, 0.019],
  ],
  upperArm: [
    [0, 0.031, 0.031, 0.024, 0.028],
    [0.2, 0.0355, 0.035, 0.032, 0.03],
    [0.5, 0.0295, 0.03, 0.027, 0.026],
    [0.8, 0.0235, 0.0245, 0.024, 0.024],
    [1, 0.0215, 0.0235, 0.023, 0.024],
  ],
  foreArm: [
    [0, 0.0235, 0.022, 0.024, 0.025],
    [0.22, 0.0265, 0.0215, 0.027, 0.026],
    [0.55, 0.0205, 0.0175, 0.022, 0.021],
    [0.85, 0.0145, 0.014, 0.017, 0.0165],
    [1, 0.0135, 0.0135, 0.0165, 0.016],
  ],
};
const ENDS = {
  thigh: ['hip', 'knee'],
  shank: ['knee', 'ankle'],
  upperArm: ['shoulder', 'elbow'],
  foreArm: ['elbow', 'wrist'],
} as const;

export type EdgeIndex = 0 | 1;
const EDGE_INDEXES: readonly EdgeIndex[] = [0, 1];

/** Both edges of a limb segment on the paper, millimetres. */
export interface LimbEdges {
  /** Direction of the segment. */
  readonly along: Point;
  readonly lengthMm: number;
  readonly ts: readonly number[];
  readonly points: readonly [Point[], Point[]];
  readonly normals: readonly [Point, Point];
  readonly widths: readonly [number[], number[]];
  /** Half width at a place along one edge. */
  readonly widthAt: (t: number, edge: EdgeIndex) => number;
  /** A point at place `t`, `share` of the way from the middle to the edge. */
  readonly at: (t: number, edge: EdgeIndex, share: number) => Point;
  /** The edge that shows the front of the limb. */
  readonly front: EdgeIndex;
}

interface Stretch {
  readonly from?: number;
  readonly to?: number;
  /** Added all round, fractions of stature: cloth. */
  readonly grow?: number;
  /** Fewer points, for far limbs. */
  readonly isCoarse?: boolean;
}

/** The edges of a segment between two places along it (0 to 1). */
export function limbEdges(
  S: Skeleton,
  view: View,
  limb: Limb,
  side: Side,
  { from = 0, to = 1, grow = 0, isCoarse = false }: Stretch = {},
): LimbEdges {
  const { J, R, H, body } = S;
  const [upper, lower] = ENDS[limb];
  const frame = R[`${limb}${side}`];
  const outward = side === 'R' ? 1 : -1;
  const a = view.project(J[`${upper}${side}`]);
  const b = view.project(J[`${lower}${side}`]);
  const lengthMm = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const along: Point = lengthMm > 12 ? [(b[0] - a[0]) / lengthMm, (b[1] - a[1]) / lengthMm] : [0, 1];
  const normals: readonly [Point, Point] = [
    [along[1], -along[0]],
    [-along[1], along[0]],
  ];
  const profile = PROFILES[limb];
  const inner = profile
    .map((row) => item(row, 0))
    .filter((t, i) => t > from + 0.06 && t < to - 0.06 && (!isCoarse || i % 2 === 1));
  const ts = [from, ...inner, to];
  const widthAt = (t: number, edge: EdgeIndex) => {
    const n = view.unproject(normals[edge]);
    const forward = dot(n, frame.f);
    const sideways = dot(n, frame.s) * outward;
    const m = Math.hypot(forward, sideways) || 1;
    const [, front = 0, back = 0, outer = 0, inside = 0] = profileAt(profile, t);
    const depth = ((forward > 0 ? front : back) * forward) / m;
    const breadth = ((sideways > 0 ? outer : inside) * sideways) / m;
    return (Math.hypot(depth, breadth) * body.girth + grow) * H * 1000;
  };
  const at = (t: number, edge: EdgeIndex, share: number): Point => {
    const w = widthAt(t, edge) * share;
    const n = normals[edge];
    return [a[0] + (b[0] - a[0]) * t + n[0] * w, a[1] + (b[1] - a[1]) * t + n[1] * w];
  };
  const edgePoints = (edge: EdgeIndex) => ts.map((t) => at(t, edge, 1));
  const edgeWidths = (edge: EdgeIndex) => ts.map((t) => widthAt(t, edge));
  return {
    along,
    lengthMm,
    ts,
    points: [edgePoints(0), edgePoints(1)],
    normals,
    widths: [edgeWidths(0), edgeWidths(1)],
    widthAt,
    at,
    front: dot(view.unproject(normals[0]), frame.f) > 0 ? 0 : 1,
  };
}

const corner = (p: Point): Point => [p[0], p[1], 1];
const middle = (a: Point, b: Point): Point => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];

type End = 'near' | 'far';
const indexOf = (edges: LimbEdges, end: End) => (end === 'far' ? edges.ts.length - 1 : 0);

/** Three points that round a segment's end. */
function cap(edges: LimbEdges, end: End): Point[] {
  const i = indexOf(edges, end);
  const m = middle(item(edges.points[0], i), item(edges.points[1], i));
  const r = (item(edges.widths[0], i) + item(edges.widths[1], i)) / 2;
  const out = end === 'far' ? 1 : -1;
  const q = 0.72;
  const tip: Point = [m[0] + edges.along[0] * r * out, m[1] + edges.along[1] * r * out];
  const shoulder = (n: Point): Point => [
    m[0] + edges.along[0] * r * out * q + n[0] * r * q,
    m[1] + edges.along[1] * r * out * q + n[1] * r * q,
  ];
  const [first, second] = edges.normals;
  return end === 'far' ? [shoulder(first), tip, shoulder(second)] : [shoulder(second), tip, shoulder(first)];
}

/** The middle of a garment's edge, a little bowed. */
export function hem(edges: LimbEdges, end: End): Point {
  const i = indexOf(edges, end);
  const m = middle(item(edges.points[0], i), item(edges.points[1], i));
  const bow = (item(edges.widths[0], i) + item(edges.widths[1], i)) * 0.16 * (end === 'far' ? 1 : -1);
  return [m[0] + edges.along[0] * bow, m[1] + edges.along[1] * bow];
}

/** The outline of a segment; an end is rounded or cut off as a hem. */
export function tube(view: View, edges: LimbEdges, ends: { near?: 'cut'; far?: 'cut' } = {}): string {
  const [left, right] = EDGE_INDEXES.map((edge) => {
    const points = edges.points[edge].slice();
    if (ends.far) points[points.length - 1] = corner(last(points));
    if (ends.near) points[0] = corner(item(points, 0));
    return points;
  }) as [Point[], Point[]];
  return view.outline([
    ...left,
    ...(ends.far ? [hem(edges, 'far')] : cap(edges, 'far')),
    ...right.reverse(),
    ...(ends.near ? [hem(edges, 'near')] : cap(edges, 'near')),
  ]);
}

const OPEN_FROM = 0.26;

/** A sleeve's edge left open at the shoulder, where it runs into the shirt. */
export function openEdge(view: View, edges: LimbEdges): string {
  const ts = [OPEN_FROM * last(edges.ts), ...edges.ts.slice(1)];
  const left = ts.map((t) => edges.at(t, 0, 1));
  const right = ts.map((t) => edges.at(t, 1, 1)).reverse();
  left[left.length - 1] = corner(last(left));
  right[0] = corner(item(right, 0));
  return view.stroke([...left, hem(edges, 'far'), ...right]);
}
