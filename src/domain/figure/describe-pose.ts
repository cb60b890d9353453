import type { SolvedPose } from './solve-pose.ts';
import type { Angle, SideAngle, ViewName } from './types.ts';

const VIEWS: Record<ViewName, string> = {
  side: 'Side view',
  front: 'Front view',
  back: 'Back view',
  top: 'View from above',
  quarter: 'Three-quarter view',
};
const TOUCHING: Record<string, string> = {
  palm: 'hand',
  grip: 'hand',
  foot: 'foot',
  toes: 'ball of the foot',
  toetip: 'toes',
  knee: 'knee',
  elbow: 'elbow',
  seat: 'seat',
  upback: 'upper back',
  occiput: 'head',
  heel: 'heel',
  chest: 'chest',
  belly: 'belly',
  wrist: 'forearm',
  hipside: 'hip',
  instep: 'instep',
};
const SAME_DEGREES = 8;
const toFive = (degrees: number) => Math.round(degrees / 5) * 5;

function trunkWords({ q }: SolvedPose): string {
  const lean = q.pitch + (q.lum + q.tho) / 2;
  if (Math.abs(lean) < 12) return 'Trunk upright';
  if (lean > 65) return 'Trunk face down';
  if (lean < -65) return 'Trunk face up';
  return lean > 0
    ? `Trunk leaning forward ${toFive(lean)} degrees`
    : `Trunk leaning back ${toFive(-lean)} degrees`;
}

/** One line of words for what is drawn: view, trunk, joints in degrees, what touches. */
export function describePose(S: SolvedPose, view: ViewName): string {
  const measured = (name: Angle) => S.measured[name] ?? 0;
  const joint = (name: SideAngle, words: string) => {
    const [near, far] = [measured(`${name}R`), measured(`${name}L`)];
    return Math.abs(near - far) < SAME_DEGREES
      ? `${words} ${toFive(near)}`
      : `${words} ${toFive(near)} near and ${toFive(far)} far`;
  };
  const angles = [
    joint('hip', 'hip flexed'),
    joint('knee', 'knee'),
    joint('sh', 'shoulder'),
    joint('elb', 'elbow'),
  ];
  const touching = new Set(
    S.contacts.map(({ p }) => TOUCHING[p] ?? TOUCHING[p.slice(0, -1)]).filter((word) => word !== undefined),
  );
  const parts = [trunkWords(S), `${angles.join(', ')} degrees`];
  if (touching.size > 0) parts.push(`touching with ${[...touching].join(', ')}`);
  return `${VIEWS[view]}. ${parts.join('; ')}.`;
}
