import type { Skeleton } from './skeleton.ts';
import type { HandKind, Joint, Point, Side } from './types.ts';
import type { SolvedPose } from './solve-pose.ts';
import { dot, place } from './vectors.ts';
import type { View } from './view.ts';

type Outline = readonly (readonly [x: number, y: number])[];

/** Along the fingers, toward the back of the hand; fractions of stature (EST). */
// prettier-ignore
const HAND: Record<HandKind, Outline> = {
  flat: [[-0.006,0.013],[0.02,0.011],[0.048,0.001],[0.072,-0.008],[0.094,-0.013],[0.101,-0.0185],[0.09,-0.021],[0.05,-0.021],[0.02,-0.021],[-0.010,-0.0205],[-0.015,-0.010]],
  loose: [[-0.006,0.013],[0.026,0.0145],[0.052,0.010],[0.076,-0.001],[0.092,-0.015],[0.089,-0.0215],[0.079,-0.019],[0.064,-0.012],[0.058,-0.020],[0.047,-0.025],[0.030,-0.0175],[0.004,-0.0135]],
  fist: [[-0.006,0.013],[0.03,0.0165],[0.053,0.0135],[0.066,0.000],[0.063,-0.016],[0.048,-0.0265],[0.030,-0.0265],[0.014,-0.019],[0.002,-0.0135]],
  reach: [[-0.006,0.013],[0.03,0.0135],[0.06,0.0095],[0.085,0.005],[0.104,-0.001],[0.105,-0.007],[0.082,-0.009],[0.068,-0.010],[0.060,-0.019],[0.046,-0.022],[0.028,-0.0155],[0.002,-0.0135]],
};
/** Along the fingers, toward the thumb. */
// prettier-ignore
const HAND_BROAD: Record<'open' | 'fist', Outline> = {
  open: [[-0.006,-0.0155],[0.028,-0.0225],[0.058,-0.0225],[0.088,-0.0165],[0.104,-0.006],[0.106,0.004],[0.096,0.012],[0.070,0.0185],[0.058,0.022],[0.066,0.036],[0.060,0.0425],[0.048,0.040],[0.028,0.028],[0.010,0.018],[-0.006,0.0155]],
  fist: [[-0.006,-0.0155],[0.03,-0.0235],[0.055,-0.0235],[0.067,-0.010],[0.067,0.010],[0.055,0.0225],[0.034,0.0265],[0.012,0.0185],[-0.006,0.0155]],
};
/** Front, up: sole and heel. */
// prettier-ignore
const HEEL: Outline = [[0.052,-0.0365],[0.022,-0.0360],[-0.010,-0.0388],[-0.030,-0.0388],[-0.0425,-0.031],[-0.041,-0.017],[-0.026,0.002],[-0.021,0.02]];

/** What a hand does: as the pose says, else flat on what it leans on, closed round what it grips, or loose. */
function handKind({ pose, forced, contacts }: SolvedPose, side: Side): HandKind {
  const said = (side === 'L' ? pose.handL : undefined) ?? pose.hand;
  if (said) return said;
  if (forced[`hand${side}`]) return 'flat';
  return contacts.some(({ p }) => p === `grip${side}`) ? 'fist' : 'loose';
}

export function handPath(S: SolvedPose, view: View, side: Side): string {
  const { J, R, H, body } = S;
  const frame = R[`hand${side}`];
  const wrist = J[`wrist${side}`];
  const outward = side === 'R' ? 1 : -1;
  const girth = 0.5 + body.girth * 0.5;
  const kind = handKind(S, side);
  if (Math.abs(dot(view.toward, frame.f)) > 0.62) {
    const broad = HAND_BROAD[kind === 'fist' ? 'fist' : 'open'];
    return view.outline(
      broad.map(([x, y]) => view.project(place(wrist, frame, 0, -x * H, outward * y * H * girth))),
    );
  }
  return view.outline(
    HAND[kind].map(([x, y]) =>
      view.project(place(wrist, frame, -y * H * (y > -0.02 ? girth : 1), -x * H, 0)),
    ),
  );
}

/** Front, up and outward from the ankle or, for the toes, from the ball of the foot. */
type OnFoot = (x: number, y: number, z?: number) => Point;

export function footPath(S: Skeleton, view: View, side: Side): string {
  const foot = S.R[`foot${side}`];
  const toes = S.R[`toes${side}`];
  const outward = side === 'R' ? 1 : -1;
  const from =
    (joint: Joint, frame: typeof foot): OnFoot =>
    (x, y, z = 0) =>
      view.project(place(S.J[joint], frame, x * S.H, y * S.H, z * outward * S.H));
  const F = from(`ankle${side}`, foot);
  const T = from(`ball${side}`, toes);
  if (Math.abs(dot(view.toward, foot.s)) > 0.5) return view.outline(footFromSide(F, T));
  if (Math.abs(dot(view.toward, foot.f)) > 0.6) return view.outline(footFromFront(F));
  return view.outline(footFromAbove(F, T));
}

// prettier-ignore
const footFromSide = (F: OnFoot, T: OnFoot): Point[] => [
  F(0.0205, 0.016), F(0.026, -0.002), F(0.046, -0.0125), F(0.064, -0.0185), T(0.008, 0.0035), T(0.027, -0.001), T(0.0375, -0.008),
  T(0.034, -0.0148), T(0.014, -0.016), T(-0.004, -0.016), ...HEEL.map(([x, y]) => F(x, y)),
];
// prettier-ignore
const footFromFront = (F: OnFoot): Point[] => [
  F(0, 0.014, 0.0185), F(0.03, -0.012, 0.021), F(0.07, -0.028, 0.031), F(0.07, -0.039, 0.027), F(0.07, -0.039, -0.022),
  F(0.07, -0.026, -0.027), F(0.03, -0.008, -0.020), F(0, 0.014, -0.0185),
];
// prettier-ignore
const footFromAbove = (F: OnFoot, T: OnFoot): Point[] => [
  F(-0.043, -0.03), F(-0.034, -0.03, 0.018), F(0.01, -0.03, 0.021), F(0.06, -0.03, 0.031), T(0.018, 0, 0.026), T(0.034, 0, 0.006),
  T(0.038, 0, -0.014), T(0.02, 0, -0.024), F(0.05, -0.03, -0.024), F(0.01, -0.03, -0.018), F(-0.034, -0.03, -0.017),
];
