import { HAIR, hairBack, HAIR_FRONT, HAIR_FRONT_BOB, HEAD_FRONT, HEAD_SIDE } from './head-outlines.ts';
import { item } from './items.ts';
import type { Skeleton } from './skeleton.ts';
import { trunkEdges } from './trunk.ts';
import type { Point } from './types.ts';
import { dot, place, RADIANS } from './vectors.ts';
import type { View } from './view.ts';

export interface HeadPaths {
  readonly skin: string;
  readonly hair: string;
  /** Ear and jaw, from the side only. */
  readonly lines: string;
}
/** Front, up, side; fractions of stature from the head's pivot. */
type OnHead = (x: number, y: number, z: number) => Point;

const EAR: readonly (readonly [number, number])[] = [
  [0.004, 0.016],
  [-0.003, 0.022],
  [-0.011, 0.016],
  [-0.009, 0.003],
  [-0.002, -0.004],
  [0.001, 0.004],
];
const JAW: readonly (readonly [number, number])[] = [
  [-0.004, -0.014],
  [0.008, -0.03],
  [0.026, -0.04],
];

/** Neck, head and hair; no face. */
export function headPaths(S: Skeleton, view: View): HeadPaths {
  const { J, R, H } = S;
  const onHead: OnHead = (x, y, z) => view.project(place(J.head, R.head, x * H, y * H, z * H));
  const neck = neckPath(S, view);
  if (Math.abs(dot(view.toward, R.head.u)) > 0.75) return headFromAbove(S, view, onHead, neck);
  if (Math.abs(dot(view.toward, R.head.s)) > 0.6) {
    return {
      skin: neck + view.outline(HEAD_SIDE.map(([x, y]) => onHead(x, y, 0))),
      hair: view.outline(HAIR[S.body.hair].map(([x, y]) => onHead(x, y, 0.012))),
      lines:
        view.stroke(EAR.map(([x, y]) => onHead(x, y, 0.03))) +
        view.stroke(JAW.map(([x, y]) => onHead(x, y, 0))),
    };
  }
  return headFromFront(S, view, onHead, neck);
}

const NECK_WIDTHS = [0.042, 0.0325, 0.03, 0.031];

function neckPath(S: Skeleton, view: View): string {
  const { centres, normals } = trunkEdges(S, view, [0.296, 0.322, 0.352, 0.372]);
  const left: Point[] = [];
  const right: Point[] = [];
  NECK_WIDTHS.forEach((width, i) => {
    const w = width * (1 + (S.body.girth - 1) * 0.7) * S.H * 1000;
    const [c, n] = [item(centres, i), item(normals, i)];
    left.push([c[0] + n[0] * w, c[1] + n[1] * w]);
    right.unshift([c[0] - n[0] * w, c[1] - n[1] * w]);
  });
  return view.outline([...left, ...right]);
}

function headFromAbove(S: Skeleton, view: View, onHead: OnHead, neck: string): HeadPaths {
  const ring = (length: number, width: number, shift: number) =>
    view.outline(
      Array.from({ length: 10 }, (_, i) =>
        onHead(shift + length * Math.cos(i * 36 * RADIANS), 0.05, width * Math.sin(i * 36 * RADIANS)),
      ),
    );
  const hair = S.body.hair === 'thin' ? ring(0.032, 0.046, -0.028) : ring(0.06, 0.0495, -0.004);
  return { skin: neck + ring(0.058, 0.047, 0.002), hair, lines: '' };
}

type Half = readonly (readonly [side: number, up: number])[];

/** A half outline and its mirror as one. */
const mirrored = (half: Half, inner: Half): Half => [
  ...half,
  ...inner.toReversed().map(([x, y]) => [-x, y] as const),
];

function headFromFront(S: Skeleton, view: View, onHead: OnHead, neck: string): HeadPaths {
  const { hair: kind } = S.body;
  const isBehind = dot(view.toward, S.R.head.f) < 0;
  const flat = (points: Half, x = 0) => view.outline(points.map(([z, y]) => onHead(x, y, z)));
  const bothEars = (points: Half) =>
    [1, -1].map((k) => flat(points.map(([z, y]) => [z * k, y] as const))).join('');
  const cover: Half = isBehind
    ? hairBack(kind === 'bob' ? 0.012 : 0.002)
    : kind === 'bob'
      ? HAIR_FRONT_BOB
      : HAIR_FRONT;
  let hair =
    kind === 'thin' && !isBehind
      ? bothEars([
          [0.0435, 0.052],
          [0.0475, 0.046],
          [0.0505, 0.026],
          [0.047, 0.01],
          [0.0445, 0.028],
        ])
      : flat(mirrored(cover, isBehind ? cover.slice(1, -1) : cover.slice(1)));
  if (kind === 'knot') {
    hair += view.outline(
      Array.from({ length: 8 }, (_, i) =>
        onHead(-0.05, 0.106 + 0.016 * Math.sin(i * 45 * RADIANS), 0.019 * Math.cos(i * 45 * RADIANS)),
      ),
    );
  }
  if (kind === 'tail' && isBehind) {
    hair += flat(
      [
        [-0.016, 0.06],
        [0.016, 0.06],
        [0.018, 0],
        [0.008, -0.044],
        [-0.008, -0.044],
        [-0.018, 0],
      ],
      -0.06,
    );
  }
  const ears: Half = [
    [0.044, 0.022],
    [0.0515, 0.024],
    [0.052, 0.008],
    [0.044, -0.004],
  ];
  const face = flat(mirrored(HEAD_FRONT, HEAD_FRONT.slice(1, -1)));
  return { skin: neck + face + (kind === 'bob' ? '' : bothEars(ears)), hair, lines: '' };
}
