import type { Arc } from './cast.ts';
import type { Chance } from './chance.ts';

/** One week of a life: how able against the first day, how many sessions, how the week went. */
export interface LivedWeek {
  ability: number;
  sessions: number;
  kind: 'good' | 'middling' | 'bad' | 'pain' | 'back' | 'first';
  /** Done over asked, around which each session varies. */
  share: number;
  checksIn: boolean;
}

/** Weekly growth, chance of each of three sessions, and done over asked, by arc. */
const TEMPERS: Record<Arc, { growth: number; keen: number; share: number; writes: number }> = {
  improving: { growth: 0.034, keen: 0.9, share: 1.13, writes: 0.92 },
  stalling: { growth: 0.012, keen: 0.78, share: 1.04, writes: 0.8 },
  lapsing: { growth: 0.016, keen: 0.72, share: 1.02, writes: 0.6 },
  'hurt and back': { growth: 0.03, keen: 0.86, share: 1.1, writes: 0.85 },
  held: { growth: 0.012, keen: 0.8, share: 1, writes: 0.8 },
  trial: { growth: 0.015, keen: 0.85, share: 1.08, writes: 1 },
  cancelled: { growth: 0.012, keen: 0.75, share: 1.01, writes: 0.7 },
  'card failed': { growth: 0.026, keen: 0.84, share: 1.1, writes: 0.8 },
  stopped: { growth: 0.014, keen: 0.85, share: 1.02, writes: 0.9 },
  new: { growth: 0, keen: 0, share: 1, writes: 0 },
};

const LAPSE_AFTER = 0.65;
const HURT_WEEKS = 3;
const LEVELLING_WEEKS = 30;

/** Lives `weeks` weeks. Growth slows, luck drifts, the arc bends it: nothing is a straight line. */
export function liveWeeks(arc: Arc, weeks: number, chance: Chance): LivedWeek[] {
  const temper = TEMPERS[arc];
  const hurtAt = arc === 'hurt and back' ? Math.floor(weeks * (0.3 + 0.25 * chance.next())) : -1;
  let ability = 1;
  let luck = 0;
  return Array.from({ length: weeks }, (_, week): LivedWeek => {
    const lapsed = arc === 'lapsing' && week > weeks * LAPSE_AFTER;
    const hurt = week >= hurtAt && week < hurtAt + HURT_WEEKS && hurtAt >= 0;
    const back = hurtAt >= 0 && week >= hurtAt + HURT_WEEKS && week < hurtAt + HURT_WEEKS + 2;
    luck = 0.6 * luck + chance.normal(0, 0.012);
    const keen = lapsed ? 0.22 : hurt ? 0.25 : chance.happens(0.1) ? 0.35 : temper.keen;
    const sessions = [0, 1, 2].filter(() => chance.happens(keen)).length;
    const growth =
      temper.growth *
      Math.exp(-week / LEVELLING_WEEKS) *
      (sessions / 3) *
      (arc === 'stalling' && week > 7 ? 0.1 : 1);
    ability *= 1 + growth - (hurt ? 0.07 : 0) - (sessions === 0 ? 0.012 : 0);
    const kind =
      week === 0
        ? 'first'
        : hurt
          ? 'pain'
          : back
            ? 'back'
            : sessions >= 3
              ? 'good'
              : sessions === 2
                ? 'middling'
                : 'bad';
    return {
      ability: ability * (1 + luck),
      sessions,
      kind,
      share: temper.share - (hurt ? 0.25 : 0) - (lapsed ? 0.1 : 0),
      checksIn: chance.happens(lapsed ? 0.35 : temper.writes),
    };
  });
}
