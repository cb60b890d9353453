/** The 97.5th percentile of the normal distribution: a two-sided interval of 95 in 100. */
const Z_95 = 1.959964;

/**
 * Between which shares the true one lies, 95 times in 100, when `count` of `of` were seen (0 to 1). The score interval of
 * Wilson (1927), which stays honest with few cases and with none. Null when nothing was seen at all.
 */
export function shareInterval(count: number, of: number): { low: number; high: number } | null {
  if (of <= 0) return null;
  const share = count / of;
  const spread = Z_95 * Math.sqrt((share * (1 - share)) / of + Z_95 ** 2 / (4 * of ** 2));
  const middle = share + Z_95 ** 2 / (2 * of);
  const size = 1 + Z_95 ** 2 / of;
  return { low: Math.max(0, (middle - spread) / size), high: Math.min(1, (middle + spread) / size) };
}
