import { SIDES, type Angle, type Angles, type Pose, type SideAngle } from './types.ts';

/** What the solver may move, with the weight of the authored angle as a wish. */
const MID_WEIGHTS = { rx: 0, ry: 0, rz: 0.3, pitch: 0.02, lum: 2.5, tho: 2.5, neck: 4 } as const;
const SIDE_WEIGHTS = {
  sh: 0.12,
  abd: 0.25,
  rot: 0.08,
  elb: 0.7,
  hip: 1,
  hab: 0.6,
  knee: 1,
  ank: 0.25,
  mtp: 0.05,
} as const;
const FIXED: readonly SideAngle[] = ['shl', 'prot', 'hrot', 'wri', 'pron'];
/** Arms hang a little off the ribs, knees stand a little apart. */
const AT_REST: Partial<Record<SideAngle, number>> = { abd: 6, hab: 2, pron: 90 };

const MOVED_SIDES = Object.keys(SIDE_WEIGHTS) as (keyof typeof SIDE_WEIGHTS)[];
const MOVED_MIDS = Object.keys(MID_WEIGHTS) as (keyof typeof MID_WEIGHTS)[];

interface Variable {
  readonly name: Angle;
  /** The name without its side. */
  readonly both: Angle | SideAngle;
  readonly weight: number;
}
export const VARIABLES: readonly Variable[] = [
  ...MOVED_MIDS.map((name): Variable => ({ name, both: name, weight: MID_WEIGHTS[name] })),
  ...MOVED_SIDES.flatMap((name) =>
    SIDES.map((side): Variable => ({ name: `${name}${side}`, both: name, weight: SIDE_WEIGHTS[name] })),
  ),
];

/** The authored angles of a pose spread over both sides. */
export function startAngles(pose: Pose): Angles {
  const { j, at } = pose;
  const angles: Partial<Angles> = {
    rx: at?.[0] ?? 0,
    ry: at?.[1] ?? 1,
    rz: at?.[2] ?? 0,
    pitch: pose.pitch ?? 0,
    yaw: pose.yaw ?? 0,
    lum: j.lum ?? 0,
    tho: j.tho ?? 0,
    neck: j.neck ?? 0,
    lat: j.lat ?? 0,
    nod: j.nod ?? 0,
  };
  for (const name of [...FIXED, ...MOVED_SIDES]) {
    for (const side of SIDES) {
      angles[`${name}${side}`] = j[`${name}${side}`] ?? j[name] ?? AT_REST[name] ?? 0;
    }
  }
  return angles as Angles;
}
