/**
 * Cleveland's robust locally weighted line, fitted at each x in order: tricube weights over the nearest
 * `share` of the points, then `rounds` of bisquare weights from the residuals.
 * Source: Cleveland WS 1979; checked against R's lowess(cars). x must not fall.
 */
export function lowess(x: readonly number[], y: readonly number[], share = 2 / 3, rounds = 3): number[] {
  const n = x.length;
  const near = Math.min(n, Math.max(2, Math.floor(share * n + 1e-7)));
  const trust = new Array<number>(n).fill(1);
  let fitted = [...y];
  for (let round = 0; round <= rounds; round += 1) {
    let left = 0;
    fitted = x.map((at) => {
      while (left + near < n && at - (x[left] ?? 0) > (x[left + near] ?? 0) - at) left += 1;
      return fitAt(at, x, y, trust, Math.max(at - (x[left] ?? 0), (x[left + near - 1] ?? 0) - at));
    });
    const sizes = y.map((value, i) => Math.abs(value - (fitted[i] ?? 0)));
    const limit = 6 * median(sizes);
    if (round === rounds || limit < 1e-12) break;
    sizes.forEach((size, i) => {
      const share = size / limit;
      trust[i] = share <= 0.001 ? 1 : share >= 0.999 ? 0 : (1 - share ** 2) ** 2;
    });
  }
  return fitted;
}

function fitAt(
  at: number,
  x: readonly number[],
  y: readonly number[],
  trust: readonly number[],
  reach: number,
): number {
  const weights = x.map((v, i) => {
    const distance = Math.abs(v - at);
    if (distance > 0.999 * reach && distance > 0) return 0;
    return (trust[i] ?? 0) * (distance <= 0.001 * reach ? 1 : (1 - (distance / reach) ** 3) ** 3);
  });
  const total = weights.reduce((sum, w) => sum + w, 0);
  if (total === 0) return y[x.indexOf(at)] ?? 0;
  const meanX = weights.reduce((sum, w, i) => sum + w * (x[i] ?? 0), 0) / total;
  const meanY = weights.reduce((sum, w, i) => sum + w * (y[i] ?? 0), 0) / total;
  const sxx = weights.reduce((sum, w, i) => sum + w * ((x[i] ?? 0) - meanX) ** 2, 0);
  const sxy = weights.reduce((sum, w, i) => sum + w * ((x[i] ?? 0) - meanX) * ((y[i] ?? 0) - meanY), 0);
  return sxx / total > (0.001 * reach) ** 2 ? meanY + (sxy / sxx) * (at - meanX) : meanY;
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length >> 1;
  const upper = sorted[half] ?? 0;
  return sorted.length % 2 === 1 ? upper : ((sorted[half - 1] ?? 0) + upper) / 2;
}
