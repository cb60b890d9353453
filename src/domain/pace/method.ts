import type { MethodEntry } from '../methods/types.ts';
import { describePace, PAUSE_BEATS, SWING_LIMIT } from './describe-pace.ts';
import { FADE_LIMIT } from './pace-words.ts';

/** Reps at an even beat, the last one on `toMs`. */
function evenTaps(reps: number, fromMs: number, toMs: number): number[] {
  return Array.from({ length: reps }, (_, i) => fromMs + ((i + 1) * (toMs - fromMs)) / reps);
}

/** The method behind the pace of a test. */
export const PACE_METHODS: readonly MethodEntry[] = [
  {
    slug: 'pace',
    title: 'Pace of a test',
    purpose: 'Whether you began too fast, and how evenly you worked.',
    formula: `Reps ÷ minutes, in each ten seconds and over five beats. Fade: (first third − last third) ÷ first third, worth a word from ${FADE_LIMIT * 100} %. Swing: fastest less slowest pace without the wildest tenth at each end, worth a word above ${SWING_LIMIT}. Pause: a beat of ${PAUSE_BEATS} usual ones or more. Pace to begin at: the mean of the test`,
    units: 'Reps a minute; seconds',
    example: () => ({
      inputs: '14 reps in the first twenty seconds, 10 in the next, 7 in the last.',
      result: describePace({
        tapsMs: [...evenTaps(14, 0, 20_000), ...evenTaps(10, 20_000, 40_000), ...evenTaps(7, 40_000, 60_000)],
        durationMs: 60_000,
      }).suggestion,
    }),
    sources: [
      {
        citation: 'Rules of the practice',
        year: null,
        population: 'Nobody was measured',
        flag: 'common practice, no source',
      },
    ],
    limits: ['A tap can be late or forgotten. A bare count has no pace but the mean.'],
    flag: 'common practice, no source',
  },
];
