/**
 * Local linear trend in continuous time, for marks at irregular dates.
 *
 *   mark  = level − share × learning + error         error    ~ N(0, σ² × spread)
 *   level moves by the slope, and by N(0, σ² × levelVariance × weeks)
 *   slope bends by N(0, σ² × bendVariance × weeks)   slope(0) ~ N(0, σ² × slopeVariance)
 *
 * The slope may fade (damping, share a week): gains come quickly at first and level off, and after missing weeks
 * nobody is thought to have gone on improving at the old pace. With damping 0 it is the plain local linear trend.
 * Every variance is in units of σ² (the squared typical error), so σ² comes out in closed form with a scaled
 * inverse chi-square prior. Larger is better: callers turn the sign of the other tests.
 * Source: Durbin & Koopman, Time Series Analysis by State Space Methods, chapters 2 to 4 (memory); the code is
 * checked against the published Nile results and against least squares in the tests.
 */
export interface TrendModel {
  readonly slopeVariance: number;
  readonly bendVariance: number;
  /** Added to the bends of the first `EARLY_WEEKS`, when gains come fast and stop soon. */
  readonly earlyBendVariance: number;
  readonly levelVariance: number;
  readonly damping: number;
}

/** Bends are wider in this many weeks from the first mark. Common practice, no source. */
export const EARLY_WEEKS = 8;

export interface TrendInput {
  /** Weeks, not falling. */
  readonly weeks: Float64Array;
  readonly values: Float64Array;
  /** Error variance of each mark in σ² units: 1, more for a mark that does not fit. */
  readonly spreads: Float64Array;
  /** Share of the learning effect still to come at each mark. */
  readonly shares: Float64Array;
  readonly learningMean: number;
  readonly learningVariance: number;
  /** When the level is wanted; taken as the last mark when earlier. */
  readonly endWeek: number;
}

/** Result at `endWeek`. Variances in σ² units. */
export interface TrendState {
  readonly level: number;
  readonly slope: number;
  readonly base: number;
  readonly levelVariance: number;
  readonly slopeVariance: number;
  readonly differenceVariance: number;
  /** Σ log F and Σ v²/F over the innovations after the first mark. */
  readonly logDeterminant: number;
  readonly sumOfSquares: number;
}

/** Share of a slope that is left after `weeks`. */
function keepOf(damping: number, weeks: number): number {
  return damping === 0 ? 1 : Math.exp(-damping * weeks);
}

/** How far a slope of 1 carries the level while it fades to `keep`. */
function reachOf(damping: number, weeks: number, keep: number): number {
  return damping === 0 ? weeks : (1 - keep) / damping;
}

/** Variance that bends add to the level (integrated Ornstein-Uhlenbeck process, or random walk without damping). */
function bendNoise(damping: number, weeks: number, reach: number): number {
  if (damping === 0) return weeks ** 3 / 3;
  return (weeks - reach - (damping * reach * reach) / 2) / damping ** 2;
}

/** Per mark: predicted level, slope, learning; their six covariances; innovation, its variance, three gains. */
const ROW = 14;

/** Where the filter leaves what the smoother needs; make one per series and reuse it for every model. */
export function makeTrace(marks: number): Float64Array {
  return new Float64Array(marks * ROW);
}

/**
 * Kalman filter. The first mark sets the level exactly (diffuse start). A fourth state keeps the level at the first
 * mark, the base, so the variance of the change takes into account that both ends share their marks.
 * O(marks), no allocation but the result.
 */
export function filterTrend(input: TrendInput, model: TrendModel, trace?: Float64Array): TrendState {
  const { weeks, values, spreads, shares } = input;
  const { damping, levelVariance } = model;
  const count = values.length;
  const firstShare = shares[0] ?? 0;
  const v = input.learningVariance;
  let week = weeks[0] ?? 0;
  const earlyUntil = week + EARLY_WEEKS;
  let level = (values[0] ?? 0) + firstShare * input.learningMean;
  let slope = 0;
  let learning = input.learningMean;
  let base = level;
  let pLL = (spreads[0] ?? 1) + firstShare * firstShare * v;
  let pLS = 0;
  let pLE = firstShare * v;
  let pSS = model.slopeVariance;
  let pSE = 0;
  let pEE = v;
  let pLB = pLL;
  let pSB = pLS;
  let pEB = pLE;
  let pBB = pLL;
  let logDeterminant = 0;
  let product = 1;
  let sumOfSquares = 0;

  if (trace) {
    trace.set([level, slope, learning, pLL, pLS, pLE, pSS, pSE, pEE], 0);
  }
  let knownDt = 0;
  let keep = 1;
  let reach = 0;
  let unitNoise = 0;
  let i = 1;
  // Each turn moves to the next date: a mark, or the end.
  for (;;) {
    const isEnd = i >= count;
    const next = Math.max(week, isEnd ? input.endWeek : (weeks[i] ?? week));
    const dt = next - week;
    if (dt > 0) {
      // Marks are mostly a week apart: the same step is not worked out twice.
      if (dt !== knownDt) {
        keep = keepOf(damping, dt);
        reach = reachOf(damping, dt, keep);
        unitNoise = bendNoise(damping, dt, reach);
        knownDt = dt;
      }
      const bendVariance = model.bendVariance + (week < earlyUntil ? model.earlyBendVariance : 0);
      level += reach * slope;
      slope *= keep;
      pLL += reach * (2 * pLS + reach * pSS) + levelVariance * dt + bendVariance * unitNoise;
      pLS = keep * (pLS + reach * pSS) + (bendVariance * reach * reach) / 2;
      pLE += reach * pSE;
      pLB += reach * pSB;
      pSS = keep * keep * pSS + (bendVariance * reach * (1 + keep)) / 2;
      pSE *= keep;
      pSB *= keep;
      week = next;
    }
    if (isEnd) break;
    const c = shares[i] ?? 0;
    const zL = pLL - c * pLE;
    const zS = pLS - c * pSE;
    const zE = pLE - c * pEE;
    const zB = pLB - c * pEB;
    const variance = zL - c * zE + (spreads[i] ?? 1);
    const innovation = (values[i] ?? level) - level + c * learning;
    const kL = zL / variance;
    const kS = zS / variance;
    const kE = zE / variance;
    const kB = zB / variance;
    if (trace) {
      const at = i * ROW;
      trace[at] = level;
      trace[at + 1] = slope;
      trace[at + 2] = learning;
      trace[at + 3] = pLL;
      trace[at + 4] = pLS;
      trace[at + 5] = pLE;
      trace[at + 6] = pSS;
      trace[at + 7] = pSE;
      trace[at + 8] = pEE;
      trace[at + 9] = innovation;
      trace[at + 10] = variance;
      trace[at + 11] = kL;
      trace[at + 12] = kS;
      trace[at + 13] = kE;
    }
    level += kL * innovation;
    slope += kS * innovation;
    learning += kE * innovation;
    base += kB * innovation;
    pLL -= kL * zL;
    pLS -= kL * zS;
    pLE -= kL * zE;
    pSS -= kS * zS;
    pSE -= kS * zE;
    pEE -= kE * zE;
    pLB -= kB * zL;
    pSB -= kB * zS;
    pEB -= kB * zE;
    pBB -= kB * zB;
    product *= variance;
    if (product > 1e200 || product < 1e-200) {
      logDeterminant += Math.log(product);
      product = 1;
    }
    sumOfSquares += (innovation * innovation) / variance;
    i += 1;
  }
  return {
    level,
    slope,
    base,
    levelVariance: pLL,
    slopeVariance: pSS,
    differenceVariance: Math.max(0, pLL + pBB - 2 * pLB),
    logDeterminant: logDeterminant + Math.log(product),
    sumOfSquares,
  };
}

/** Smoothed level at each mark, its variance, and the mark's misfit when it is left out (all in σ units). */
export interface Smoothed {
  readonly levels: Float64Array;
  readonly variances: Float64Array;
  /** (mark − what all the other marks say) ÷ its standard error, for σ = 1. */
  readonly misfits: Float64Array;
}

/**
 * Fixed-interval smoother by the backward recursion of r and N (no matrix is inverted), from the trace of
 * `filterTrend`. The misfit is the standardised smoothing error, which equals the leave-one-out residual.
 */
export function smoothTrend(input: TrendInput, model: TrendModel, trace: Float64Array): Smoothed {
  const { damping } = model;
  const count = input.values.length;
  const levels = new Float64Array(count);
  const variances = new Float64Array(count);
  const misfits = new Float64Array(count);
  let rL = 0;
  let rS = 0;
  let rE = 0;
  let nLL = 0;
  let nLS = 0;
  let nLE = 0;
  let nSS = 0;
  let nSE = 0;
  let nEE = 0;
  for (let i = count - 1; i >= 0; i -= 1) {
    const at = i * ROW;
    if (i > 0) {
      const c = input.shares[i] ?? 0;
      const kL = trace[at + 11] ?? 0;
      const kS = trace[at + 12] ?? 0;
      const kE = trace[at + 13] ?? 0;
      const gL = nLL * kL + nLS * kS + nLE * kE;
      const gS = nLS * kL + nSS * kS + nSE * kE;
      const gE = nLE * kL + nSE * kS + nEE * kE;
      const d = 1 / (trace[at + 10] ?? 0) + kL * gL + kS * gS + kE * gE;
      const u = (trace[at + 9] ?? 0) / (trace[at + 10] ?? 0) - (kL * rL + kS * rS + kE * rE);
      misfits[i] = u / Math.sqrt(d);
      rL += u;
      rE -= c * u;
      nLL += d - 2 * gL;
      nLS -= gS;
      nLE += c * (gL - d) - gE;
      nSE += c * gS;
      nEE += c * (2 * gE + c * d);
    } else {
      misfits[0] = nLL > 0 ? -rL / Math.sqrt(nLL) : 0;
    }
    const pL = trace[at + 3] ?? 0;
    const pS = trace[at + 4] ?? 0;
    const pE = trace[at + 5] ?? 0;
    levels[i] = (trace[at] ?? 0) + pL * rL + pS * rS + pE * rE;
    const quadratic =
      pL * (pL * nLL + 2 * (pS * nLS + pE * nLE)) + pS * (pS * nSS + 2 * pE * nSE) + pE * pE * nEE;
    variances[i] = Math.max(0, pL - quadratic);
    const dt = i > 0 ? (input.weeks[i] ?? 0) - (input.weeks[i - 1] ?? 0) : 0;
    const keep = keepOf(damping, dt);
    const reach = reachOf(damping, dt, keep);
    rS = reach * rL + keep * rS;
    nSS = reach * (reach * nLL + 2 * keep * nLS) + keep * keep * nSS;
    nLS = reach * nLL + keep * nLS;
    nSE = reach * nLE + keep * nSE;
  }
  return { levels, variances, misfits };
}
