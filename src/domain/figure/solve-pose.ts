import { BODIES, type Body, type BodyName } from './bodies.ts';
import { item } from './items.ts';
import { bothSides, forcedFrames, landmark } from './landmarks.ts';
import { leastSquares } from './least-squares.ts';
import { ankleAngle, poseResiduals, toeAngle, wristAngle } from './pose-residuals.ts';
import { placeJoints, type Skeleton } from './skeleton.ts';
import { SIDES, type Angle, type Angles, type Contact, type Guide, type Pose, type V3 } from './types.ts';
import { startAngles, VARIABLES } from './variables.ts';
import { RADIANS } from './vectors.ts';

export interface Touch {
  readonly contact: Contact;
  /** Where the point of skin ended, metres. */
  readonly at: V3;
}

/** A pose on a body, its contacts met. */
export interface SolvedPose extends Skeleton {
  readonly pose: Pose;
  readonly q: Angles;
  readonly contacts: readonly Contact[];
  readonly touches: readonly Touch[];
  /** The largest miss of a contact, metres. */
  readonly missMetres: number;
  /** Joint angles as they stand, degrees. */
  readonly measured: Partial<Record<Angle, number>>;
}

/** The stature that the contact lengths of the poses are written for, metres. */
const AUTHORED_STATURE = 1.72;
/** Points higher than this stand on furniture and keep their place whatever the body. */
const FURNITURE_FROM = 0.06;
/** Weights of the contacts, raised step by step so that they end exact. */
const LAW_WEIGHTS = [8, 60, 600, 6000];
const EXACT = 6000;

const NAMES = VARIABLES.map(({ name }) => name);
const UNITS = Float64Array.from(VARIABLES, (_, i) => (i < 3 ? 1 : RADIANS));

/**
 * Places the body: contacts are law, authored angles are wishes that are met as far as contacts, the floor and the
 * joint ranges allow. Deterministic; about 20 ms.
 */
export function solvePose(pose: Pose, build: BodyName = 'even'): SolvedPose {
  const body: Body = BODIES[build];
  const fit = pose.isFitted ? (point: Guide) => point : fitTo(body);
  const contacts: Contact[] = bothSides((pose.c ?? []).map(fit));
  const guides = bothSides((pose.g ?? []).map(fit));
  const forced = forcedFrames(contacts);
  const q = startAngles(pose);
  if (contacts.length > 0) {
    movePelvisTo(contacts, q, placeJoints(q, body, forced));
    moveToContacts(pose, q, contacts, guides, (angles) => placeJoints(angles, body, forced));
  }
  const S = placeJoints(q, body, forced);
  const touches = contacts.map((contact) => ({ contact, at: landmark(S, contact) }));
  return { ...S, pose, q, contacts, touches, missMetres: largestMiss(touches), measured: measure(S, q) };
}

/** Floor contacts are scaled to the body; those on furniture or on a wall are not. */
function fitTo(body: Body): (point: Guide) => Guide {
  const k = body.stature / AUTHORED_STATURE;
  return (point) => {
    const onFloor = !((point.y ?? 0) > FURNITURE_FROM) && !point.n;
    return {
      ...point,
      ...(point.z !== undefined ? { z: point.z * k } : {}),
      ...(point.x !== undefined && onFloor ? { x: point.x * k } : {}),
    };
  };
}

/** A good start: the pelvis moved by the mean miss of the contacts. */
function movePelvisTo(contacts: readonly Contact[], q: Angles, S: Skeleton): void {
  const misses = { x: [] as number[], y: [] as number[] };
  for (const contact of contacts) {
    const [x, y] = landmark(S, contact);
    if (contact.x !== undefined) misses.x.push(contact.x - x);
    if (contact.y !== undefined) misses.y.push(contact.y - y);
  }
  const mean = (list: readonly number[]) => list.reduce((sum, x) => sum + x, 0) / (list.length || 1);
  q.rx += mean(misses.x);
  q.ry += mean(misses.y);
}

function moveToContacts(
  pose: Pose,
  q: Angles,
  contacts: readonly Contact[],
  guides: readonly Guide[],
  placed: (angles: Angles) => Skeleton,
): void {
  const values = Float64Array.from(VARIABLES, ({ name }) => q[name]);
  const wishes = values.slice();
  const holds = VARIABLES.map(
    ({ name, both, weight }) => weight * (pose.hold?.[name] ?? pose.hold?.[both] ?? 1),
  );
  const flatFeet = SIDES.filter((side) => contacts.some(({ p }) => p === `foot${side}`));
  const frozen = new Set(flatFeet.map((side) => VARIABLES.findIndex(({ name }) => name === `ank${side}`)));
  for (const weight of LAW_WEIGHTS) {
    leastSquares({
      values,
      units: UNITS,
      frozen,
      tolerance: weight < EXACT ? 4e-3 : 1e-7,
      residuals: (tried) => {
        tried.forEach((value, i) => {
          q[item(NAMES, i)] = value;
        });
        const { law, soft } = poseResiduals(pose, q, placed(q), contacts, guides);
        const all = new Float64Array(law.length + soft.length + tried.length);
        law.forEach((x, i) => {
          all[i] = x * weight;
        });
        all.set(soft, law.length);
        tried.forEach((value, i) => {
          all[law.length + soft.length + i] = (value - item(wishes, i)) * item(UNITS, i) * item(holds, i);
        });
        return all;
      },
    });
  }
  values.forEach((value, i) => {
    q[item(NAMES, i)] = value;
  });
}

function largestMiss(touches: readonly Touch[]): number {
  let most = 0;
  for (const { contact, at } of touches) {
    for (const [want, got] of [
      [contact.x, at[0]],
      [contact.y, at[1]],
      [contact.z, at[2]],
    ] as const) {
      if (want !== undefined) most = Math.max(most, Math.abs(got - want));
    }
  }
  return most;
}

/** Joint angles as they stand, also where a contact dictates the frame of a hand or foot. */
function measure(S: Skeleton, q: Angles): SolvedPose['measured'] {
  const measured: Partial<Record<Angle, number>> = { lum: q.lum, tho: q.tho, neck: q.neck };
  for (const s of SIDES) {
    for (const name of ['sh', 'abd', 'elb', 'hip', 'hab', 'knee'] as const) {
      measured[`${name}${s}`] = q[`${name}${s}`];
    }
    measured[`ank${s}`] = ankleAngle(S, s) / RADIANS;
    measured[`mtp${s}`] = toeAngle(S, s);
    measured[`wri${s}`] = S.forced[`hand${s}`] ? wristAngle(S, s) : q[`wri${s}`];
  }
  return measured;
}
