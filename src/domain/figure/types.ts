/** Words of the drawn figure. World: metres, x forward, y up, z to the figure's right (toward the reader from the side). */

export type V3 = readonly [x: number, y: number, z: number];
/** A place on the paper in millimetres, y down; a third entry 1 makes a corner of a smooth line. */
export type Point = readonly [x: number, y: number, corner?: 1 | undefined];
export type Side = 'R' | 'L';
export const SIDES: readonly Side[] = ['R', 'L'];

/** Front, up (toward the head end) and side (the figure's right) of a segment. */
export interface Frame {
  readonly f: V3;
  readonly u: V3;
  readonly s: V3;
}

type LimbJoint =
  'hip' | 'knee' | 'ankle' | 'ball' | 'heel' | 'toe' | 'shoulder' | 'elbow' | 'wrist' | 'finger';
export type Joint = 'pelvis' | 'lumbar' | 'thorax' | 'neck' | 'head' | 'crown' | `${LimbJoint}${Side}`;

export type Limb = 'thigh' | 'shank' | 'upperArm' | 'foreArm';
export type Segment =
  'pelvis' | 'lumbar' | 'thorax' | 'neck' | 'head' | `${Limb | 'foot' | 'toes' | 'hand'}${Side}`;

/** Degrees from the anatomical position; flexion, abduction and dorsiflexion positive. */
export type SideAngle =
  | 'sh' // shoulder flexion
  | 'abd' // shoulder abduction
  | 'rot' // shoulder turned inward
  | 'elb'
  | 'hip'
  | 'hab' // hip abduction
  | 'knee'
  | 'ank'
  | 'mtp' // toes up
  | 'shl' // shoulder girdle raised, steps and not degrees
  | 'prot' // shoulder girdle forward, steps and not degrees
  | 'hrot' // hip turned inward
  | 'wri'
  | 'pron'; // 0 palm forward, 180 palm back
/** `rx ry rz` place the pelvis, in metres; `pitch` leans it forward, `yaw` turns it about its own length. */
type MidAngle = 'rx' | 'ry' | 'rz' | 'pitch' | 'yaw' | 'lum' | 'tho' | 'lat' | 'neck' | 'nod';
export type Angle = MidAngle | `${SideAngle}${Side}`;
export type Angles = Record<Angle, number>;
/** As authored: a name without a side means both. */
export type AngleWishes = Partial<Record<Angle | SideAngle, number>>;

/** A point of skin that touches: what is left out of `x y z` may slide. `n` is the surface's normal, `dir` fingers or toes. */
export interface Contact {
  readonly p: string;
  readonly x?: number | undefined;
  readonly y?: number | undefined;
  readonly z?: number | undefined;
  readonly n?: V3 | undefined;
  readonly dir?: V3 | undefined;
}

/** Strong, but not law: a point at a place, or at `d` (statures: front, up, side) from the joint `ref`. */
export interface Guide extends Contact {
  readonly ref?: string | undefined;
  readonly d?: V3 | undefined;
  /** Weight against an angle's wish; 40 when left out. */
  readonly w?: number | undefined;
}

export type Prop =
  | { readonly t: 'mat'; readonly x0: number; readonly x1: number }
  | { readonly t: 'wall'; readonly x: number; readonly h: number }
  | { readonly t: 'stairs'; readonly x: number; readonly n: number; readonly dir: 1 | -1 }
  | { readonly t: 'frame'; readonly x?: number; readonly h?: number; readonly bar?: number }
  | { readonly t: 'chair'; readonly x: number; readonly dir: 1 | -1 }
  | { readonly t: 'slab'; readonly x0: number; readonly x1: number; readonly y0: number; readonly y1: number }
  | { readonly t: 'newel'; readonly x: number; readonly h?: number }
  | { readonly t: 'strap' }
  | { readonly t: 'bag' };

export type HandKind = 'flat' | 'loose' | 'fist' | 'reach';
export type ViewName = 'side' | 'front' | 'back' | 'quarter' | 'top';

export interface Pose {
  readonly pitch?: number | undefined;
  readonly yaw?: number | undefined;
  /** Where the pelvis starts before contacts are solved, metres. */
  readonly at?: V3 | undefined;
  readonly j: AngleWishes;
  /** Multiplies the weight of a wish. */
  readonly hold?: AngleWishes | undefined;
  readonly c?: readonly Contact[] | undefined;
  readonly g?: readonly Guide[] | undefined;
  readonly props?: readonly Prop[] | undefined;
  readonly hand?: HandKind | undefined;
  readonly handL?: HandKind | undefined;
  readonly view?: ViewName | undefined;
  /** Contacts are in the body's own metres already and are not scaled again. */
  readonly isFitted?: boolean | undefined;
}

/** A phase is posed, or lies between two others. */
export interface Phase {
  readonly name: string;
  readonly cue: string;
  readonly seconds?: number | undefined;
  readonly pose?: Pose | undefined;
  readonly tween?: readonly [number, number] | undefined;
  readonly t?: number | undefined;
}

/** What goes wrong: the phase `base` with what differs, and the phase that mends it. */
export interface Fault {
  readonly name: string;
  readonly see: string;
  readonly feel: string;
  readonly mend: string;
  readonly base: number;
  readonly mendPhase: number;
  /** The joint that is marked on the drawing. */
  readonly at: Joint;
  readonly view?: ViewName | undefined;
  readonly pose: Partial<Pose>;
}

/** One rung of a ladder: a movement in three phases with its faults. */
export interface Movement {
  readonly id: string;
  readonly ladder: string;
  /** 1 is the easiest. */
  readonly rung: number;
  readonly name: string;
  readonly view: ViewName;
  readonly extraViews?: readonly ViewName[] | undefined;
  /** Source of the angles. */
  readonly angles: string;
  readonly equipment: readonly string[];
  readonly breath: string;
  /** Seconds of each part; `note` in words where seconds do not tell it. */
  readonly tempo: Readonly<Record<string, number | string>>;
  readonly muscles: readonly string[];
  readonly caution: string;
  readonly phases: readonly Phase[];
  readonly faults: readonly Fault[];
}
