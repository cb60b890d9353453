import { INK, path } from './ink.ts';
import { linePath, units } from './paths.ts';
import type { SolvedPose } from './solve-pose.ts';
import type { Joint, Point, Side } from './types.ts';
import { dot, place, RADIANS, subtract, unit } from './vectors.ts';
import type { View } from './view.ts';

/** A joint whose angle can be drawn. */
export type ArcJoint = `${'knee' | 'elbow' | 'hip' | 'shoulder' | 'ankle'}${Side}`;

/** A dotted line from ear to ankle through shoulder, hip and knee. */
export function bodyLine(S: SolvedPose, view: View, tone: string): string {
  const ear = place(S.J.head, S.R.head, 0, 0.012 * S.H);
  const points = [ear, S.J.shoulderR, S.J.hipR, S.J.kneeR, S.J.ankleR].map(view.project);
  const dots = points.map(
    ([x, y]) => `<circle cx="${units(x)}" cy="${units(y)}" r="5" fill="${tone}" stroke="none"/>`,
  );
  return (
    path(linePath(points), ` stroke="${tone}" stroke-dasharray="1 11" stroke-width="3.9"`) + dots.join('')
  );
}

const NEIGHBOURS: Record<string, readonly [string, string]> = {
  knee: ['hip', 'ankle'],
  elbow: ['shoulder', 'wrist'],
  hip: ['shoulder', 'knee'],
  shoulder: ['elbow', 'hip'],
  ankle: ['knee', 'ball'],
};
const ARC_UNITS = 92;

/** An arc at a joint with its angle in degrees, to five. */
export function angleArc(S: SolvedPose, view: View, joint: ArcJoint, tone: string): string {
  const side = joint.slice(-1);
  const [before = 'hip', after = 'ankle'] = NEIGHBOURS[joint.slice(0, -1)] ?? [];
  const [a, b] = [S.J[`${before}${side}` as Joint], S.J[`${after}${side}` as Joint]];
  const centre = S.J[joint];
  const o = view.project(centre);
  const directionTo = (p: Point) => Math.atan2(p[1] - o[1], p[0] - o[0]);
  const from = directionTo(view.project(a));
  const to = directionTo(view.project(b));
  const turn = Math.atan2(Math.sin(to - from), Math.cos(to - from));
  const cosine = dot(unit(subtract(a, centre)), unit(subtract(b, centre)));
  const degrees = Math.acos(Math.max(-1, Math.min(1, cosine))) / RADIANS;
  const at = (angle: number, radius: number) =>
    `${units(o[0] + radius * Math.cos(angle))} ${units(o[1] + radius * Math.sin(angle))}`;
  const [x, y] = at(from + turn / 2, ARC_UNITS + 52).split(' ');
  const r = units(ARC_UNITS);
  return (
    path(
      `M${at(from, ARC_UNITS)}A${r} ${r} 0 0 ${turn > 0 ? 1 : 0} ${at(to, ARC_UNITS)}`,
      ` stroke="${tone}" stroke-width="3.4"`,
    ) +
    `<text x="${x}" y="${y}" dy="8" font-size="26" text-anchor="middle" fill="${tone}" stroke="${INK.body}" stroke-width="5">${Math.round(degrees / 5) * 5}°</text>`
  );
}

const WEDGE_GAP_MM = 62;
const WEDGE_HEIGHT_MM = 84;
const WEDGE_HALF_MM = 36;

/** One red wedge under the joint that went wrong, cased in the ground; over it where the floor is too near. */
export function faultWedge(S: SolvedPose, view: View, joint: Joint): string {
  const [x, y] = view.project(S.J[joint]);
  const down = view.name === 'top' || y + WEDGE_GAP_MM + WEDGE_HEIGHT_MM < -10 ? 1 : -1;
  const tip = y + down * WEDGE_GAP_MM;
  const foot = tip + down * WEDGE_HEIGHT_MM;
  const d = linePath([
    [x - WEDGE_HALF_MM, foot],
    [x, tip],
    [x + WEDGE_HALF_MM, foot],
  ]);
  return (
    path(d, ` stroke="${INK.body}" stroke-width="18"`) + path(d, ` stroke="${INK.fault}" stroke-width="9"`)
  );
}
