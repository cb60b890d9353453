import { armSkin, legCloth, legSkin, pelvisCloth, shirtPath, sleeveEdges } from './clothes.ts';
import { SEGMENTS } from './bodies.ts';
import { headPaths, type HeadPaths } from './head.ts';
import { hatchLimb, hatchTrunk } from './hatching.ts';
import { INK, path } from './ink.ts';
import { limbEdges, openEdge, tube } from './limbs.ts';
import { Pencil } from './paths.ts';
import type { SolvedPose } from './solve-pose.ts';
import { SIDES, type Joint, type Side } from './types.ts';
import { dot } from './vectors.ts';
import type { View } from './view.ts';

type Extremity = `${'arm' | 'leg'}${Side}`;

/** The painted body from back to front. */
export interface Layers {
  /** Far limbs, as elements. */
  readonly far: string;
  /** Arms that pass behind the trunk of a standing figure, as elements. */
  readonly behind: string;
  readonly skin: string;
  readonly cloth: string;
  readonly shirt: string;
  readonly head: HeadPaths;
  /** Legs that point at the reader, as elements. */
  readonly legsOver: string;
  readonly armsOver: string;
  /** Shading of trunk and legs, then of the arms, as path data. */
  readonly shade: string;
  readonly armShade: string;
}

/** Seen from the flank of the pelvis, so that one side of the body is near and the other far. */
export const isSideOn = (S: SolvedPose, view: View): boolean =>
  view.name !== 'top' && Math.abs(dot(S.R.pelvis.s, view.toward)) > 0.6;

const clothFill = ` fill="${INK.cloth}"`;

/** Sorts the body into layers for a view. */
export function bodyLayers(S: SolvedPose, view: View, isHatched: boolean): Layers {
  const side = isSideOn(S, view);
  const depth = depthsOf(S, view);
  const isTurned = dot(S.R.pelvis.s, view.toward) < 0;
  const isFar = (part: Extremity) => (side ? part.endsWith('L') !== isTurned : depth(part) < -0.28);
  const legs = SIDES.filter((s) => !isFar(`leg${s}`));
  const inPlane = legs.filter((s) => side || !isForeshortened(S, view, s));
  const arms = SIDES.filter((s) => !isFar(`arm${s}`));
  const behind = arms.filter((s) => !side && depth(`arm${s}`) < -0.03);
  const over = arms.filter((s) => !behind.includes(s));
  const head = headPaths(S, view);
  const shades = isHatched ? shadesOf(S, view, inPlane, over, side) : { shade: '', armShade: '' };
  return {
    far: farLimbs(S, view, isFar),
    behind: behind.map((s) => sleeved(S, view, s)).join(''),
    skin: head.skin + inPlane.map((s) => legSkin(S, view, s)).join(''),
    cloth: pelvisCloth(S, view) + inPlane.map((s) => legCloth(S, view, s)).join(''),
    shirt: shirtPath(
      S,
      view,
      SIDES.filter((s) => !side || !isFar(`arm${s}`)),
    ),
    head,
    legsOver: legs
      .filter((s) => !inPlane.includes(s))
      .map((s) => legOver(S, view, s))
      .join(''),
    armsOver: over.map((s) => armOver(S, view, s)).join(''),
    ...shades,
  };
}

function depthsOf(S: SolvedPose, view: View): (part: Extremity) => number {
  const mean = (...joints: Joint[]) =>
    joints.reduce((sum, joint) => sum + dot(S.J[joint], view.toward), 0) / joints.length;
  const trunk = mean('pelvis', 'neck');
  return (part) => {
    const s = part.endsWith('R') ? 'R' : 'L';
    return part.startsWith('leg')
      ? mean(`knee${s}`, `ankle${s}`, `hip${s}`) - mean('pelvis')
      : mean(`elbow${s}`, `wrist${s}`) - trunk;
  };
}

function isForeshortened(S: SolvedPose, view: View, s: Side): boolean {
  const hip = view.project(S.J[`hip${s}`]);
  const knee = view.project(S.J[`knee${s}`]);
  return Math.hypot(hip[0] - knee[0], hip[1] - knee[1]) < 0.62 * SEGMENTS.thigh * S.H * 1000;
}

function sleeved(S: SolvedPose, view: View, s: Side, isCoarse = false): string {
  const sleeve = tube(view, sleeveEdges(S, view, s, isCoarse), { far: 'cut' });
  return path(armSkin(S, view, s, isCoarse)) + path(sleeve);
}

function farLimbs(S: SolvedPose, view: View, isFar: (part: Extremity) => boolean): string {
  const arms = (['L', 'R'] as const).filter((s) => isFar(`arm${s}`)).map((s) => sleeved(S, view, s, true));
  const legs = (['L', 'R'] as const)
    .filter((s) => isFar(`leg${s}`))
    .map(
      (s) =>
        path(legSkin(S, view, s, { isCoarse: true })) +
        path(legCloth(S, view, s, { isCoarse: true }), clothFill),
    );
  return [...arms, ...legs].join('');
}

function legOver(S: SolvedPose, view: View, s: Side): string {
  if (S.body.leg === 'shorts') {
    return (
      path(legCloth(S, view, s, { from: 0.3 }), clothFill) +
      path(legSkin(S, view, s, { from: 0.66, isCut: true }))
    );
  }
  return path(legSkin(S, view, s)) + path(legCloth(S, view, s, { from: 0.38 }), clothFill);
}

/** A near arm is left open at the shoulder, where it runs into the shirt. */
function armOver(S: SolvedPose, view: View, s: Side): string {
  const sleeve = sleeveEdges(S, view, s);
  return (
    path(armSkin(S, view, s)) +
    path(tube(view, sleeve, { far: 'cut' }), ' stroke="none"') +
    path(openEdge(view, sleeve), ' fill="none" stroke-width="2.6"')
  );
}

function shadesOf(
  S: SolvedPose,
  view: View,
  legs: readonly Side[],
  arms: readonly Side[],
  side: boolean,
): { shade: string; armShade: string } {
  const body = new Pencil();
  const arm = new Pencil();
  hatchTrunk(body, S, view, 0.07, 0.265);
  for (const s of legs) {
    hatchLimb(body, limbEdges(S, view, 'thigh', s), {
      from: 0.14,
      to: 0.9,
      stepMm: side ? 21 : 27,
      deep: 0.5,
    });
    hatchLimb(body, limbEdges(S, view, 'shank', s), { from: 0.08, to: 0.84, stepMm: 22, deep: 0.46 });
  }
  for (const s of arms) {
    hatchLimb(arm, limbEdges(S, view, 'upperArm', s), { from: 0.24, to: 0.9, stepMm: 20, deep: 0.46 });
    hatchLimb(arm, limbEdges(S, view, 'foreArm', s), { from: 0.1, to: 0.86, stepMm: 20, deep: 0.46 });
  }
  return { shade: body.path, armShade: arm.path };
}
