import { and, desc, eq, isNull } from 'drizzle-orm';
import { kitOf } from '#domain/house/house';
import { daysBetween, localDate } from '#domain/flight/calendar';
import { firstTarget, type Baseline } from '#domain/load/first-target';
import { nextTarget } from '#domain/load/next-target';
import { planSession, trainable } from '#domain/load/plan-session';
import type { Decision, Done, Emphasis, Pain, Target } from '#domain/load/types';
import { rungOf, type MovementId } from '#domain/movement/ladders';
import type { Queryable } from '#server/db/client';
import { sessionItems, targetOverrides } from '#server/db/schema/index';
import type { FlightRow } from './flights.ts';
import { listMarks, type Mark } from './marks.ts';
import type { MemberState } from './members.ts';
import { doneItems } from './training.ts';

export type PlannedItem = Omit<typeof sessionItems.$inferInsert, 'sessionId'> & { overrideId: string | null };

type DoneRow = Awaited<ReturnType<typeof doneItems>>[number];
type Override = typeof targetOverrides.$inferSelect;

/** Weeks of a first flight in which somebody who begins gently is asked less. */
const GENTLE_WEEKS = 4;

/** The newest result of each test, as the first prescription needs it. */
export function baselineOf(marks: readonly Mark[], stairCount: number | undefined): Baseline {
  const newest = new Map(marks.map((mark) => [mark.test, mark]));
  const value = (test: Mark['test']) => newest.get(test)?.value;
  return {
    ...(value('push-ups') !== undefined && {
      pushUps: value('push-ups'),
      form: newest.get('push-ups')?.form === 'knees' ? 'knees' : 'floor',
    }),
    ...(value('sit-ups') !== undefined && { sitUps: value('sit-ups') }),
    ...(value('stairs') !== undefined && { stairs: value('stairs') }),
    ...(value('pull-ups') !== undefined && { pullUps: value('pull-ups') }),
    ...(value('plank') !== undefined && { plankSeconds: value('plank') }),
    ...(stairCount ? { stairCount } : {}),
  } as Baseline;
}

/** Pain named at this movement, as bad as the worse of what was said of it and of the whole session. */
const painOf = ({ item, sessionPain }: DoneRow): Pain => {
  if ((item.pain ?? 'none') === 'none') return 'none';
  return item.pain === 'strong' || sessionPain === 'strong' ? 'strong' : 'mild';
};

const asDone = ({ item, ...row }: DoneRow): Done => ({
  askedTotal: item.sets * item.amount,
  doneTotal: item.doneTotal ?? 0,
  effort: item.effortDone,
  effortAsked: item.effortAsked,
  pain: painOf({ item, ...row }),
});

const asTarget = ({ item }: DoneRow): Target => ({
  movement: item.movement as MovementId,
  rung: item.rung,
  sets: item.sets,
  amount: item.amount,
  unit: item.unit,
  effort: item.effortAsked,
});

interface Occasion {
  flight: FlightRow;
  week: number;
  ordinal: number;
  landing: boolean;
  now: Date;
}

/** What the rule asks of one movement: the first time from the baseline, then from what was done. */
function decide(
  movement: MovementId,
  history: readonly DoneRow[],
  given: {
    baseline: Baseline;
    emphasis: Emphasis;
    kit: ReturnType<typeof kitOf>;
    gentle: boolean;
    timeZone: string;
  },
  { landing, now }: Occasion,
): Decision {
  const { baseline, emphasis, kit, gentle, timeZone } = given;
  const mine = history.filter(({ item }) => item.movement === movement);
  const [last] = mine;
  if (!last?.doneAt) return firstTarget({ movement, emphasis, baseline, kit, gentle });
  const current = asTarget(last);
  return nextTarget({
    current,
    history: mine.filter(({ item }) => item.rung === current.rung).map(asDone),
    pain: 'none',
    emphasis,
    daysSinceLast: daysBetween(localDate(last.doneAt, timeZone), localDate(now, timeZone)),
    landingWeek: landing,
    kit,
    gentle,
    ...(last.item.overriddenBy && { coachSets: last.item.sets }),
  });
}

/** The rule's decision as a row, or the coach's wish in its place with what the rule said kept beside it. */
function asItem(position: number, { target, rule, why }: Decision, wish: Override | undefined): PlannedItem {
  const ruled = { ruledRung: target.rung, ruledSets: target.sets, ruledAmount: target.amount };
  if (!wish) {
    const { movement, rung, sets, amount, unit, effort } = target;
    return { position, movement, rung, sets, amount, unit, effortAsked: effort, rule, why, overrideId: null };
  }
  return {
    position,
    movement: target.movement,
    rung: wish.rung,
    sets: wish.sets,
    amount: wish.amount,
    unit: rungOf(wish.rung).unit,
    effortAsked: wish.effort,
    rule,
    why,
    ...ruled,
    overriddenBy: wish.coachId,
    overrideWhy: wish.why,
    overrideId: wish.id,
  };
}

/** Works out the items of one session. Three queries; everything after them is the domain's. */
export async function planItems(
  at: Queryable,
  state: MemberState,
  occasion: Occasion,
): Promise<{ title: string; items: PlannedItem[] }> {
  const { flight, week, ordinal } = occasion;
  // One after the other: inside a transaction there is one connection.
  const marks = await listMarks(at, state.memberId);
  const history = await doneItems(at, state.memberId);
  const wishes = await at
    .select()
    .from(targetOverrides)
    .where(and(eq(targetOverrides.memberId, state.memberId), isNull(targetOverrides.takenAt)))
    .orderBy(desc(targetOverrides.createdAt));
  const kit = kitOf(state.house ?? { stairCount: 0, matLengthCm: null, chair: false, bar: false });
  const emphasis = flight.emphasis;
  const pregnant = state.screen?.answers['pregnancy'] === 'pregnant';
  const given = {
    baseline: baselineOf(marks, state.house?.stairCount),
    emphasis,
    kit,
    gentle: state.screen?.result === 'gentle' && flight.number === 1 && week <= GENTLE_WEEKS,
    timeZone: state.timeZone,
  };
  const newest = new Map([...history].reverse().map((row) => [row.item.movement, asTarget(row)]));
  const plan = planSession({
    week,
    ordinal,
    emphasis,
    targets: [...newest.values()].filter(({ movement }) => trainable(kit, { pregnant }).has(movement)),
    kit,
    cautions: { pregnant },
  });
  const items = plan.items.map((movement, index) =>
    asItem(
      index + 1,
      decide(movement, history, given, occasion),
      wishes.find((wish) => wish.movement === movement),
    ),
  );
  return { title: plan.title, items };
}
