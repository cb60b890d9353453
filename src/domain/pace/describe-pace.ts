import { suggestPace } from './pace-words.ts';

export interface PaceQuestion {
  /** When each rep was tapped, milliseconds from the start of the test, in order. Empty when only a count is known. */
  readonly tapsMs?: readonly number[] | null | undefined;
  /** Reps, when they were not tapped. */
  readonly count?: number | undefined;
  /** Length of a timed test; the last tap when not given. */
  readonly durationMs?: number | undefined;
}

export interface PacePoint {
  readonly atSeconds: number;
  readonly perMinute: number;
}

export interface PaceReport {
  readonly count: number;
  /** Null when neither taps nor a length are known. */
  readonly seconds: number | null;
  readonly perMinute: number | null;
  /** Reps in each ten seconds, the last one perhaps shorter; empty without taps. */
  readonly perTenSeconds: readonly number[];
  /** Pace over five beats, at the middle of each; empty with fewer than six reps. */
  readonly curve: readonly PacePoint[];
  /** Pace of the first and the last third, and the share lost (negative: gained). Null with fewer than nine reps. */
  readonly fade: { readonly first: number; readonly last: number; readonly share: number } | null;
  /** Null with fewer than six reps. */
  readonly evenness: Evenness | null;
  /** The longest beat, if it is twice the usual one or more. */
  readonly longestPause: { readonly seconds: number; readonly atSeconds: number } | null;
  readonly suggestion: string;
}

export interface Evenness {
  /** SD of the time between reps as a share of its mean. */
  readonly spread: number;
  /** Fastest less slowest of the pace curve without its wildest tenth at each end, reps a minute. */
  readonly swing: number;
  /** A swing of more than two is worth a word (common practice, no source). */
  readonly isUneven: boolean;
}

/** Thrown for a count or a time that is no number, negative, out of order or after the end. */
export class PaceInputError extends Error {
  readonly code = 'pace_input';
}

/** More than this between fast and slow is worth a word, reps a minute. Common practice, no source. */
export const SWING_LIMIT = 2;
/** A beat this many times the usual one is a pause. Common practice, no source. */
export const PAUSE_BEATS = 2;
const CURVE_BEATS = 5;
const REPS_FOR_FADE = 9;

/**
 * Pace and steadiness of a test from the times of its taps. From a bare count it says what a count can say.
 * Pure arithmetic; the limits are common practice without a source. Throws `PaceInputError` on nonsense.
 */
export function describePace(question: PaceQuestion): PaceReport {
  const taps = question.tapsMs ?? [];
  const { durationMs } = question;
  checkTimes(taps, durationMs);
  const count = taps.length > 0 ? taps.length : checkCount(question.count ?? 0);
  const lengthMs = durationMs ?? taps.at(-1) ?? null;
  const perMinute = lengthMs ? rate(count, lengthMs) : null;
  const curve = paceCurve(taps);
  const report = {
    count,
    seconds: lengthMs === null ? null : lengthMs / 1000,
    perMinute,
    perTenSeconds: lengthMs && taps.length > 0 ? countPerTenSeconds(taps, lengthMs) : [],
    curve,
    fade: lengthMs ? fadeOf(taps, lengthMs) : null,
    evenness: evennessOf(taps, curve),
    longestPause: longestPauseOf(taps),
  };
  return { ...report, suggestion: suggestPace({ ...report, isTapped: taps.length > 0 }) };
}

function checkTimes(taps: readonly number[], durationMs: number | undefined): void {
  if (durationMs !== undefined && (!Number.isFinite(durationMs) || durationMs <= 0)) {
    throw new PaceInputError(`A test cannot last ${durationMs} ms`);
  }
  let last = 0;
  for (const tap of taps) {
    if (!Number.isFinite(tap) || tap < last) throw new PaceInputError(`A tap at ${tap} ms is out of order`);
    if (tap > (durationMs ?? Infinity)) throw new PaceInputError(`A tap at ${tap} ms is after the end`);
    last = tap;
  }
}

function checkCount(count: number): number {
  if (!Number.isInteger(count) || count < 0) throw new PaceInputError(`${count} is no count of reps`);
  return count;
}

function countPerTenSeconds(taps: readonly number[], lengthMs: number): number[] {
  const counts = new Array<number>(Math.ceil(lengthMs / 10_000)).fill(0);
  for (const tap of taps) {
    // A rep on the stroke of ten seconds belongs to the ten seconds it ends.
    const at = Math.max(0, Math.ceil(tap / 10_000) - 1);
    counts[at] = (counts[at] ?? 0) + 1;
  }
  return counts;
}

function paceCurve(taps: readonly number[]): PacePoint[] {
  const points: PacePoint[] = [];
  for (let i = CURVE_BEATS; i < taps.length; i += 1) {
    const from = taps[i - CURVE_BEATS] ?? 0;
    const to = taps[i] ?? 0;
    if (to > from) points.push({ atSeconds: (from + to) / 2000, perMinute: rate(CURVE_BEATS, to - from) });
  }
  return points;
}

function fadeOf(taps: readonly number[], lengthMs: number): PaceReport['fade'] {
  if (taps.length < REPS_FOR_FADE) return null;
  const third = lengthMs / 3;
  const first = rate(taps.filter((tap) => tap <= third).length, third);
  const last = rate(taps.filter((tap) => tap > 2 * third).length, third);
  return first === 0 ? null : { first, last, share: (first - last) / first };
}

function evennessOf(taps: readonly number[], curve: readonly PacePoint[]): Evenness | null {
  const beats = beatsOf(taps);
  const mean = beats.reduce((sum, beat) => sum + beat, 0) / beats.length;
  if (curve.length === 0 || mean === 0) return null;
  const variance = beats.reduce((sum, beat) => sum + (beat - mean) ** 2, 0) / (beats.length - 1);
  const paces = curve.map((point) => point.perMinute).sort((a, b) => a - b);
  const trimmed = Math.floor(paces.length / 10);
  const swing = (paces[paces.length - 1 - trimmed] ?? 0) - (paces[trimmed] ?? 0);
  return { spread: Math.sqrt(variance) / mean, swing, isUneven: swing > SWING_LIMIT };
}

function longestPauseOf(taps: readonly number[]): PaceReport['longestPause'] {
  const beats = beatsOf(taps);
  if (beats.length < 2) return null;
  const usual = [...beats].sort((a, b) => a - b)[beats.length >> 1] ?? 0;
  const longest = Math.max(...beats);
  if (longest < PAUSE_BEATS * usual || longest === 0) return null;
  return { seconds: longest / 1000, atSeconds: (taps[beats.indexOf(longest)] ?? 0) / 1000 };
}

function beatsOf(taps: readonly number[]): number[] {
  return taps.slice(1).map((tap, i) => tap - (taps[i] ?? 0));
}

/** Reps a minute. */
function rate(reps: number, ms: number): number {
  return (reps * 60_000) / ms;
}
