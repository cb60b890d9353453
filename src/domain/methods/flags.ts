import type { Flag } from './types.ts';

/** From the firmest to the weakest. */
const STRENGTH: readonly Flag[] = ['published', 'derived', 'memory', 'common practice, no source'];

/** What each flag means to the reader of a page. */
export const FLAG_SENTENCES: Readonly<Record<Flag, string>> = {
  published: 'Read in the source or in a copy of it.',
  derived: 'Worked out from figures that were read.',
  memory: 'From memory: these figures were not found in a document.',
  'common practice, no source': 'Common practice, no source.',
};

/** The weakest of some flags; 'published' when there are none. */
export function weakestFlag(flags: readonly Flag[]): Flag {
  return flags.reduce<Flag>(
    (weakest, flag) => (STRENGTH.indexOf(flag) > STRENGTH.indexOf(weakest) ? flag : weakest),
    'published',
  );
}
