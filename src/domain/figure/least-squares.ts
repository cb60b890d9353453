/** Solves A x = y for a symmetric positive definite matrix by Cholesky; both are used up. */
function solveSymmetric(A: readonly Float64Array[], y: Float64Array): Float64Array {
  const n = y.length;
  A.forEach((row, j) => {
    let pivot = row[j] ?? 0;
    for (let k = 0; k < j; k += 1) pivot -= (row[k] ?? 0) ** 2;
    row[j] = Math.sqrt(Math.max(pivot, 1e-14));
    for (const below of A.slice(j + 1)) {
      let sum = below[j] ?? 0;
      for (let k = 0; k < j; k += 1) sum -= (below[k] ?? 0) * (row[k] ?? 0);
      below[j] = sum / (row[j] ?? 1);
    }
  });
  A.forEach((row, i) => {
    let sum = y[i] ?? 0;
    for (let k = 0; k < i; k += 1) sum -= (row[k] ?? 0) * (y[k] ?? 0);
    y[i] = sum / (row[i] ?? 1);
  });
  for (let i = n - 1; i >= 0; i -= 1) {
    let sum = y[i] ?? 0;
    for (let k = i + 1; k < n; k += 1) sum -= (A[k]?.[i] ?? 0) * (y[k] ?? 0);
    y[i] = sum / (A[i]?.[i] ?? 1);
  }
  return y;
}

export interface LeastSquares {
  /** Where to start; moved in place. */
  readonly values: Float64Array;
  /** Step of each value that counts as one: metres stay, degrees become radians. */
  readonly units: Float64Array;
  /** Values that do not move. */
  readonly frozen: ReadonlySet<number>;
  readonly residuals: (values: Float64Array) => Float64Array;
  /** The search ends when no value moves further than this. */
  readonly tolerance: number;
}

const MAX_STEPS = 22;
const MAX_TRIES = 6;
const LONGEST_STEP = 0.6;
const SLOPE_STEP = 1e-6;

function sumOfSquares(list: Float64Array): number {
  let sum = 0;
  for (const x of list) sum += x * x;
  return sum;
}

/** Moves `values` to a least sum of squared residuals: Levenberg-Marquardt with numeric slopes. */
export function leastSquares({ values, units, frozen, residuals, tolerance }: LeastSquares): void {
  let damping = 1e-3;
  let now = residuals(values);
  let cost = sumOfSquares(now);
  for (let step = 0; step < MAX_STEPS; step += 1) {
    const { A, g } = normalEquations(values, units, frozen, residuals, now);
    const kept = values.slice();
    let isBetter = false;
    let longest = 0;
    for (let trial = 0; trial < MAX_TRIES && !isBetter; trial += 1) {
      const move = solveSymmetric(withDamping(A, damping), g.slice());
      longest = move.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
      const scale = Math.min(1, LONGEST_STEP / longest);
      kept.forEach((value, i) => {
        values[i] = value + ((move[i] ?? 0) * scale) / (units[i] ?? 1);
      });
      const then = residuals(values);
      const thenCost = sumOfSquares(then);
      isBetter = thenCost < cost;
      if (isBetter) {
        longest = cost - thenCost < 1e-9 * cost ? 0 : longest * scale;
        damping = Math.max(1e-9, damping * 0.2);
        now = then;
        cost = thenCost;
      } else {
        damping *= 8;
        values.set(kept);
      }
    }
    if (!isBetter || longest < tolerance) return;
  }
}

function withDamping(A: readonly Float64Array[], damping: number): Float64Array[] {
  return A.map((row, i) => {
    const copy = row.slice();
    copy[i] = (row[i] ?? 0) * (1 + damping) + damping + 1e-9;
    return copy;
  });
}

/** JᵀJ and the downhill direction, with a slope for every value that may move. */
function normalEquations(
  values: Float64Array,
  units: Float64Array,
  frozen: ReadonlySet<number>,
  residuals: LeastSquares['residuals'],
  now: Float64Array,
): { A: Float64Array[]; g: Float64Array } {
  const n = values.length;
  const slopes = Array.from(values, (old, i) => {
    if (frozen.has(i)) return null;
    values[i] = old + SLOPE_STEP / (units[i] ?? 1);
    const slope = residuals(values);
    for (let k = 0; k < slope.length; k += 1) slope[k] = ((slope[k] ?? 0) - (now[k] ?? 0)) / SLOPE_STEP;
    values[i] = old;
    return slope;
  });
  const A = slopes.map(() => new Float64Array(n));
  const g = new Float64Array(n);
  slopes.forEach((a, i) => {
    const row = A[i];
    if (!a) row?.fill(1, i, i + 1);
    else {
      for (let k = i; k < n; k += 1) {
        const sum = innerProduct(a, slopes[k] ?? null);
        row?.fill(sum, k, k + 1);
        A[k]?.fill(sum, i, i + 1);
      }
      g[i] = -innerProduct(a, now);
    }
  });
  return { A, g };
}

function innerProduct(a: Float64Array, b: Float64Array | null): number {
  if (!b) return 0;
  let sum = 0;
  for (let m = 0; m < a.length; m += 1) {
    const x = a[m] ?? 0;
    if (x !== 0) sum += x * (b[m] ?? 0); // most residuals hang on few values
  }
  return sum;
}
