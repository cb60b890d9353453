interface PaceFacts {
  readonly isTapped: boolean;
  readonly count: number;
  readonly seconds: number | null;
  readonly perMinute: number | null;
  readonly fade: { readonly first: number; readonly last: number; readonly share: number } | null;
  readonly evenness: { readonly swing: number; readonly isUneven: boolean } | null;
  readonly longestPause: { readonly seconds: number; readonly atSeconds: number } | null;
}

/** A loss or gain of pace below this share is the ordinary course of a test. Common practice, no source. */
export const FADE_LIMIT = 0.15;

/**
 * What to do next time, in words. The pace to start at is the mean pace of the whole test: held evenly it gives the
 * same count, and what is left at the end is more. Common practice, no source.
 */
export function suggestPace(facts: PaceFacts): string {
  const { isTapped, count, perMinute, fade } = facts;
  if (count === 0) return 'No reps, so no pace.';
  if (perMinute === null) return `${count} in all. Without a time there is no pace.`;
  const mean = Math.round(perMinute);
  if (!isTapped)
    return `${count} is ${mean} a minute on the whole. Tap the reps next time and the pace will show.`;
  const pause = pauseInWords(facts);
  if (fade === null) return `${mean} a minute on the whole. Too few reps to speak of pace.${pause}`;
  const first = Math.round(fade.first);
  const last = Math.round(fade.last);
  if (fade.share > FADE_LIMIT) {
    return `You began at ${first} a minute and ended at ${last}: start at ${mean} next time.${pause}`;
  }
  if (fade.share < -FADE_LIMIT) {
    return `You began at ${first} a minute and ended at ${last}: there was more in the start. Begin at ${mean} next time.${pause}`;
  }
  if (facts.evenness?.isUneven) {
    const swing = Math.round(facts.evenness.swing);
    return `About ${mean} a minute from start to end, but the pace swung by ${swing}. Count a steady beat.${pause}`;
  }
  return `An even ${mean} a minute from start to end. Keep that pace.${pause}`;
}

function pauseInWords({ longestPause }: PaceFacts): string {
  if (!longestPause) return '';
  const seconds = Math.round(longestPause.seconds * 10) / 10;
  return ` The longest pause was ${seconds} seconds, at ${Math.round(longestPause.atSeconds)}.`;
}
