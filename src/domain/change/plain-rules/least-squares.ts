export interface LineFit {
  readonly slope: number;
  readonly intercept: number;
  /** Residual standard deviation, n − 2 degrees. */
  readonly residualSd: number;
  readonly slopeError: number;
  readonly interceptError: number;
}

/**
 * Straight line by least squares, sums taken about the means. `null` with fewer than three points or one x only.
 * Source: checked against the certified values of NIST StRD Norris.
 */
export function leastSquares(x: readonly number[], y: readonly number[]): LineFit | null {
  const n = x.length;
  const meanX = x.reduce((sum, v) => sum + v, 0) / n;
  const meanY = y.reduce((sum, v) => sum + v, 0) / n;
  const sxx = x.reduce((sum, v) => sum + (v - meanX) ** 2, 0);
  if (n < 3 || sxx === 0) return null;
  const sxy = x.reduce((sum, v, i) => sum + (v - meanX) * ((y[i] ?? 0) - meanY), 0);
  const slope = sxy / sxx;
  const residuals = x.map((v, i) => (y[i] ?? 0) - meanY - slope * (v - meanX));
  const residualSd = Math.sqrt(residuals.reduce((sum, r) => sum + r * r, 0) / (n - 2));
  return {
    slope,
    intercept: meanY - slope * meanX,
    residualSd,
    slopeError: residualSd / Math.sqrt(sxx),
    interceptError: residualSd * Math.sqrt(1 / n + (meanX * meanX) / sxx),
  };
}
