import { ANKLE_RANGE, beyond, rangeOf, TOE_RANGE } from './joint-ranges.ts';
import { landmark } from './landmarks.ts';
import type { Skeleton } from './skeleton.ts';
import {
  SIDES,
  type Angles,
  type Contact,
  type Guide,
  type Joint,
  type Pose,
  type Segment,
  type Side,
} from './types.ts';
import { VARIABLES } from './variables.ts';
import { dot, place, RADIANS } from './vectors.ts';

/** Least heights of joints over the floor, fractions of stature. */
const SIDE_HEIGHTS = [
  ['toe', 0.006],
  ['ball', 0.0125],
  ['ankle', 0.022],
  ['heel', 0.001],
  ['knee', 0.033],
  ['wrist', 0.016],
  ['finger', 0.006],
  ['elbow', 0.022],
] as const;
const LEAST_HEIGHTS: readonly (readonly [Joint, number])[] = [
  ...SIDES.flatMap((side) =>
    SIDE_HEIGHTS.map(([joint, height]): [Joint, number] => [`${joint}${side}`, height]),
  ),
  ['head', 0.045],
  ['pelvis', 0.06],
  ['crown', 0.004],
];

const LIMITS = VARIABLES.flatMap(({ name }) => {
  const range = rangeOf(name);
  return range ? [{ name, range }] : [];
});

/** Weights against an authored angle, in radians or metres. */
const GUIDE_WEIGHT = 40;
const FLOOR_WEIGHT = 60;
const RANGE_WEIGHT = RADIANS * 25;
const FLAT_FOOT_WEIGHT = 0.3;

const degreesBetween = (cosine: number) => Math.acos(Math.max(-1, Math.min(1, cosine))) / RADIANS;

/** Dorsiflexion as it stands, in radians: foot against shank. */
export function ankleAngle(S: Skeleton, s: Side): number {
  const C = S.R[`shank${s}`];
  const F = S.R[`foot${s}`];
  return Math.atan2(dot(F.f, C.u), Math.hypot(dot(F.f, C.f), dot(F.f, C.s)));
}
/** Toes against foot, degrees. */
export function toeAngle(S: Skeleton, s: Side): number {
  const T = S.R[`toes${s}`];
  const F = S.R[`foot${s}`];
  return Math.atan2(dot(T.f, F.u), dot(T.f, F.f)) / RADIANS;
}
/** Hand against forearm, degrees, without a sign. */
export function wristAngle(S: Skeleton, s: Side): number {
  return degreesBetween(dot(S.R[`foreArm${s}`].u, S.R[`hand${s}`].u));
}

/** What contacts ask (law, metres) and what else is wished for (guides, flat feet, the floor, joint ranges). */
export function poseResiduals(
  pose: Pose,
  q: Angles,
  S: Skeleton,
  contacts: readonly Contact[],
  guides: readonly Guide[],
): { law: number[]; soft: number[] } {
  const law: number[] = [];
  const soft: number[] = [];
  for (const contact of contacts) {
    const [x, y, z] = landmark(S, contact);
    if (contact.x !== undefined) law.push(x - contact.x);
    if (contact.y !== undefined) law.push(y - contact.y);
    if (contact.z !== undefined) law.push(z - contact.z);
  }
  for (const guide of guides) {
    const [x, y, z] = landmark(S, guide);
    const to = guideTarget(S, guide);
    const w = guide.w ?? GUIDE_WEIGHT;
    if (to[0] !== undefined) soft.push((x - to[0]) * w);
    if (to[1] !== undefined) soft.push((y - to[1]) * w);
    if (to[2] !== undefined) soft.push((z - to[2]) * w);
  }
  const sidesForced = (part: 'foot' | 'hand' | 'toes') => SIDES.filter((s) => S.forced[`${part}${s}`]);
  for (const s of sidesForced('foot')) {
    const angle = ankleAngle(S, s);
    const hold = pose.hold?.[`ank${s}`] ?? pose.hold?.ank ?? 1;
    soft.push((angle - q[`ank${s}`] * RADIANS) * FLAT_FOOT_WEIGHT * hold);
    soft.push(beyond(angle / RADIANS, ANKLE_RANGE) * RANGE_WEIGHT);
  }
  for (const s of sidesForced('toes')) soft.push(beyond(toeAngle(S, s), TOE_RANGE) * RANGE_WEIGHT);
  for (const s of sidesForced('hand')) soft.push(Math.max(0, wristAngle(S, s) - 90) * RANGE_WEIGHT);
  for (const [joint, height] of LEAST_HEIGHTS) {
    soft.push(Math.max(0, height * S.H - S.J[joint][1]) * FLOOR_WEIGHT);
  }
  for (const { name, range } of LIMITS) soft.push(beyond(q[name], range) * RANGE_WEIGHT);
  return { law, soft };
}

type Target = readonly [number | undefined, number | undefined, number | undefined];

function guideTarget(S: Skeleton, { ref, d, x, y, z }: Guide): Target {
  if (!ref || !d) return [x, y, z];
  const joint = ref.replace('thigh', 'knee') as Joint;
  return place(S.J[joint], S.R[ref as Segment], d[0] * S.H, d[1] * S.H, d[2] * S.H);
}
