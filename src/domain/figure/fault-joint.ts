import type { SolvedPose } from './solve-pose.ts';
import type { Angle, Fault, Joint, SideAngle } from './types.ts';

/** Where each angle is seen. */
const SEEN_AT: Partial<Record<Angle | SideAngle, Joint>> = {
  pitch: 'pelvis',
  lum: 'lumbar',
  tho: 'thorax',
  lat: 'lumbar',
  neck: 'head',
  nod: 'head',
  sh: 'elbowR',
  abd: 'elbowR',
  rot: 'elbowR',
  elb: 'elbowR',
  shl: 'shoulderR',
  prot: 'shoulderR',
  hip: 'hipR',
  hab: 'kneeR',
  hrot: 'kneeR',
  knee: 'kneeR',
  ank: 'ankleR',
  mtp: 'ballR',
};

/** The joint to mark on a fault: of what its author changed, the angle furthest from the mended pose. */
export function faultJoint(fault: Fault, wrong: SolvedPose, mended: SolvedPose): Joint {
  const authored = new Set(Object.keys(fault.pose.j ?? {}) as (Angle | SideAngle)[]);
  if (fault.pose.pitch !== undefined) authored.add('pitch');
  let found: Joint = 'hipR';
  let most = 0;
  for (const name of authored) {
    const isSided = name.endsWith('R') || name.endsWith('L');
    const angle = (name in wrong.q ? name : `${name}R`) as Angle;
    const apart = Math.abs(wrong.q[angle] - mended.q[angle]);
    const joint = SEEN_AT[isSided ? (name.slice(0, -1) as SideAngle) : name];
    if (!joint || !(apart > most)) continue;
    most = apart;
    found = name.endsWith('L') ? (joint.replace(/R$/, 'L') as Joint) : joint;
  }
  return found;
}
