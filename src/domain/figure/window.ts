import { HAIR } from './head-outlines.ts';
import { propExtent } from './props.ts';
import type { SolvedPose } from './solve-pose.ts';
import type { Joint, Point, V3 } from './types.ts';
import { place } from './vectors.ts';
import type { View } from './view.ts';

/** The part of the paper that is shown, millimetres, y down; the floor is at 0. */
export interface Window {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

const MARGIN_MM = 28;
/** A strip of floor under the feet. */
const UNDER_FLOOR_MM = 34;

/** How far flesh reaches round a joint, millimetres. */
function reachOf(joint: Joint, hips: number): number {
  if (/hip|pelvis|head/.test(joint)) return 135 * Math.max(1, hips);
  return /knee|crown|neck|thorax|lumbar|shoulder/.test(joint) ? 105 : 62;
}

/** The window that holds a figure and its props. */
export function windowOf(S: SolvedPose, view: View): Window {
  const xs: number[] = [];
  const ys: number[] = [];
  const take = (x: number, y: number) => {
    xs.push(x);
    ys.push(y);
  };
  for (const [name, at] of Object.entries(S.J) as [Joint, V3][]) {
    const reach = reachOf(name, S.body.hips);
    const [x, y] = view.project(at);
    const above = name === 'crown' ? 62 : /hip|pelvis/.test(name) ? reach : Math.min(reach, 85);
    take(x - reach, y - above);
    take(x + reach, y + (view.name === 'top' ? reach : 20));
  }
  for (const [front, up] of HAIR[S.body.hair]) {
    const [x, y] = view.project(place(S.J.head, S.R.head, front * S.H, up * S.H));
    take(x - 14, y - 14);
    take(x + 14, y);
  }
  for (const prop of S.pose.props ?? []) {
    for (const [x, y] of propExtent(prop, view)) take(...toPair(view.project([x, y, 0])));
    if (prop.t === 'frame' && !view.isFlank) {
      take(-500, 0);
      take(500, 0);
    }
  }
  return {
    left: Math.min(...xs) - MARGIN_MM,
    top: Math.min(...ys) - MARGIN_MM,
    right: Math.max(...xs) + MARGIN_MM,
    bottom: (view.name === 'top' ? Math.max(...ys) : UNDER_FLOOR_MM) + MARGIN_MM,
  };
}

const toPair = ([x, y]: Point): [number, number] => [x, y];

/** The window that holds several, so that phases stand side by side on one floor at one scale. */
export function jointWindow(windows: readonly Window[]): Window {
  return {
    left: Math.min(...windows.map(({ left }) => left)),
    top: Math.min(...windows.map(({ top }) => top)),
    right: Math.max(...windows.map(({ right }) => right)),
    bottom: Math.max(...windows.map(({ bottom }) => bottom)),
  };
}
