import type { APIContext } from 'astro';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { alerts, sessionItems, trainingSessions } from '#server/db/schema/index';
import { changeTarget } from '#server/services/targets';
import { readSession } from '#server/services/training';
import type { Viewer } from '#server/services/viewer';
import { codeOf } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, planned, reportOf, stateOf, takeBaseline, train } from '#support/training';
import { POST } from '../../src/pages/api/sessions/[id].ts';

const world = useApp();
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

/** A member on the first day of the first flight: 20 push-ups make a first target of 3 × 11. */
async function beginner() {
  const member = await addMember(world.app, { coach });
  await addHouse(world.app, member);
  await takeBaseline(world.app, member);
  return member;
}
type Planned = Awaited<ReturnType<typeof planned>> | null;
const pushOf = (session: Planned) => session?.items.find(({ movement }) => movement === 'push');
const asked = (session: Planned) => {
  const item = pushOf(session);
  return item && [item.rung, item.sets, item.amount, item.rule];
};

/** Logs `shares` one after the other and answers the next session that has push-ups in it. */
async function afterShares(member: Viewer, ...shares: number[]): Promise<Planned> {
  for (const share of shares) {
    while (!pushOf(await planned(world.app, member))) await train(world.app, member, 100);
    await train(world.app, member, share);
  }
  while (!pushOf(await planned(world.app, member))) await train(world.app, member, 100);
  return planned(world.app, member);
}

describe('targets', () => {
  it('begin at a share of the baseline, three movements, with the reason in words', async () => {
    const first = await planned(world.app, await beginner());
    expect(first.session).toMatchObject({ week: 1, ordinal: 1 });
    expect(first.items.map(({ movement }) => movement)).toEqual(['push', 'squat', 'sit-up']);
    expect(asked(first)).toEqual(['push-up-floor', 3, 11, 'first']);
    expect(pushOf(first)?.why).toBe('You did 20 push-ups; about 55 % of that is 3 sets of 11 reps here.');
  });

  it.each([
    ['come down below 100 %', [90], 10, 'down'],
    ['stay at 100 %', [100], 11, 'hold'],
    ['stay at 110 %, twice', [110, 110], 11, 'hold'],
    ['stay at 121 % once', [121], 11, 'hold'],
    ['stay at 121 % and then 100 %', [121, 100], 11, 'hold'],
    ['go up at 121 % twice running', [121, 121], 12, 'up-reps'],
  ])('%s', async (_, shares, amount, rule) => {
    expect(asked(await afterShares(await beginner(), ...shares))).toEqual(['push-up-floor', 3, amount, rule]);
  });

  it('come down with pain, whatever was done, and strong pain raises an alert', async () => {
    const member = await beginner();
    await train(world.app, member, 130, { pain: 'strong', painWhere: 'left shoulder' });
    const next = pushOf(await afterShares(member));
    expect(next?.rule).toBe('pain');
    expect(next?.rung).not.toBe('push-up-floor');
    const [alert] = await world.app.db.select().from(alerts).where(eq(alerts.memberId, member.id));
    expect(alert).toMatchObject({
      kind: 'pain',
      words: 'Strong pain in a session: left shoulder',
      settledAt: null,
    });
  });

  it('are lighter in a landing week: one set fewer', async () => {
    const member = await beginner();
    await train(world.app, member, 100);
    world.clock.moveDays(21);
    const next = await planned(world.app, member);
    expect(next.session.week).toBe(4);
    expect(pushOf(next)?.sets).toBe(2);
    expect(pushOf(next)?.rule).toBe('gap');
    world.clock.moveDays(-21);
  });

  it('of the coach stand in red in the planned session, and the rule goes on from them', async () => {
    const member = await beginner();
    await planned(world.app, member);
    const wish = {
      do: 'target' as const,
      movement: 'push',
      rung: 'push-up-knees',
      sets: 2,
      amount: 9,
      effort: 4,
    };
    await changeTarget(world.app, coach, await stateOf(world.app, member), { ...wish, why: 'Wrist first.' });
    expect(pushOf(await planned(world.app, member))).toMatchObject({
      rung: 'push-up-knees',
      sets: 2,
      amount: 9,
      effortAsked: 4,
      overriddenBy: coach.id,
      overrideWhy: 'Wrist first.',
      ruledRung: 'push-up-floor',
      ruledSets: 3,
      ruledAmount: 11,
    });
    const next = pushOf(await afterShares(member, 100));
    expect(next).toMatchObject({ rung: 'push-up-knees', sets: 2, amount: 9, overriddenBy: null });
  });

  it('of the coach for a movement that is not planned wait for it and are taken up once', async () => {
    const member = await beginner();
    const wish = {
      do: 'target' as const,
      movement: 'stairs',
      rung: 'stairs-walk',
      sets: 2,
      amount: 3,
      effort: 4,
    };
    await changeTarget(world.app, coach, await stateOf(world.app, member), { ...wish, why: 'Slow ones.' });
    const { next } = await train(world.app, member, 100);
    const stairs = (session: Planned) => session?.items.find(({ movement }) => movement === 'stairs');
    expect(stairs(next)).toMatchObject({ sets: 2, amount: 3, overrideWhy: 'Slow ones.' });
    const { next: third } = await train(world.app, member, 100);
    expect(stairs(third)).toMatchObject({ overriddenBy: null, overrideWhy: null });
  });

  it('refuse a variant of another movement', async () => {
    const member = await beginner();
    const wish = {
      do: 'target' as const,
      movement: 'push',
      rung: 'stairs-walk',
      sets: 2,
      amount: 3,
      effort: 4,
    };
    const change = changeTarget(world.app, coach, await stateOf(world.app, member), { ...wish, why: 'No.' });
    expect(await codeOf(change)).toBe('invalid');
  });
});

describe('logging', () => {
  /** The endpoint of the island, with its key. */
  const send = (viewer: Viewer, session: NonNullable<Planned>, key: string, percent = 100) => {
    const request = new Request(`http://localhost:4321/api/sessions/${session.session.id}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'idempotency-key': key },
      body: JSON.stringify(reportOf(session, percent)),
    });
    const context = { request, params: { id: session.session.id }, locals: { app: world.app, viewer } };
    return POST(context as unknown as APIContext) as Promise<Response>;
  };
  const doneOf = (memberId: string) =>
    world.app.db
      .select({ done: trainingSessions.doneAt, share: trainingSessions.shareDone })
      .from(trainingSessions)
      .where(eq(trainingSessions.memberId, memberId))
      .then((rows) => rows.filter(({ done }) => done));

  it('stores once for a key, sent again or twice at the same time, and gives the same reply', async () => {
    const member = await beginner();
    const session = await planned(world.app, member);
    const key = world.app.random.uuid();
    const [one, two] = await Promise.all([send(member, session, key), send(member, session, key)]);
    const three = await send(member, session, key);
    const replies = await Promise.all([one, two, three].map((reply) => reply?.json()));
    expect(replies[1]).toEqual(replies[0]);
    expect(replies[2]).toEqual(replies[0]);
    expect(three.headers.get('idempotent-replay')).toBe('true');
    expect(await doneOf(member.id)).toHaveLength(1);
    expect(await codeOf(send(member, session, key, 90))).toBe('conflict');
  });

  it('stores one of two tabs with keys of their own, and one session is planned after it', async () => {
    const member = await beginner();
    const session = await planned(world.app, member);
    const tries = [100, 110].map((share) => codeOf(send(member, session, world.app.random.uuid(), share)));
    expect((await Promise.all(tries)).sort()).toEqual(['conflict', 'none']);
    const rows = await world.app.db
      .select()
      .from(trainingSessions)
      .where(eq(trainingSessions.memberId, member.id));
    expect(rows.map(({ doneAt }) => doneAt !== null).sort()).toEqual([false, true]);
  });

  it('answers not found for another’s session, as for an absent one, and changes nothing', async () => {
    const [member, other] = [await beginner(), await beginner()];
    const session = await planned(world.app, member);
    expect(await codeOf(send(other, session, world.app.random.uuid()))).toBe('not-found');
    const absent = { ...session, session: { ...session.session, id: world.app.random.uuid() } };
    expect(await codeOf(send(other, absent, world.app.random.uuid()))).toBe('not-found');
    expect(await codeOf(readSession(world.app.db, other.id, session.session.id))).toBe('not-found');
    expect(await doneOf(member.id)).toEqual([]);
  });

  it('takes no item of another session, and no list with one missing', async () => {
    const member = await beginner();
    const session = await planned(world.app, member);
    const foreign = await planned(world.app, await beginner());
    const mixed = { ...session, items: [...session.items.slice(0, 2), ...foreign.items.slice(2)] };
    expect(await codeOf(send(member, mixed, world.app.random.uuid()))).toBe('not-found');
    const short = { ...session, items: session.items.slice(0, 2) };
    expect(await codeOf(send(member, short, world.app.random.uuid()))).toBe('not-found');
    const [item] = await world.app.db
      .select()
      .from(sessionItems)
      .where(eq(sessionItems.id, foreign.items[2]?.id ?? ''));
    expect(item?.doneTotal).toBeNull();
  });
});
