import type { BodyName } from './bodies.ts';
import { solvePose, type SolvedPose } from './solve-pose.ts';
import type { Angle, AngleWishes, Contact, Guide, Joint, Pose, V3 } from './types.ts';
import { mix, unit } from './vectors.ts';

const PLACES: readonly Angle[] = ['rx', 'ry', 'rz', 'pitch', 'yaw'];
const AXES = ['x', 'y', 'z'] as const;
/** Below and above these shares a contact of one end alone still binds. */
const STILL_AT_START = 0.02;
const ALREADY_AT_END = 0.98;

/**
 * The pose at share `t` of the way from one solved pose to the next, eased. Where both ends bind a coordinate it
 * stays law; elsewhere the path is a guide.
 */
export function tweenPose(A: SolvedPose, B: SolvedPose, t: number, build: BodyName = 'even'): SolvedPose {
  return solvePose(poseBetween(A, B, t), build);
}

/** The same, not yet solved. */
export function poseBetween(A: SolvedPose, B: SolvedPose, t: number): Pose {
  const e = t * t * (3 - 2 * t);
  const between = (x: number, y: number) => x + (y - x) * e;
  const j: AngleWishes = {};
  for (const name of Object.keys(A.q) as Angle[]) {
    if (!PLACES.includes(name)) j[name] = between(A.q[name], B.q[name]);
  }
  const { bound, path } = mixContacts(A, B, e);
  const trunk = (['pelvis', 'neck'] satisfies Joint[]).map((p): Guide => ({
    p,
    x: between(A.J[p][0], B.J[p][0]),
    y: between(A.J[p][1], B.J[p][1]),
    w: 3,
  }));
  return {
    ...(e < 0.5 ? A.pose : B.pose),
    pitch: between(A.q.pitch, B.q.pitch),
    yaw: between(A.q.yaw, B.q.yaw),
    at: mix(A.J.pelvis, B.J.pelvis, e),
    j,
    c: bound,
    g: [...path, ...trunk, ...mixGuides(A.pose, B.pose, e)],
    hold: { pitch: 60, ank: 3, mtp: 3, sh: 1 },
    isFitted: true,
  };
}

function mixContacts(A: SolvedPose, B: SolvedPose, e: number): { bound: Contact[]; path: Guide[] } {
  const bound: Contact[] = [];
  const path: Guide[] = [];
  for (const { contact: a, at: from } of A.touches) {
    const other = B.touches.find(({ contact }) => contact.p === a.p);
    if (!other) {
      if (e < STILL_AT_START) bound.push(a);
      continue;
    }
    const { contact: b, at: to } = other;
    const law: { -readonly [K in keyof Contact]: Contact[K] } = { ...a };
    const soft: { -readonly [K in keyof Guide]: Guide[K] } = { p: a.p, w: 6 };
    let isFree = false;
    AXES.forEach((axis, i) => {
      const [x, y] = [a[axis], b[axis]];
      if (x !== undefined && y !== undefined) {
        law[axis] = x + (y - x) * e;
        return;
      }
      law[axis] = undefined;
      if (axis === 'z') return;
      soft[axis] = mix(from, to, e)[i as 0 | 1];
      isFree = true;
    });
    if (isFree) path.push(soft);
    if (a.dir && b.dir) law.dir = unit(mix(a.dir, b.dir, e));
    bound.push(law);
  }
  const onlyLater = B.contacts.filter((b) => !A.contacts.some((a) => a.p === b.p));
  return { bound: e > ALREADY_AT_END ? [...bound, ...onlyLater] : bound, path };
}

/** Guides that hang on the body: mixed where both ends have one, weak near the end that has it alone. */
function mixGuides(a: Pose, b: Pose, e: number): Guide[] {
  const onBody = (pose: Pose) => (pose.g ?? []).filter((guide) => guide.ref && guide.d);
  const later = onBody(b);
  const first = onBody(a).flatMap((x): Guide[] => {
    const y = later.find((guide) => guide.p === x.p && guide.ref === x.ref);
    if (y) return [{ ...x, d: mix(x.d as V3, y.d as V3, e) }];
    return e < 0.3 ? [{ ...x, w: 12 }] : [];
  });
  const onlyLater = e > 0.7 ? later.filter((y) => !onBody(a).some((x) => x.p === y.p)) : [];
  return [...first, ...onlyLater.map((y) => ({ ...y, w: 12 }))];
}
