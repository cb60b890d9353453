import { beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { BODIES, BODY_NAMES, SEGMENTS, type BodyName } from './bodies.ts';
import { drawFigure } from './draw-figure.ts';
import { rangeOf } from './joint-ranges.ts';
import { MOVEMENTS, movementOf, rungsOf } from './movements.ts';
import { MUSCLE_NAMES } from './muscles.ts';
import { solveMovement } from './pose-of.ts';
import type { SolvedPose } from './solve-pose.ts';
import { tweenPose } from './tween-pose.ts';
import { SIDES, type Angle, type Fault, type Joint, type V3, type ViewName } from './types.ts';

const TOUCH_METRES = 0.002;
const LOWEST_METRES = -0.002;
const RANGE_DEGREES = 0.5;
const MOST_BYTES = 6144;

const view = z.enum(['side', 'front', 'back', 'quarter', 'top']);
const vector = z.tuple([z.number(), z.number(), z.number()]);
const angles = z.record(z.string(), z.number());
const contact = {
  p: z.string(),
  x: z.number().optional(),
  y: z.number().optional(),
  z: z.number().optional(),
};
const pose = z.strictObject({
  pitch: z.number().optional(),
  yaw: z.number().optional(),
  j: angles,
  hold: angles.optional(),
  c: z.array(z.strictObject({ ...contact, n: vector.optional(), dir: vector.optional() })).optional(),
  g: z
    .array(
      z.strictObject({
        ...contact,
        ref: z.string().optional(),
        d: vector.optional(),
        w: z.number().optional(),
      }),
    )
    .optional(),
  props: z
    .array(
      z.looseObject({
        t: z.enum(['mat', 'wall', 'stairs', 'frame', 'chair', 'slab', 'newel', 'strap', 'bag']),
      }),
    )
    .optional(),
  hand: z.enum(['flat', 'loose', 'fist', 'reach']).optional(),
  handL: z.enum(['flat', 'loose', 'fist', 'reach']).optional(),
  view: view.optional(),
});
const words = z.string().min(8);
const JOINTS = Object.keys(solveMovement(movementOf('march'), 0).J) as Joint[];
const Movements = z.array(
  z.strictObject({
    id: z.string().regex(/^[a-z0-9-]+$/),
    ladder: z.string().min(3),
    rung: z.int().min(1),
    name: z.string().min(3),
    view,
    extraViews: z.array(view).optional(),
    angles: words,
    equipment: z.array(z.string()).min(1),
    breath: words,
    tempo: z.record(z.string(), z.union([z.number(), words])),
    muscles: z.array(z.enum(MUSCLE_NAMES as [string, ...string[]])).min(1),
    caution: words,
    phases: z
      .array(
        z
          .strictObject({
            name: z.string().min(2),
            cue: words,
            seconds: z.number().positive().optional(),
            pose: pose.optional(),
            tween: z.tuple([z.int(), z.int()]).optional(),
            t: z.number().optional(),
          })
          .refine((phase) => Boolean(phase.pose) !== Boolean(phase.tween), 'a phase is posed or between two'),
      )
      .length(3),
    faults: z
      .array(
        z.strictObject({
          name: z.string().min(4),
          see: words,
          feel: words,
          mend: words,
          base: z.int().min(0).max(2),
          mendPhase: z.int().min(0).max(2),
          at: z.enum(JOINTS as [Joint, ...Joint[]]),
          view: view.optional(),
          pose: pose.partial(),
        }),
      )
      .min(2),
  }),
);

test('every movement has its three phases, two faults with mends, breath, tempo, muscles, caution and source', () => {
  expect(Movements.safeParse(MOVEMENTS).error?.issues ?? []).toEqual([]);
  expect(new Set(MOVEMENTS.map(({ id }) => id)).size).toBe(MOVEMENTS.length);
});

test('rungs of a ladder count up from the easiest', () => {
  for (const ladder of new Set(MOVEMENTS.map((movement) => movement.ladder))) {
    expect(rungsOf(ladder).map(({ rung }) => rung)).toEqual(rungsOf(ladder).map((_, i) => i + 1));
  }
  expect(() => movementOf('no-such-movement')).toThrow(RangeError);
});

const RIGID: readonly (readonly [Joint, Joint, number])[] = [
  ['lumbar', 'thorax', SEGMENTS.lumbar],
  ['thorax', 'neck', SEGMENTS.thorax],
  ['neck', 'head', SEGMENTS.neck],
  ...SIDES.flatMap((s): (readonly [Joint, Joint, number])[] => [
    [`hip${s}`, `knee${s}`, SEGMENTS.thigh],
    [`knee${s}`, `ankle${s}`, SEGMENTS.shank],
    [`shoulder${s}`, `elbow${s}`, SEGMENTS.upperArm],
    [`elbow${s}`, `wrist${s}`, SEGMENTS.foreArm],
  ]),
];

/** What is wrong with a solved pose, in words; nothing for a sound one. */
function complaints(S: SolvedPose, build: BodyName): string[] {
  const bad: string[] = [];
  for (const [name, degrees] of Object.entries(S.measured) as [Angle, number][]) {
    const range = rangeOf(name);
    const isInside = !range || (degrees >= range[0] - RANGE_DEGREES && degrees <= range[1] + RANGE_DEGREES);
    if (!isInside) bad.push(`${name} at ${degrees.toFixed(0)} degrees`);
  }
  if (S.missMetres > TOUCH_METRES) bad.push(`a contact is off by ${(S.missMetres * 1000).toFixed(1)} mm`);
  const heights: [string, V3][] = [
    ...(Object.entries(S.J) as [Joint, V3][]),
    ...S.touches.map(({ contact: { p }, at }): [string, V3] => [`skin of ${p}`, at]),
  ];
  for (const [name, at] of heights) {
    if (!at.every(Number.isFinite)) bad.push(`${name} is nowhere`);
    if (at[1] < LOWEST_METRES) bad.push(`${name} is ${(at[1] * 1000).toFixed(0)} mm under the floor`);
  }
  for (const [from, to, share] of RIGID) {
    const [a, b] = [S.J[from], S.J[to]];
    const length = Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
    if (Math.abs(length - share * BODIES[build].stature) > 1e-6)
      bad.push(`${from} to ${to} changed its length`);
  }
  return bad;
}

function drawingComplaints(S: SolvedPose, shown: ViewName): string[] {
  const plain = drawFigure(S, { title: 'A & B', view: shown });
  const muscled = drawFigure(S, {
    title: 'A & B',
    view: shown,
    muscles: ['gluteus maximus', 'quadriceps femoris', 'pectoralis major'],
  });
  return [plain, muscled].flatMap((svg) => {
    const bytes = Buffer.byteLength(svg);
    const bad: string[] = [];
    if (bytes > MOST_BYTES) bad.push(`${bytes} bytes`);
    if (/NaN|undefined|Infinity/.test(svg)) bad.push('a length is no number');
    if (!/<title>A &amp; B<\/title><desc>[^<]{40,}<\/desc>/.test(svg)) bad.push('no title and description');
    return bad;
  });
}

describe.each(BODY_NAMES)('every pose on the %s body', (build) => {
  const solved: { name: string; S: SolvedPose; shown: ViewName }[] = [];
  beforeAll(() => {
    for (const movement of MOVEMENTS) {
      const whichs: (number | Fault)[] = [0, 1, 2, ...movement.faults];
      for (const which of whichs) {
        const isPhase = typeof which === 'number';
        const name = `${movement.id}, ${isPhase ? which : which.name}`;
        const shown = (isPhase ? undefined : which.view) ?? movement.view;
        solved.push({ name, S: solveMovement(movement, which, build), shown });
      }
    }
  }, 60_000);

  test('joints within their range, contacts within 2 mm, nothing under the floor, bones of one length', () => {
    expect(solved.length).toBeGreaterThan(200);
    expect(solved.flatMap(({ name, S }) => complaints(S, build).map((bad) => `${name}: ${bad}`))).toEqual([]);
  });

  test('drawings are titled, described and at most 6 kB', () => {
    const bad = solved.flatMap(({ name, S, shown }) =>
      drawingComplaints(S, shown).map((what) => `${name}: ${what}`),
    );
    expect(bad).toEqual([]);
  });
});

test('a body between two phases keeps its contacts', () => {
  const movement = movementOf('push-up-stair-2');
  const [up, down] = [solveMovement(movement, 0, 'short'), solveMovement(movement, 2, 'short')];
  for (const t of [0.25, 0.5, 0.75]) {
    const S = tweenPose(up, down, t, 'short');
    expect(complaints(S, 'short')).toEqual([]);
    expect(S.J.ballR[0]).toBeCloseTo(up.J.ballR[0], 3);
  }
});

test('the same pose is drawn the same twice', () => {
  const draw = () =>
    drawFigure(solveMovement(movementOf('squat-free'), 2), { title: 'Squat', arcs: ['kneeR'] });
  expect(draw()).toBe(draw());
  expect(draw()).toContain('°');
});
