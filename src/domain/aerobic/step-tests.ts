/**
 * VO2max from the pulse 5 to 20 s after three minutes on a step of 41.3 cm (16.25 in), standing, in beats a minute:
 * men 111.33 − 0.42 HR (24 rounds a minute), women 65.81 − 0.1847 HR (22 rounds a minute), mL/kg/min.
 * Retest r 0.92, validity r −0.75. Source: McArdle WD et al. Med Sci Sports 1972;4:182-186 (college women); the line of
 * men from Katch and McArdle. Null for a pulse outside 50 to 220.
 */
export function queensCollegeVo2max(pulse: number, sex: 'male' | 'female'): number | null {
  if (!(pulse >= 50 && pulse <= 220)) return null;
  return sex === 'male' ? 111.33 - 0.42 * pulse : 65.81 - 0.1847 * pulse;
}

/**
 * Harvard index, long form: 100 t / (2 (P1 + P2 + P3)), t in seconds up to 300, P the 30-s pulse counts at 1, 2 and 3
 * minutes. Source: Brouha L et al. Rev Can Biol 1943;2:86-91 (students). The step is 51 cm (41 cm for women): not for
 * anyone who was not screened, and not offered by the product. Null for times or counts that cannot be.
 */
export function harvardIndex(seconds: number, counts: readonly [number, number, number]): number | null {
  if (!(seconds > 0 && seconds <= 300) || counts.some((count) => !(count > 0))) return null;
  return (100 * seconds) / (2 * (counts[0] + counts[1] + counts[2]));
}

/** Harvard index, short form: 100 t / (5.5 P1). Source, population and cautions as the long form. */
export function harvardIndexShort(seconds: number, firstCount: number): number | null {
  return seconds > 0 && seconds <= 300 && firstCount > 0 ? (100 * seconds) / (5.5 * firstCount) : null;
}

/** Words of the long form; another curriculum prints 96, 83 and 68 as cuts. Source: as `harvardIndex`. */
export function harvardWord(index: number): string {
  if (index >= 90) return 'excellent';
  if (index >= 80) return 'good';
  if (index >= 65) return 'high average';
  return index >= 55 ? 'low average' : 'poor';
}
