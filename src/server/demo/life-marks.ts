import type * as schema from '#server/db/schema/index';
import { at, HOURS, type Frame, type Insert } from './life-frame.ts';

type Test = 'push-ups' | 'sit-ups' | 'stairs';
export const TESTS: readonly Test[] = ['sit-ups', 'push-ups', 'stairs'];
const NOISE: Record<Test, number> = { 'push-ups': 0.07, 'sit-ups': 0.06, stairs: 0.03 };
/** Even seven push-ups vary by one from day to day, in counts. */
const LEAST_SPREAD = 1;
/** How much of a gain in ability each test shows: stairs move less than push-ups. */
const GAIN: Record<Test, number> = { 'push-ups': 1.6, 'sit-ups': 0.9, stairs: 0.5 };

/** One mark of a test at this ability, with the day's own spread. */
export function markOf(
  frame: Frame,
  test: Test,
  ability: number,
  day: string,
  testDayId: string | null,
): Insert<typeof schema.marks> {
  const { person, chance } = frame;
  const start = person.start[{ 'push-ups': 0, 'sit-ups': 1, stairs: 2 }[test]] ?? 10;
  const expected = start * (1 + (ability - 1) * GAIN[test]);
  const spread = Math.max(LEAST_SPREAD, expected * NOISE[test]);
  const value = Math.max(1, Math.round(chance.normal(expected, spread)));
  return {
    id: chance.uuid(),
    memberId: frame.memberId,
    testDayId,
    test,
    form:
      test === 'push-ups'
        ? person.sex === 'male'
          ? 'floor'
          : 'knees'
        : test === 'sit-ups'
          ? 'feet held'
          : 'walking',
    value,
    takenAt: at(day, chance.pick(HOURS), chance.whole(0, 55)),
    effort: chance.whole(8, 10),
    pain: 'none',
    ...(test === 'stairs' && { stairCount: person.stairs[0], stepHeightMm: person.stairs[1] }),
  };
}
