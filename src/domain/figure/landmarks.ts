import { SEGMENTS } from './bodies.ts';
import type { Forced, Skeleton } from './skeleton.ts';
import { spineAt, trunkDepths } from './spine.ts';
import { SIDES, type Contact, type Guide, type Joint, type Side, type V3 } from './types.ts';
import { add, cross, place, unit } from './vectors.ts';

export const UP: V3 = [0, 1, 0];

type OneSided = (S: Skeleton, side: Side, normal: V3) => V3;
type Middle = (S: Skeleton, normal: V3) => V3;

/** Points of skin that touch things, one of each side; a heavier body has them further out. */
const ONE_SIDED: Record<string, OneSided> = {
  palm: ({ J, R, H }, s, n) =>
    place(J[`wrist${s}`], { f: n, u: R[`hand${s}`].u, s: [0, 0, 0] }, -0.021 * H, -0.038 * H),
  grip: ({ J, R, H }, s) => add(J[`wrist${s}`], R[`foreArm${s}`].u, -0.046 * H),
  foot: ({ J, R, H }, s) => place(J[`ankle${s}`], R[`foot${s}`], 0, -SEGMENTS.ankle * H),
  heel: ({ J, R, H }, s) => place(J[`ankle${s}`], R[`foot${s}`], -0.026 * H, -SEGMENTS.ankle * H),
  toes: ({ J, H }, s, n) => add(J[`ball${s}`], n, -SEGMENTS.ballHeight * H),
  toetip: ({ J }, s) => J[`toe${s}`],
  knee: ({ J, H, body }, s, n) => add(J[`knee${s}`], n, -0.0335 * body.girth * H),
  elbow: ({ J, H, body }, s, n) => add(J[`elbow${s}`], n, -0.0235 * body.girth * H),
  wrist: ({ J, H, body }, s, n) => add(J[`wrist${s}`], n, -0.0165 * body.girth * H),
  hand: ({ J, R, H }, s) => place(J[`wrist${s}`], R[`hand${s}`], 0, -0.055 * H),
  ankle: ({ J, H }, s, n) => add(J[`ankle${s}`], n, -0.02 * H),
  instep: ({ J, H }, s, n) => add(J[`ball${s}`], n, -0.008 * H),
};

function onTrunk(S: Skeleton, t: number, face: 'front' | 'back'): V3 {
  const [front, back] = trunkDepths(S.body, t);
  const { p, R } = spineAt(S, t);
  return place(p, R, (face === 'back' ? -back : front) * S.H, 0);
}

const MIDDLE: Record<string, Middle> = {
  seat: ({ J, H, body }, n) => add(J.pelvis, n, -0.069 * body.hips * body.trunk * H),
  upback: (S) => onTrunk(S, 0.262, 'back'),
  chest: (S) => onTrunk(S, 0.245, 'front'),
  belly: (S) => onTrunk(S, 0.1, 'front'),
  hipside: ({ J, H, body }, n) => add(J.pelvis, n, -0.098 * body.hips * body.trunk * H),
  occiput: ({ J, R, H }) => place(J.head, R.head, -0.058 * H, 0.036 * H),
  pelvis: ({ J }) => J.pelvis,
  head: ({ J }) => J.head,
  neck: ({ J }) => J.neck,
  crown: ({ J }) => J.crown,
};

/**
 * Where a named point of skin is, metres.
 * @throws RangeError for a name that no body has
 */
export function landmark(S: Skeleton, contact: Contact): V3 {
  const normal = contact.n ?? UP;
  const middle = MIDDLE[contact.p];
  if (middle) return middle(S, normal);
  const side = sideOf(contact.p);
  const found = side && ONE_SIDED[contact.p.slice(0, -1)];
  if (found) return found(S, side, normal);
  const joint = S.J[contact.p as Joint] as V3 | undefined;
  if (joint) return joint;
  throw new RangeError(`no point of the body is called ${contact.p}`);
}

const sideOf = (name: string): Side | undefined => SIDES.find((side) => name.endsWith(side));

/** Points named for both sides, doubled; z is mirrored. Guides on the thigh follow their own side. */
export function bothSides(points: readonly Guide[]): Guide[] {
  return points.flatMap((point) => {
    if (sideOf(point.p) || point.p in MIDDLE) return [point];
    const thigh = point.ref === 'thigh';
    const right: Guide = { ...point, p: `${point.p}R`, ...(thigh ? { ref: 'thighR' } : {}) };
    const left: Guide = {
      ...point,
      p: `${point.p}L`,
      ...(point.z !== undefined ? { z: -point.z } : {}),
      ...(thigh ? { ref: 'thighL' } : {}),
      ...(point.d ? { d: [point.d[0], point.d[1], -point.d[2]] as const } : {}),
    };
    return [right, left];
  });
}

/** Frames of hands and feet that lie flat on something. */
export function forcedFrames(contacts: readonly Contact[]): Forced {
  const forced: Forced = {};
  for (const contact of contacts) {
    const side = sideOf(contact.p);
    if (!side) continue;
    const normal = contact.n ?? UP;
    const along = unit(contact.dir ?? [1, 0, 0]);
    const base = contact.p.slice(0, -1);
    if (base === 'foot') forced[`foot${side}`] = { f: along, u: normal, s: cross(along, normal) };
    if (base === 'toes') forced[`toes${side}`] = { f: along, u: normal, s: cross(along, normal) };
    if (base === 'palm') {
      // Fingers lie along `dir`; the palm, the front of the hand's frame, faces the surface.
      const u: V3 = [-along[0], -along[1], -along[2]];
      const f: V3 = [-normal[0], -normal[1], -normal[2]];
      forced[`hand${side}`] = { f, u, s: cross(f, u) };
    }
  }
  return forced;
}
