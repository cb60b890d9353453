/**
 * Simple exponential smoothing, one-step forecasts from the second value on: S = α y + (1 − α) S.
 * Source: NIST/SEMATECH e-Handbook 6.4.3.1.
 */
export function smoothOnce(values: readonly number[], alpha: number): number[] {
  let smoothed = values[0] ?? 0;
  return values.slice(1).map((_, i) => {
    if (i > 0) smoothed = alpha * (values[i] ?? 0) + (1 - alpha) * smoothed;
    return smoothed;
  });
}

export interface HoltStep {
  /** Forecast made before the value was seen. */
  readonly forecast: number;
  readonly level: number;
  readonly trend: number;
}

/**
 * Holt's linear trend (double smoothing) from a given start. `beta` is Holt's own: the trend moves by
 * beta × (change of level − trend). Source: NIST/SEMATECH e-Handbook 6.4.3.3; Hyndman & Athanasopoulos, FPP1 7.2.
 */
export function smoothHolt(
  values: readonly number[],
  alpha: number,
  beta: number,
  start: { readonly level: number; readonly trend: number },
): HoltStep[] {
  let { level, trend } = start;
  return values.map((value) => {
    const forecast = level + trend;
    const next = alpha * value + (1 - alpha) * forecast;
    trend = beta * (next - level) + (1 - beta) * trend;
    level = next;
    return { forecast, level, trend };
  });
}
