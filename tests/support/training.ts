import { houses } from '#server/db/schema/index';
import type { App } from '#server/app';
import { saveMark } from '#server/services/marks';
import { memberState, type MemberState } from '#server/services/members';
import { ensureTestDay, finishTestDay } from '#server/services/test-days';
import { ensurePlanned, logSession, type SessionWithItems } from '#server/services/training';
import type { SessionInput } from '#contracts/session';
import type { TestId } from '#domain/benchmark/tests';
import type { Viewer } from '#server/services/viewer';

/** A house with a flight of 13 stairs, a mat and a chair, and no bar. */
export async function addHouse(app: App, member: Viewer, stairCount = 13): Promise<void> {
  await app.db.insert(houses).values({
    memberId: member.id,
    stairCount,
    stepHeightMm: 175,
    rail: 'one side',
    matLengthCm: 180,
    matWidthCm: 60,
    marginCm: 60,
    chair: true,
    chairHeightCm: 45,
    updatedAt: app.clock.now(),
  });
}

/** The member's state. @throws when there is none */
export async function stateOf(app: App, member: Viewer): Promise<MemberState> {
  const state = await memberState(app, member.id);
  if (!state) throw new Error('no member');
  return state;
}

/** One result on the test day that is due, as its page writes it. */
export async function takeTest(app: App, member: Viewer, test: TestId, value: number, form = 'floor') {
  const state = await stateOf(app, member);
  const now = app.clock.now();
  return app.db.transaction(async (tx) =>
    saveMark(
      tx,
      member,
      { test, form, value, effort: 8, pain: 'none', conditions: '' },
      { testDayId: await ensureTestDay(tx, state, now), now },
    ),
  );
}

export async function finishDay(app: App, member: Viewer): Promise<{ week: number }> {
  const state = await stateOf(app, member);
  return app.db.transaction((tx) => finishTestDay(tx, state, app.clock.now()));
}

/** The baseline: 20 push-ups, 24 sit-ups, 143 stairs. The flight begins. */
export async function takeBaseline(app: App, member: Viewer): Promise<void> {
  await takeTest(app, member, 'push-ups', 20);
  await takeTest(app, member, 'sit-ups', 24, 'feet held');
  await takeTest(app, member, 'stairs', 143, 'walking');
  await finishDay(app, member);
}

/** The planned session. @throws when none is planned */
export async function planned(app: App, member: Viewer): Promise<SessionWithItems> {
  const session = await ensurePlanned(app, await stateOf(app, member));
  if (!session) throw new Error('no session is planned');
  return session;
}

/** What somebody writes down who did this share, in per cent, of everything asked, at the effort asked. */
export function reportOf(
  { items }: SessionWithItems,
  percent: number,
  more: Partial<SessionInput> = {},
): SessionInput {
  return {
    items: items.map((item) => ({
      id: item.id,
      doneTotal: Math.round((item.sets * item.amount * percent) / 100),
      pain: 'none',
    })),
    effort: items[0]?.effortAsked ?? 6,
    minutes: 35,
    pain: 'none',
    painWhere: '',
    note: '',
    ...more,
  };
}

/** Logs the planned session and answers the next one. */
export async function train(app: App, member: Viewer, percent: number, more: Partial<SessionInput> = {}) {
  const session = await planned(app, member);
  const state = await stateOf(app, member);
  const logged = await app.db.transaction((tx) =>
    logSession(tx, state, session.session.id, reportOf(session, percent, more), app.clock.now()),
  );
  return { session, ...logged };
}
