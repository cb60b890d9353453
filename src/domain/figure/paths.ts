import { item } from './items.ts';
import type { Point } from './types.ts';

/** Whole drawing units of 2 mm. */
export function units(millimetres: number): number {
  const rounded = Math.round(millimetres / 2);
  return rounded === 0 ? 0 : rounded;
}

/** Two numbers as short as path data allows. */
export const pair = (x: number, y: number): string => `${x}${y < 0 ? '' : ' '}${y}`;

type Pair = readonly [x: number, y: number];

function pairs(...list: readonly Pair[]): string {
  return list.reduce((text, [x, y]) => text + (text && x >= 0 ? ' ' : '') + pair(x, y), '');
}

/** Twice the signed area of a closed outline. */
function signedArea(points: readonly Point[]): number {
  return points.reduce((sum, p, i) => {
    const q = item(points, (i + 1) % points.length);
    return sum + p[0] * q[1] - q[0] * p[1];
  }, 0);
}

const NEAREST_MM = 2.2;
const HANDLE = 0.36;

/** Bezier handle at each point: along its neighbours, none at a corner. */
function handlesOf(points: readonly Point[], closed: boolean): Pair[] {
  const n = points.length;
  return points.map((p, i) => {
    if (p[2]) return [0, 0];
    const a = item(points, closed ? (i - 1 + n) % n : Math.max(0, i - 1));
    const c = item(points, closed ? (i + 1) % n : Math.min(n - 1, i + 1));
    const [dx, dy] = [c[0] - a[0], c[1] - a[1]];
    const length = Math.hypot(dx, dy) || 1;
    const back = Math.hypot(p[0] - a[0], p[1] - a[1]) || 1e9;
    const ahead = Math.hypot(p[0] - c[0], p[1] - c[1]) || 1e9;
    const size = Math.min(back, ahead, (length / 2) * 1.25) * HANDLE;
    return [(dx / length) * size, (dy / length) * size];
  });
}

/**
 * A smooth path through points: whole units, relative, with the short `s` curve. Points below `floorY` (millimetres,
 * y down) are lifted to it. Closed outlines all wind the same way, so that overlapping shapes unite.
 */
export function smoothPath(points: readonly Point[], floorY: number, closed: boolean): string {
  const lifted = points.map((p): Point => (p[1] > floorY ? [p[0], floorY, p[2]] : p));
  const wound = closed && signedArea(lifted) < 0 ? lifted.toReversed() : lifted;
  const P = wound.filter((p, i) => {
    if (i === 0) return true;
    const before = item(wound, i - 1);
    return Math.hypot(p[0] - before[0], p[1] - before[1]) > NEAREST_MM;
  });
  const n = P.length;
  if (n < 2) return '';
  const handles = handlesOf(P, closed);
  const start = item(P, 0);
  const leave = item(handles, 0);
  let [x, y] = [units(start[0]), units(start[1])];
  let path = `M${pair(x, y)}`;
  for (let i = 1; i <= (closed ? n : n - 1); i += 1) {
    const p = item(P, i % n);
    const h = item(handles, i % n);
    const arrive: Pair = [units(p[0] - h[0]) - x, units(p[1] - h[1]) - y];
    const end: Pair = [units(p[0]) - x, units(p[1]) - y];
    if (i === 1) path += `c${pairs([units(leave[0]), units(leave[1])], arrive, end)}`;
    else path += (i === 2 ? 's' : arrive[0] >= 0 ? ' ' : '') + pairs(arrive, end);
    x += end[0];
    y += end[1];
  }
  return path + (closed ? 'z' : '');
}

/** Straight strokes through points. */
export function linePath(points: readonly Point[]): string {
  const start = item(points, 0);
  let [x, y] = [units(start[0]), units(start[1])];
  let path = `M${pair(x, y)}`;
  points.slice(1).forEach((p, i) => {
    const [a, b] = [units(p[0]), units(p[1])];
    path += (i === 0 ? 'l' : a - x >= 0 ? ' ' : '') + pair(a - x, b - y);
    [x, y] = [a, b];
  });
  return path;
}

/** One bent stroke: from, through the handle, to. */
export function bentStroke(from: Point, handle: Point, to: Point): string {
  const [x, y] = [units(from[0]), units(from[1])];
  return `M${pair(x, y)}q${pairs([units(handle[0]) - x, units(handle[1]) - y], [units(to[0]) - x, units(to[1]) - y])}`;
}

/** Collects short straight strokes as one relative path. */
export class Pencil {
  #path = '';
  #x = 0;
  #y = 0;

  stroke(from: Point, to: Point): void {
    const [ax, ay] = [units(from[0]), units(from[1])];
    const [bx, by] = [units(to[0]), units(to[1])];
    this.#path += `${this.#path ? 'm' : 'M'}${pair(ax - this.#x, ay - this.#y)}l${pair(bx - ax, by - ay)}`;
    [this.#x, this.#y] = [bx, by];
  }

  get path(): string {
    return this.#path;
  }
}
