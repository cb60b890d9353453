import { LEARNING_MEAN, LEARNING_SD, LEARNING_SHARES, MISFIT_LIMIT, PRIOR_REPEATS } from './fit-trend.ts';
import { EARLY_DAYS, EARLY_MARKS, PROBABLE_CHANCE, REAL_CHANCE } from './judge-change.ts';
import { EARLY_WEEKS } from './linear-trend.ts';
import { BENDING_MODEL, TREND_MODELS } from './trend-models.ts';

/**
 * Everything the simulation calibrates. It is written into `calibration.json`, and a test compares it with the code,
 * so a changed constant without a new simulation is noticed.
 */
export const CALIBRATED = {
  realChance: REAL_CHANCE,
  probableChance: PROBABLE_CHANCE,
  earlyMarks: EARLY_MARKS,
  earlyDays: EARLY_DAYS,
  earlyWeeks: EARLY_WEEKS,
  priorRepeats: PRIOR_REPEATS,
  learningShares: LEARNING_SHARES,
  learningMean: LEARNING_MEAN,
  learningSd: LEARNING_SD,
  misfitLimit: MISFIT_LIMIT,
  models: TREND_MODELS,
  bendingModel: BENDING_MODEL,
};
