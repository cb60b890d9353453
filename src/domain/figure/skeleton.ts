import { SEGMENTS as L, type Body } from './bodies.ts';
import { SIDES, type Angles, type Frame, type Joint, type Segment, type V3 } from './types.ts';
import { add, place, ROOM, turnAboutFront, turnAboutLength, turnAboutSide } from './vectors.ts';

/** Hands and feet whose frame a contact dictates. */
export type Forced = Partial<Record<Segment, Frame>>;

/** A placed body: joints in metres and the frame of every segment. */
export interface Skeleton {
  readonly J: Record<Joint, V3>;
  readonly R: Record<Segment, Frame>;
  /** Stature, metres. */
  readonly H: number;
  readonly body: Body;
  readonly forced: Forced;
}

/** Places every joint from the angles, from the pelvis outward. */
export function placeJoints(q: Angles, body: Body, forced: Forced): Skeleton {
  const H = body.stature;
  const J: Partial<Record<Joint, V3>> = {};
  const R: Partial<Record<Segment, Frame>> = {};
  const pelvis = (R.pelvis = turnAboutLength(turnAboutSide(ROOM, -q.pitch), q.yaw));
  J.pelvis = [q.rx, q.ry, q.rz];
  J.lumbar = place(J.pelvis, pelvis, -0.012 * H, L.pelvis * H);
  R.lumbar = turnAboutFront(turnAboutSide(pelvis, -(q.lum - 4)), q.lat * 0.5);
  J.thorax = add(J.lumbar, R.lumbar.u, L.lumbar * H);
  const thorax = (R.thorax = turnAboutFront(
    turnAboutSide(R.lumbar, -(q.tho + 5 + body.curve * 0.6)),
    q.lat * 0.5,
  ));
  J.neck = add(J.thorax, thorax.u, L.thorax * H);
  R.neck = turnAboutSide(thorax, -(q.neck * 0.6 + 22 + body.curve));
  J.head = add(J.neck, R.neck.u, L.neck * H);
  R.head = turnAboutSide(thorax, -(q.neck + q.nod - 2 - body.curve * 0.5));
  J.crown = add(J.head, R.head.u, L.head * H);
  for (const s of SIDES) {
    const k = s === 'R' ? 1 : -1;
    const hip = (J[`hip${s}`] = place(J.pelvis, pelvis, 0, 0, k * L.hipHalf * H));
    const thigh = (R[`thigh${s}`] = turnAboutLength(
      turnAboutFront(turnAboutSide(pelvis, q[`hip${s}`]), -k * q[`hab${s}`]),
      k * q[`hrot${s}`],
    ));
    const knee = (J[`knee${s}`] = add(hip, thigh.u, -L.thigh * H));
    const shank = (R[`shank${s}`] = turnAboutSide(thigh, -q[`knee${s}`]));
    const ankle = (J[`ankle${s}`] = add(knee, shank.u, -L.shank * H));
    const flat = forced[`foot${s}`];
    const foot = (R[`foot${s}`] = flat ?? turnAboutSide(shank, q[`ank${s}`]));
    const ball = (J[`ball${s}`] = place(ankle, foot, L.ball * H, (L.ballHeight - L.ankle) * H));
    J[`heel${s}`] = place(ankle, foot, -L.heel * 0.62 * H, -L.ankle * H);
    const toes = (R[`toes${s}`] = flat ?? forced[`toes${s}`] ?? turnAboutSide(foot, q[`mtp${s}`]));
    J[`toe${s}`] = place(ball, toes, L.toes * H, -L.ballHeight * 0.5 * H);
    const shoulder = (J[`shoulder${s}`] = place(
      J.thorax,
      thorax,
      (0.006 + q[`prot${s}`] * 0.0012) * H,
      (L.shoulderUp + q[`shl${s}`] * 0.0016) * H,
      k * (L.shoulderHalf - Math.abs(q[`shl${s}`]) * 0.0003) * H,
    ));
    const upperArm = (R[`upperArm${s}`] = turnAboutLength(
      turnAboutFront(turnAboutSide(thorax, q[`sh${s}`]), -k * q[`abd${s}`]),
      k * q[`rot${s}`],
    ));
    const elbow = (J[`elbow${s}`] = add(shoulder, upperArm.u, -L.upperArm * H));
    const foreArm = (R[`foreArm${s}`] = turnAboutSide(upperArm, q[`elb${s}`]));
    const wrist = (J[`wrist${s}`] = add(elbow, foreArm.u, -L.foreArm * H));
    const hand = (R[`hand${s}`] =
      forced[`hand${s}`] ?? turnAboutSide(turnAboutLength(foreArm, k * q[`pron${s}`]), -q[`wri${s}`]));
    J[`finger${s}`] = add(wrist, hand.u, -L.hand * 0.86 * H);
  }
  return { J: J as Record<Joint, V3>, R: R as Record<Segment, Frame>, H, body, forced };
}
