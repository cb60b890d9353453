/**
 * Segment lengths as fractions of stature. DC: Drillis & Contini 1966 as reprinted in Winter, Biomechanics and Motor
 * Control of Human Movement (memory). EST: our split or estimate, made so that the sums agree with DC.
 */
export const SEGMENTS = {
  thigh: 0.245, // DC: hip 0.530 less knee 0.285
  shank: 0.246, // DC: knee 0.285 less ankle 0.039
  ankle: 0.039, // DC: height of the ankle over the sole
  heel: 0.042, // EST: ankle to back of heel
  ball: 0.072, // EST: ankle to toe joint
  ballHeight: 0.016, // EST
  toes: 0.038, // EST: toe joint to toe tip
  upperArm: 0.186, // DC
  foreArm: 0.146, // DC
  hand: 0.108, // DC
  pelvis: 0.07, // EST: split of DC trunk 0.288 (hip 0.530 to shoulder 0.818)
  lumbar: 0.098, // EST
  thorax: 0.15, // EST: to the base of the neck
  shoulderUp: 0.104, // EST: along the thorax; 0.070 + 0.098 + 0.120 = 0.288
  neck: 0.055, // EST
  head: 0.097, // EST: pivot to crown; 0.318 + 0.055 + 0.097 + 0.530 = 1
  hipHalf: 0.052, // EST: half the distance of the hip joints (DC hip breadth 0.191)
  shoulderHalf: 0.112, // EST: joint centre, inside DC half shoulder breadth 0.129
} as const;

export interface Body {
  /** Metres. */
  readonly stature: number;
  /** Scales the limbs. */
  readonly girth: number;
  readonly trunk: number;
  /** Added to the front of the trunk, fractions of stature. */
  readonly belly: number;
  readonly bust: number;
  readonly hips: number;
  /** Degrees of upper back curve. */
  readonly curve: number;
  readonly hair: 'knot' | 'crop' | 'bob' | 'thin' | 'tail';
  /** Sleeve length, share of the upper arm. */
  readonly sleeve: number;
  readonly leg: 'leggings' | 'shorts' | 'trousers';
}

/** Five builds; depths and widths are our estimates. */
export const BODIES = {
  even: body(1.72, 1, 1, 0.004, 0.004, 1, 0, 'knot', 0.5, 'leggings'),
  slim: body(1.8, 0.93, 0.95, -0.004, 0, 0.95, 0, 'crop', 0.55, 'shorts'),
  heavy: body(1.7, 1.17, 1.17, 0.04, 0.016, 1.16, 2, 'bob', 0.66, 'leggings'),
  older: body(1.68, 0.94, 1, 0.014, 0, 0.98, 9, 'thin', 0.62, 'trousers'),
  short: body(1.54, 1.05, 1.03, 0.004, 0.01, 1.06, 0, 'tail', 0.36, 'shorts'),
} as const;
export type BodyName = keyof typeof BODIES;
export const BODY_NAMES = Object.keys(BODIES) as BodyName[];

function body(
  stature: number,
  girth: number,
  trunk: number,
  belly: number,
  bust: number,
  hips: number,
  curve: number,
  hair: Body['hair'],
  sleeve: number,
  leg: Body['leg'],
): Body {
  return { stature, girth, trunk, belly, bust, hips, curve, hair, sleeve, leg };
}
