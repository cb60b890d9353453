import { item } from './items.ts';
import type { EdgeIndex } from './limbs.ts';
import type { Skeleton } from './skeleton.ts';
import { spineAt, trunkDepths } from './spine.ts';
import type { Point } from './types.ts';
import { dot } from './vectors.ts';
import type { View } from './view.ts';

/** Both edges of the trunk on the paper, millimetres. Edge 0 is the front or the figure's right. */
export interface TrunkEdges {
  readonly points: readonly [Point[], Point[]];
  readonly centres: readonly Point[];
  /** Toward edge 0. */
  readonly normals: readonly Point[];
  readonly widths: readonly [number[], number[]];
  readonly front: EdgeIndex;
}

/** The edges at heights over the hip joint (fractions of stature); `grow` is cloth, in the same unit. */
export function trunkEdges(
  S: Skeleton,
  view: View,
  heights: readonly number[],
  grow: (t: number) => number = () => 0,
): TrunkEdges {
  const points: [Point[], Point[]] = [[], []];
  const widths: [number[], number[]] = [[], []];
  const centres: Point[] = [];
  const normals: Point[] = [];
  for (const t of heights) {
    const { p, R } = spineAt(S, t);
    const low = view.project(spineAt(S, t - 0.012).p);
    const high = view.project(spineAt(S, t + 0.012).p);
    const length = Math.hypot(high[0] - low[0], high[1] - low[1]);
    const centre = view.project(p);
    const [front, back, side] = trunkDepths(S.body, t);
    const up: Point = length > 6 ? [(high[0] - low[0]) / length, (high[1] - low[1]) / length] : [0, -1];
    centres.push(centre);
    normals.push([-up[1], up[0]]);
    const sides: readonly [Point, Point] = [
      [-up[1], up[0]],
      [up[1], -up[0]],
    ];
    sides.forEach((n, edge) => {
      const inRoom = view.unproject(n);
      const forward = dot(inRoom, R.f);
      const sideways = dot(inRoom, R.s);
      const m = Math.hypot(forward, sideways) || 1;
      const depth = Math.hypot(((forward > 0 ? front : back) * forward) / m, (side * sideways) / m);
      const w = (depth + grow(t)) * S.H * 1000;
      points[edge as EdgeIndex].push([centre[0] + n[0] * w, centre[1] + n[1] * w]);
      widths[edge as EdgeIndex].push(w);
    });
  }
  const mid = Math.floor(heights.length / 2);
  const frame = spineAt(S, item(heights, mid)).R;
  const front = dot(view.unproject(item(normals, mid)), frame.f) > 0 ? 0 : 1;
  return { points, centres, normals, widths, front };
}
