import { item } from './items.ts';
import type { EdgeIndex, LimbEdges } from './limbs.ts';
import type { Pencil } from './paths.ts';
import type { Skeleton } from './skeleton.ts';
import { trunkEdges } from './trunk.ts';
import type { Point } from './types.ts';
import type { View } from './view.ts';

/** Light falls from the upper left. */
const LIGHT: Point = [-0.5, -0.87];
const LEAST_SHADE = -0.2;
/** An even hand, not a machine. */
const grain = (i: number) => 0.8 + 0.2 * Math.sin(i * 2.4);
const litBy = (n: Point) => n[0] * LIGHT[0] + n[1] * LIGHT[1];
const depthOf = (deep: number, lit: number) => deep * Math.min(1, 0.45 - lit * 0.75);
/** Strokes are longest in the middle of the muscle. */
const swell = (share: number) => Math.sin(Math.PI * (0.08 + 0.84 * share));

const TRUNK_STEP_MM = 24;
const TRUNK_DEEP = 0.34;

export interface LimbShade {
  readonly from: number;
  readonly to: number;
  readonly stepMm: number;
  readonly deep: number;
}

/** Short slanting strokes along the shaded edge of a limb. */
export function hatchLimb(pencil: Pencil, edges: LimbEdges, { from, to, stepMm, deep }: LimbShade): void {
  const count = Math.floor((edges.lengthMm * (to - from)) / stepMm);
  if (count < 3) return; // seen end on there is nothing to shade
  for (const edge of [0, 1] as const) {
    const lit = litBy(edges.normals[edge]);
    if (lit > LEAST_SHADE) continue;
    const depth = depthOf(deep, lit);
    for (let i = 0; i <= count; i += 1) {
      const share = i / count;
      const t = from + (to - from) * share;
      const reach = depth * (0.25 + 0.75 * swell(share) ** 1.2) * grain(i);
      const slant = (edges.widthAt(t, edge) * reach * 0.55) / edges.lengthMm;
      pencil.stroke(edges.at(t, edge, 0.985), edges.at(t + slant, edge, 1 - reach));
    }
  }
}

/** The same along the trunk, between two heights over the hip joint. */
export function hatchTrunk(pencil: Pencil, S: Skeleton, view: View, from: number, to: number): void {
  const count = Math.max(2, Math.floor(((to - from) * S.H * 1000) / TRUNK_STEP_MM));
  const heights = Array.from({ length: count + 1 }, (_, i) => from + ((to - from) * i) / count);
  const trunk = trunkEdges(S, view, heights);
  heights.forEach((_, i) => {
    for (const edge of [0, 1] as const) strokeTrunk(pencil, trunk, i, i / count, edge);
  });
}

function strokeTrunk(
  pencil: Pencil,
  trunk: ReturnType<typeof trunkEdges>,
  i: number,
  share: number,
  edge: EdgeIndex,
): void {
  const normal = item(trunk.normals, i);
  const n: Point = edge === 1 ? [-normal[0], -normal[1]] : normal;
  const lit = litBy(n);
  if (lit > LEAST_SHADE) return;
  const w = item(trunk.widths[edge], i);
  const reach = depthOf(TRUNK_DEEP, lit) * (0.3 + 0.7 * swell(share)) * grain(i);
  const down: Point = edge === 1 ? [n[1], -n[0]] : [-n[1], n[0]];
  const centre = item(trunk.centres, i);
  const at = (out: number, slip: number): Point => [
    centre[0] + n[0] * w * out + down[0] * slip,
    centre[1] + n[1] * w * out + down[1] * slip,
  ];
  pencil.stroke(at(0.985, 0), at(1 - reach, w * reach * 0.55));
}
