import { item, last } from './items.ts';
import { linePath, units } from './paths.ts';
import type { PropStrokes } from './props.ts';
import type { Point, Prop } from './types.ts';
import { RADIANS } from './vectors.ts';
import type { View } from './view.ts';

type PropOf<T extends Prop['t']> = Extract<Prop, { t: T }>;

/** Stairs of the figures, metres; wall and stairs are this deep to either side. */
const RISE = 0.175;
const GOING = 0.27;
const NOSE = 0.022;
const BOARD = 0.03;
const DEEP = 0.4;

export function stairStrokes({ x, n, dir }: PropOf<'stairs'>, view: View): PropStrokes {
  if (!view.isFlank) {
    let back = '';
    let fine = '';
    const half = units(DEEP * 1000 + 60);
    for (let i = 1; i <= n; i += 1) {
      const y = units(-i * RISE * 1000);
      back += `M-${half} ${y}h${2 * half}`;
      fine += `M-${half} ${y + 14}h${2 * half}`;
    }
    return { back, fine };
  }
  const at = (along: number, height: number, z: number) => view.project([x + dir * along, height, z]);
  const near: Point[] = []; // with nosings
  const far: Point[] = []; // plain
  const solid: Point[] = [];
  for (let i = 0; i < n; i += 1) {
    const top = (i + 1) * RISE;
    const under = top - BOARD;
    near.push(at(i * GOING, i * RISE, DEEP), at(i * GOING, under, DEEP));
    near.push(at(i * GOING - NOSE, under, DEEP), at(i * GOING - NOSE, top, DEEP));
    far.push(at(i * GOING, i * RISE, -DEEP), at(i * GOING, top, -DEEP));
    solid.push(at(i * GOING, i * RISE, DEEP), at(i * GOING, top, DEEP));
  }
  near.push(at(n * GOING, n * RISE, DEEP));
  far.push(at(n * GOING, n * RISE, -DEEP));
  solid.push(last(near));
  const edges = Array.from({ length: n }, (_, i) => linePath([item(near, 4 * i + 3), item(far, 2 * i + 1)]));
  return {
    fill: `${linePath(far)}V0z`,
    fine: linePath(far) + edges.join(''),
    solid: `${linePath(solid)}V0z`,
    back: linePath(near),
  };
}

export function wallStrokes({ x, h }: PropOf<'wall'>, view: View): PropStrokes {
  if (!view.isFlank) return {};
  const near = units(view.project([x, 0, DEEP])[0]);
  const far = view.project([x, 0, -DEEP])[0];
  const top = units(-h * 1000);
  return {
    fine: `M${units(far)} 0V${top}`,
    back: `M${near} 0V${top}`,
    fill: `M${near} 0V${top}H${units(far + 45)}V0z`,
  };
}

const HALF_DOOR = 0.42;

/** A door frame, its head at `h`, with a round bar at height `bar` when it has one. */
export function frameStrokes({ x = 0, h = 2.04, bar }: PropOf<'frame'>, view: View): PropStrokes {
  const top = -h * 1000;
  const barAt = (z: number) => view.project([x, bar ?? 0, z]);
  if (!view.isFlank) {
    const post = (half: number, height: number) =>
      linePath([
        [-half, 0],
        [-half, -height],
        [half, -height],
        [half, 0],
      ]);
    const back = post(HALF_DOOR * 1000, h * 1000) + post(HALF_DOOR * 1000 + 70, h * 1000 + 70);
    const rod = [-15, 15].map((k) => {
      const y = -(bar ?? 0) * 1000 + k;
      return linePath([
        [-HALF_DOOR * 1000, y],
        [HALF_DOOR * 1000, y],
      ]);
    });
    return { back: back + (bar ? rod.join('') : '') };
  }
  const farLeft = view.project([x - 0.05, 0, -HALF_DOOR])[0];
  const farRight = view.project([x + 0.05, 0, -HALF_DOOR])[0];
  const jamb = `M${units(farLeft)} 0V${units(top)}H${units(farRight)}V0`;
  const strokes = { fine: jamb, fill: `${jamb}z`, back: '' };
  if (view.name === 'quarter') {
    const left = view.project([x - 0.05, 0, HALF_DOOR])[0];
    const right = view.project([x + 0.05, 0, HALF_DOOR])[0];
    const post = linePath([
      [left, 0],
      [left, top],
      [right, top],
      [right, 0],
    ]);
    const lintel = linePath([
      [left, top],
      [farLeft, top],
    ]);
    const upper = linePath([
      [right, top - 70],
      [farRight + 60, top - 70],
    ]);
    strokes.back += post + lintel + upper;
    strokes.fill += `${post}z`;
  }
  if (!bar) return strokes;
  const end = barAt(HALF_DOOR * 0.8);
  return { ...strokes, back: strokes.back + linePath([barAt(-HALF_DOOR), end]), bar: end };
}

const SEAT = 0.45;
const BACK_REST = 0.86;

/** A chair; `dir` is the way a sitter faces and `x` the front edge of the seat. */
export function chairStrokes({ x, dir }: PropOf<'chair'>, view: View): PropStrokes {
  if (!view.isFlank) return chairFromFront();
  const z = DEEP * 0.5;
  const at = (behind: number, y: number, side: number) => view.project([x - dir * behind, y, side]);
  const line = (...points: Point[]) => linePath(points);
  const seat = line(at(0, SEAT, z), at(0.41, SEAT, z), at(0.41, SEAT - 0.035, z), at(0, SEAT - 0.035, z));
  return {
    fine:
      line(at(0.03, SEAT - 0.03, -z), at(0.02, 0, -z)) +
      line(at(0.38, SEAT, -z), at(0.42, 0, -z)) +
      line(at(0.45, BACK_REST, -z), at(0.4, SEAT, -z)) +
      line(at(0.45, BACK_REST, z), at(0.45, BACK_REST, -z)) +
      line(at(0.435, 0.72, z), at(0.435, 0.72, -z)),
    back:
      line(at(0.03, SEAT - 0.03, z), at(0.02, 0, z)) +
      line(at(0.45, BACK_REST, z), at(0.39, SEAT, z), at(0.42, 0, z)) +
      `${seat}z`,
    fill: `${seat}z`,
  };
}

function chairFromFront(): PropStrokes {
  const y = -SEAT * 1000;
  const seat: Point[] = [
    [-210, y],
    [210, y],
    [210, y + 35],
    [-210, y + 35],
    [-210, y],
  ];
  const legs = [-195, 195].map((x) =>
    linePath([
      [x, y + 35],
      [x, 0],
    ]),
  );
  const back: Point[] = [
    [-195, y],
    [-195, -BACK_REST * 1000],
    [195, -BACK_REST * 1000],
    [195, y],
  ];
  return { back: linePath(seat) + legs.join('') + linePath(back) };
}

/** The post at the foot of the stairs, with a round head. */
export function newelStrokes({ x: place, h = 0.95 }: PropOf<'newel'>, view: View): PropStrokes {
  const x = view.project([place, 0, -0.3])[0];
  const top = -h * 1000;
  const box = (half: number, from: number, to: number): Point[] => [
    [x - half, from],
    [x - half, to],
    [x + half, to],
    [x + half, from],
  ];
  const post = linePath(box(36, 0, top));
  const cap = linePath([...box(50, top, top - 24), [x - 50, top]]);
  const head = view.outline(
    Array.from({ length: 8 }, (_, i): Point => [
      x + 46 * Math.cos(i * 45 * RADIANS),
      top - 68 + 46 * Math.sin(i * 45 * RADIANS),
    ]),
  );
  return { back: post + cap + head, fill: `${post}z` };
}
