import { chairStrokes, frameStrokes, newelStrokes, stairStrokes, wallStrokes } from './furniture.ts';
import { landmark } from './landmarks.ts';
import { linePath, units } from './paths.ts';
import type { SolvedPose } from './solve-pose.ts';
import type { Point, Prop } from './types.ts';
import type { View } from './view.ts';

/** Half the depth of stairs and walls toward the reader, metres. */
const HALF_DEPTH = 0.4;

/** What a prop adds to the layers of a drawing, as path data; `bar` is a round bar seen end on. */
export interface PropStrokes {
  readonly mat?: string;
  readonly back?: string;
  readonly fill?: string;
  readonly fine?: string;
  readonly solid?: string;
  readonly front?: string;
  readonly bar?: Point;
}

/** Draws a prop; walls and mats that a view cannot show are left out. */
export function propStrokes(prop: Prop, S: SolvedPose, view: View): PropStrokes {
  if (view.name === 'top') return prop.t === 'mat' ? matFromAbove(prop, view) : {};
  switch (prop.t) {
    case 'mat':
      return matStrokes(prop, view);
    case 'wall':
      return wallStrokes(prop, view);
    case 'stairs':
      return stairStrokes(prop, view);
    case 'frame':
      return frameStrokes(prop, view);
    case 'chair':
      return chairStrokes(prop, view);
    case 'slab':
      return slabStrokes(prop, view);
    case 'newel':
      return newelStrokes(prop, view);
    case 'strap':
      return strapStrokes(S, view);
    case 'bag':
      return bagStrokes(S, view);
  }
}

function matFromAbove({ x0, x1 }: Extract<Prop, { t: 'mat' }>, view: View): PropStrokes {
  const corners = [
    [x0, -0.3],
    [x1, -0.3],
    [x1, 0.3],
    [x0, 0.3],
  ] as const;
  return { back: `${linePath(corners.map(([x, z]) => view.project([x, 0, z])))}z` };
}

function matStrokes({ x0, x1 }: Extract<Prop, { t: 'mat' }>, view: View): PropStrokes {
  const from = view.isFlank ? view.project([x0, 0, HALF_DEPTH * 0.7])[0] : -330;
  const to = view.isFlank ? view.project([x1, 0, HALF_DEPTH * 0.7])[0] : 330;
  return { mat: `M${units(from)} 0H${units(to)}v7H${units(from)}z` };
}

function slabStrokes({ x0, x1, y0, y1 }: Extract<Prop, { t: 'slab' }>, view: View): PropStrokes {
  const a = view.project([x0, y0, HALF_DEPTH]);
  const c = view.project([x1, y1, HALF_DEPTH]);
  const d = `M${units(a[0])} ${units(a[1])}H${units(c[0])}V${units(c[1])}H${units(a[0])}z`;
  return { back: d, fill: d };
}

/** A towel from the near hand round the near foot. */
function strapStrokes(S: SolvedPose, view: View): PropStrokes {
  const hand = view.project(landmark(S, { p: 'handR' }));
  const ball = view.project(S.J.ballR);
  return {
    front:
      linePath([
        [hand[0], hand[1] - 12],
        [ball[0] - 6, ball[1] - 20],
      ]) +
      linePath([
        [hand[0] + 6, hand[1] + 12],
        [ball[0] + 10, ball[1] + 6],
      ]),
  };
}

/** A filled bag hanging from the near hand. */
function bagStrokes(S: SolvedPose, view: View): PropStrokes {
  const [x, y] = view.project(landmark(S, { p: 'gripR' }));
  const sack: readonly Point[] = [
    [-66, 88, 1],
    [0, 96],
    [66, 88, 1],
    [84, 190],
    [70, 252],
    [0, 262],
    [-70, 252],
    [-84, 190],
  ];
  const handle: readonly Point[] = [
    [-44, 90],
    [-7, 8],
    [7, 8],
    [44, 90],
  ];
  const moved = (points: readonly Point[]) =>
    points.map(([dx, dy, corner]): Point => [x + dx, y + dy, corner]);
  return { front: view.outline(moved(sack)) + linePath(moved(handle)) };
}

/** Points a prop needs inside the picture, metres in the room. */
export function propExtent(prop: Prop, view: View): (readonly [number, number])[] {
  const { isFlank } = view;
  switch (prop.t) {
    case 'stairs':
      return isFlank
        ? [
            [prop.x, 0],
            [prop.x + prop.dir * (prop.n * 0.27 - 0.04), prop.n * 0.175],
          ]
        : [];
    case 'wall':
      return isFlank
        ? [
            [prop.x + 0.1, 0],
            [prop.x, Math.min(prop.h, 1.9)],
          ]
        : [];
    case 'chair':
      return isFlank
        ? [
            [prop.x, 0.88],
            [prop.x - prop.dir * 0.5, 0],
          ]
        : [];
    case 'mat':
      return isFlank
        ? [
            [prop.x0 - 0.03, 0],
            [prop.x1 + 0.03, 0],
          ]
        : [];
    case 'frame':
      return [
        ...(isFlank ? [] : ([[0, 2.1]] as const)),
        ...(prop.bar ? ([[prop.x ?? 0, prop.bar + 0.06]] as const) : []),
      ];
    case 'slab':
      return [[prop.x1 - 0.1, prop.y1 + 0.03]];
    case 'newel':
      return [[prop.x + 0.06, 1.2]];
    case 'strap':
    case 'bag':
      return [];
  }
}

/** All props of a pose, layer by layer. */
export function propLayers(
  S: SolvedPose,
  view: View,
): Record<keyof Omit<PropStrokes, 'bar'>, string> & { bars: readonly Point[] } {
  const all = (S.pose.props ?? []).map((prop) => propStrokes(prop, S, view));
  const layer = (name: keyof Omit<PropStrokes, 'bar'>) => all.map((strokes) => strokes[name] ?? '').join('');
  return {
    mat: layer('mat'),
    back: layer('back'),
    fill: layer('fill'),
    fine: layer('fine'),
    solid: layer('solid'),
    front: layer('front'),
    bars: all.flatMap(({ bar }) => (bar ? [bar] : [])),
  };
}
