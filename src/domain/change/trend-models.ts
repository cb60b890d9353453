import type { TrendModel } from './linear-trend.ts';

/** A way of changing that a member may have, and how much it is believed before any mark is seen. */
export interface WeightedModel extends TrendModel {
  readonly name: string;
  readonly belief: number;
}

/**
 * The noise of the level and of the slope is not fixed: each of these is tried, and the answers are averaged by
 * how well each foretold the marks (likelihood × belief). Standard deviations per week (slope), per week^1.5
 * (bend, and what the first weeks add) and per √week (wander) in typical errors; damping is the share of a slope that fades in a week.
 * Chosen by simulation; common practice, no source.
 */
export const TREND_MODELS: readonly WeightedModel[] = [
  model('still', 0.1, { slope: 0, bend: 0, early: 0, wander: 0.02, damping: 0 }),
  model('steady', 0.37, { slope: 0.35, bend: 0.012, early: 0.12, wander: 0, damping: 0.09 }),
  model('bends slowly', 0.28, { slope: 0.45, bend: 0.04, early: 0.2, wander: 0, damping: 0.09 }),
  model('bends', 0.2, { slope: 0.4, bend: 0.1, early: 0.2, wander: 0, damping: 0.09 }),
  model('wanders', 0.05, { slope: 0.2, bend: 0.02, early: 0.2, wander: 0.15, damping: 0.1 }),
];

/** Used to find marks that do not fit: supple enough not to take a real turn for a wild day. */
export const BENDING_MODEL = model('bends', 1, {
  slope: 0.45,
  bend: 0.1,
  early: 0,
  wander: 0,
  damping: 0.09,
});

/** No belief about the pace at all: two marks stand for themselves. */
export const FREE_MODEL = model('free', 1, { slope: 30, bend: 0, early: 0, wander: 0, damping: 0 });

function model(
  name: string,
  belief: number,
  sd: { slope: number; bend: number; early: number; wander: number; damping: number },
): WeightedModel {
  return {
    name,
    belief,
    slopeVariance: sd.slope ** 2,
    bendVariance: sd.bend ** 2,
    earlyBendVariance: sd.early ** 2,
    levelVariance: sd.wander ** 2,
    damping: sd.damping,
  };
}
