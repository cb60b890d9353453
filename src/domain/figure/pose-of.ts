import type { BodyName } from './bodies.ts';
import { item } from './items.ts';
import { solvePose, type SolvedPose } from './solve-pose.ts';
import { poseBetween } from './tween-pose.ts';
import { SIDES, type AngleWishes, type Fault, type Movement, type Pose, type SideAngle } from './types.ts';

/** The pose of a phase; one between two others is worked out on the body. */
export function phasePose(movement: Movement, index: number, build: BodyName): Pose {
  const phase = item(movement.phases, index);
  if (phase.pose) return phase.pose;
  const [from, to] = phase.tween ?? [0, 2];
  return poseBetween(
    solvePose(phasePose(movement, from, build), build),
    solvePose(phasePose(movement, to, build), build),
    phase.t ?? 0.5,
  );
}

/** The pose of a fault: its base phase with what differs. A joint told for both sides wins over either side. */
export function faultPose(movement: Movement, fault: Fault, build: BodyName): Pose {
  const base = phasePose(movement, fault.base, build);
  const j: AngleWishes = { ...base.j };
  for (const name of Object.keys(fault.pose.j ?? {}) as SideAngle[]) {
    for (const side of SIDES) delete j[`${name}${side}`];
  }
  return {
    ...base,
    ...fault.pose,
    isFitted: fault.pose.c ? false : base.isFitted,
    j: { ...j, ...fault.pose.j },
    hold: { ...base.hold, ...fault.pose.hold },
  };
}

/** The solved pose of a phase (0, 1, 2) or of a fault of a movement. */
export function solveMovement(
  movement: Movement,
  which: number | Fault,
  build: BodyName = 'even',
): SolvedPose {
  const pose =
    typeof which === 'number' ? phasePose(movement, which, build) : faultPose(movement, which, build);
  return solvePose(pose, build);
}
