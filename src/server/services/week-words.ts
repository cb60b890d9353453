import { SESSIONS_A_WEEK } from '#domain/flight/calendar';
import type { MemberState } from './members.ts';
import type { WeekFacts } from './week.ts';

const ORDINALS = [
  'first',
  'second',
  'third',
  'fourth',
  'fifth',
  'sixth',
  'seventh',
  'eighth',
  'ninth',
  'tenth',
  'eleventh',
  'twelfth',
];

/** Which of its faces the member's home shows, and what it says there. */
export type Situation = 'held' | 'closed' | 'baseline' | 'between' | 'running';

export function situationOf(state: MemberState, facts: WeekFacts): Situation {
  if (state.hold) return 'held';
  if (!state.access.mayRead) return 'closed';
  if (!facts.flight) return 'baseline';
  return facts.over ? 'between' : 'running';
}

const left = (done: number): string => {
  const rest = SESSIONS_A_WEEK - done;
  if (rest <= 0) return 'All three sessions are done. Anything more is yours to choose.';
  if (done === 0) return 'Three sessions, any days with one between.';
  return done === 1 ? 'One session done, two to go.' : 'Two sessions done, one to go.';
};

/** The heading and the sentence under it. */
export function weekWords(
  situation: Situation,
  state: MemberState,
  facts: WeekFacts,
): { title: string; lead: string } {
  switch (situation) {
    case 'held':
      return { title: 'Your plan is held', lead: state.hold?.reason ?? '' };
    case 'closed':
      return { title: 'Your plan is closed', lead: state.access.sentence };
    case 'baseline':
      return {
        title: 'First, where you stand',
        lead: 'Sit-ups in a minute, push-ups and the stairs. From them every target is worked out. Half an hour, with rests.',
      };
    case 'between':
      return {
        title: 'A flight is done',
        lead: `Flight ${facts.flight?.number ?? 1} is behind you. The next one begins where this one ended.`,
      };
    case 'running':
      return { title: `The ${ORDINALS[facts.week - 1] ?? ''} tread`, lead: left(facts.done.length) };
  }
}
