import { unitWordFor, type TestId } from '../benchmark/tests.ts';
import { formatDuration, formatNumber } from '../numbers/format.ts';

/** How a test's numbers are said, and the smallest step it is counted in. */
export interface Speech {
  readonly better: 'more' | 'less';
  /** Smallest difference that the test knows: 1, or 0.1. */
  readonly step: number;
  /** The result as the subject of a sentence. */
  readonly say: (value: number) => string;
  /** A difference towards better: '2 more', '3 fewer', '12 s less'. */
  readonly sayNeeded: (needed: number) => string;
}

/** '1st', '22nd', '13th'. */
export function ordinal(n: number): string {
  const teens = n % 100 >= 11 && n % 100 <= 13;
  const ending = teens ? 'th' : ({ 1: 'st', 2: 'nd', 3: 'rd' }[n % 10] ?? 'th');
  return `${n}${ending}`;
}

/** Counts: sit-ups, push-ups, stands. */
export function speakCount(test: TestId): Speech {
  return {
    better: 'more',
    step: 1,
    say: (value) => `${formatNumber(value)} ${unitWordFor(test, value)}`,
    sayNeeded: (needed) => `${formatNumber(needed)} more`,
  };
}

export const SPEAK_CURL_UPS: Speech = {
  ...speakCount('sit-ups'),
  say: (value) => `${formatNumber(value)} curl-ups`,
};

export const SPEAK_BEATS: Speech = {
  better: 'less',
  step: 1,
  say: (value) => `${formatNumber(value)} beats a minute`,
  sayNeeded: (needed) => `${formatNumber(needed)} fewer`,
};

export const SPEAK_METRES: Speech = {
  better: 'more',
  step: 1,
  say: (value) => `${formatNumber(value)} m`,
  sayNeeded: (needed) => `${formatNumber(needed)} m more`,
};

/** A time to beat. */
export const SPEAK_RACE: Speech = {
  better: 'less',
  step: 1,
  say: formatDuration,
  sayNeeded: (needed) => `${formatNumber(needed)} s less`,
};

/** A time to hold. */
export const SPEAK_HOLD: Speech = {
  better: 'more',
  step: 1,
  say: formatDuration,
  sayNeeded: (needed) => `${formatNumber(needed)} s more`,
};

export const SPEAK_VO2MAX: Speech = {
  better: 'more',
  step: 0.1,
  say: (value) => `${formatNumber(value, 1)} mL/kg/min`,
  sayNeeded: (needed) => `${formatNumber(needed, 1)} more`,
};
