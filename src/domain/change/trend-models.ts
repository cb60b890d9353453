import type { TrendModel } from './linear-trend.ts';

/** A way of changing that a member may have, and how much it is believed before any mark is seen. */
export interface WeightedModel extends TrendModel {
  readonly name: string;
  readonly belief: number;
}

/**
 * The noise of the level and of the slope is not fixed: each of these is tried, and the answers are averaged by
 * how well each foretold the marks (likelihood × belief). Standard deviations per week (slope), per week^1.5
 * (bend) and per √week (wander) in typical errors. Chosen by simulation; common practice, no source.
 */
export const TREND_MODELS: readonly WeightedModel[] = [
  model('still', 0.3, { slope: 0, bend: 0, wander: 0.02 }),
  model('steady', 0.2, { slope: 0.15, bend: 0.01, wander: 0 }),
  model('bends slowly', 0.2, { slope: 0.2, bend: 0.04, wander: 0 }),
  model('bends', 0.15, { slope: 0.25, bend: 0.1, wander: 0 }),
  model('wanders', 0.15, { slope: 0.1, bend: 0.02, wander: 0.25 }),
];

function model(
  name: string,
  belief: number,
  sd: { slope: number; bend: number; wander: number },
): WeightedModel {
  return {
    name,
    belief,
    slopeVariance: sd.slope ** 2,
    bendVariance: sd.bend ** 2,
    levelVariance: sd.wander ** 2,
  };
}
