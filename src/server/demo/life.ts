import { addDays, isLanding } from '#domain/flight/calendar';
import { kitOf } from '#domain/house/house';
import { firstTarget } from '#domain/load/first-target';
import { nextTarget } from '#domain/load/next-target';
import { planSession } from '#domain/load/plan-session';
import type { Decision, Done, Target } from '#domain/load/types';
import { liveWeeks, type LivedWeek } from './arcs.ts';
import type { Person } from './cast.ts';
import type { Chance } from './chance.ts';
import { ANSWER_WORDS, LINES, PLACES, WEEK_WORDS, type WeekKind } from './check-in-words.ts';
import { at, HOURS, type Frame, type Life } from './life-frame.ts';
import { markOf, TESTS } from './life-marks.ts';

const DAYS = [0, 2, 4];
const fill = (words: string, { person }: Frame, sessions: number) =>
  words
    .replaceAll('{name}', person.name.split(' ')[0] ?? '')
    .replaceAll('{where}', PLACES[person.name] ?? 'knee')
    .replaceAll('{n}', ['None', 'One', 'Two', 'Three'][sessions] ?? 'Three');

/** Draws without repeating until all have been used. */
function drawer(chance: Chance) {
  const used = new Map<readonly string[], Set<string>>();
  return (list: readonly string[]): string => {
    const seen = used.get(list) ?? new Set<string>();
    if (seen.size >= list.length) seen.clear();
    const word = chance.pick(list.filter((one) => !seen.has(one)));
    seen.add(word);
    used.set(list, seen);
    return word;
  };
}

interface Training {
  targets: Map<string, { current: Target; history: Done[]; day: string }>;
}

/** One session as the rule would ask it and as this person does it. */
function liveSession(
  frame: Frame,
  training: Training,
  life: Life,
  flight: { id: string; emphasis: Person['emphasis'] },
  week: number,
  ordinal: number,
  day: string,
  lived: LivedWeek,
): void {
  const { person, chance } = frame;
  const kit = kitOf({
    stairCount: person.stairs[0],
    matLengthCm: 180,
    chair: true,
    bar: person.bar === true,
  });
  const plan = planSession({
    week,
    ordinal,
    emphasis: flight.emphasis,
    targets: [...training.targets.values()].map(({ current }) => current),
    kit,
    cautions: {},
  });
  const sessionId = chance.uuid();
  const hurt = lived.kind === 'pain' && chance.happens(0.6);
  const shares: number[] = [];
  plan.items.forEach((movement, index) => {
    const before = training.targets.get(movement);
    const decision: Decision = before
      ? nextTarget({
          current: before.current,
          history: before.history,
          pain: 'none',
          emphasis: flight.emphasis,
          daysSinceLast: Math.max(0, (Date.parse(day) - Date.parse(before.day)) / 86_400_000),
          landingWeek: isLanding(week),
          kit,
        })
      : firstTarget({
          movement,
          emphasis: flight.emphasis,
          kit,
          baseline: {
            pushUps: person.start[0],
            form: person.sex === 'male' ? 'floor' : 'knees',
            sitUps: person.start[1],
            stairs: person.start[2],
            stairCount: person.stairs[0],
          },
        });
    const { target } = decision;
    const asked = target.sets * target.amount;
    const doneTotal = Math.max(0, Math.round(asked * chance.normal(lived.share, 0.07)));
    const effort = Math.min(
      10,
      Math.max(2, Math.round(chance.normal(target.effort + (lived.share < 1 ? 0.8 : 0), 0.7))),
    );
    const pain = hurt && index === 0 ? ('mild' as const) : ('none' as const);
    shares.push(Math.min(1.5, doneTotal / asked));
    const done: Done = { askedTotal: asked, doneTotal, effort, effortAsked: target.effort, pain };
    const sameRung = before?.current.rung === target.rung ? before.history : [];
    training.targets.set(movement, { current: target, history: [done, ...sameRung].slice(0, 6), day });
    life.items.push({
      id: chance.uuid(),
      sessionId,
      position: index + 1,
      movement,
      rung: target.rung,
      sets: target.sets,
      amount: target.amount,
      unit: target.unit,
      effortAsked: target.effort,
      rule: decision.rule,
      why: decision.why,
      doneTotal,
      effortDone: effort,
      pain,
    });
  });
  const doneAt = at(day, chance.pick(HOURS), chance.whole(0, 55));
  life.sessions.push({
    id: sessionId,
    memberId: frame.memberId,
    flightId: flight.id,
    week,
    ordinal,
    title: plan.title,
    plannedAt: new Date(doneAt.getTime() - 3_600_000),
    doneAt,
    minutes: Math.max(8, Math.round(chance.normal(plan.minutes, 3))),
    effort: Math.min(10, Math.max(2, Math.round(chance.normal(6, 1)))),
    pain: hurt ? 'mild' : 'none',
    painWhere: hurt ? (PLACES[person.name] ?? 'knee') : null,
    shareDone: Math.round((shares.reduce((sum, share) => sum + share, 0) / shares.length) * 100),
  });
}

/** The check-in at the end of a week, and the coach's answer some hours later unless it is still within the promise. */
function liveCheckIn(
  frame: Frame,
  life: Life,
  draw: (list: readonly string[]) => string,
  weekStart: string,
  lived: LivedWeek,
  landing: boolean,
): void {
  const { chance, now, memberId, coachId } = frame;
  const sentAt = at(addDays(weekStart, 6), chance.pick([7, 17, 18, 19, 20, 21]), chance.whole(0, 59));
  if (sentAt >= now) return;
  const kind: WeekKind = landing && lived.kind === 'good' ? 'test' : lived.kind;
  const id = chance.uuid();
  const answerAt = new Date(sentAt.getTime() + chance.whole(3, 19) * 3_600_000);
  const answered =
    answerAt < now && !(now.getTime() - sentAt.getTime() < 40 * 3_600_000 && chance.happens(0.7));
  const scaled = (mean: number, top: number) =>
    Math.min(top, Math.max(1, Math.round(chance.normal(mean, 0.8))));
  life.checkIns.push({
    id,
    memberId,
    weekStart,
    sentAt,
    words: fill(draw(WEEK_WORDS[kind]), frame, lived.sessions),
    went: scaled({ good: 4.3, test: 4, middling: 3.2, bad: 2, pain: 2.6, back: 3.4, first: 3.6 }[kind], 5),
    sleep: scaled(frame.person.about.includes('night') || frame.person.arc === 'lapsing' ? 2.4 : 3.5, 5),
    soreness: scaled(kind === 'pain' ? 3.6 : 2.2, 5),
    effort: scaled(kind === 'bad' ? 4 : 6.4, 10),
    pain: kind === 'pain' ? 'mild' : 'none',
    painWhere: kind === 'pain' ? (PLACES[frame.person.name] ?? 'knee') : null,
    ...(answered && { answeredAt: answerAt, answeredBy: coachId }),
  });
  if (!answered) return;
  const readAt = new Date(answerAt.getTime() + chance.whole(1, 30) * 3_600_000);
  life.messages.push({
    id: chance.uuid(),
    memberId,
    authorId: coachId,
    byCoach: true,
    sentAt: answerAt,
    words: fill(draw(ANSWER_WORDS[kind]), frame, lived.sessions),
    checkInId: id,
    readAt: readAt < now ? readAt : null,
  });
  if (chance.happens(0.12)) {
    const asked = new Date(answerAt.getTime() + 26 * 3_600_000);
    const back = new Date(asked.getTime() + 5 * 3_600_000);
    const which = chance.whole(0, LINES.member.length - 1);
    if (back < now) {
      life.messages.push({
        id: chance.uuid(),
        memberId,
        authorId: memberId,
        byCoach: false,
        sentAt: asked,
        words: LINES.member[which] ?? '',
        readAt: back,
      });
      life.messages.push({
        id: chance.uuid(),
        memberId,
        authorId: coachId,
        byCoach: true,
        sentAt: back,
        words: LINES.coach[which] ?? '',
        readAt: back,
      });
    }
  }
}

/** Lives one member from the baseline to now: tests, sessions, marks, check-ins and answers. */
export function liveOn(frame: Frame): Life {
  const { person, chance, memberId, now } = frame;
  const life: Life = {
    flights: [],
    testDays: [],
    marks: [],
    sessions: [],
    items: [],
    checkIns: [],
    messages: [],
  };
  const weeks = liveWeeks(person.arc, person.weeks + 1, chance);
  const draw = drawer(chance);
  const training: Training = { targets: new Map() };
  let flight: { id: string; emphasis: Person['emphasis']; startsOn: string } | null = null;
  const testAll = (day: string, week: number, ability: number, flightId: string) => {
    const id = chance.uuid();
    life.testDays.push({
      id,
      memberId,
      flightId,
      week,
      takenOn: day,
      finishedAt: at(day, 21, 0),
      createdAt: at(day, 6, 0),
    });
    for (const test of TESTS) life.marks.push(markOf(frame, test, ability, day, id));
  };
  weeks.forEach((lived, index) => {
    const week = (index % 12) + 1;
    const weekStart = addDays(frame.startsOn, index * 7);
    if (at(weekStart, 12, 0) > now) return;
    if (week === 1) {
      const id = chance.uuid();
      flight = { id, emphasis: person.emphasis, startsOn: weekStart };
      life.flights.push({
        id,
        memberId,
        number: Math.floor(index / 12) + 1,
        startsOn: weekStart,
        emphasis: person.emphasis,
        createdAt: at(weekStart, 6, 0),
      });
      if (index === 0) testAll(weekStart, 0, chance.normal(0.97, 0.02), id);
    }
    if (!flight) return;
    const running = flight;
    DAYS.slice(0, lived.sessions).forEach((offset, order) => {
      const day = addDays(weekStart, offset + chance.whole(0, 1));
      if (at(day, 21, 0) < now) liveSession(frame, training, life, running, week, order + 1, day, lived);
    });
    const testDay = addDays(weekStart, 5);
    if (isLanding(week) && lived.sessions > 0 && at(testDay, 21, 0) < now)
      testAll(testDay, week, lived.ability, running.id);
    else if (lived.sessions > 1 && at(addDays(weekStart, 3), 21, 0) < now && chance.happens(0.7)) {
      life.marks.push(markOf(frame, chance.pick(TESTS), lived.ability, addDays(weekStart, 3), null));
    }
    if (lived.checksIn) liveCheckIn(frame, life, draw, weekStart, lived, isLanding(week));
  });
  return life;
}
