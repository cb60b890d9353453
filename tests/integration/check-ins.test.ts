import type { APIContext } from 'astro';
import { and, eq, isNull } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { CheckInInput } from '#contracts/check-in';
import { alerts, checkIns, drafts, messages, photos } from '#server/db/schema/index';
import { sendCheckIn } from '#server/services/check-ins';
import { answerMember } from '#server/services/desk';
import { saveDraft } from '#server/services/drafts';
import { currentWeekStart } from '#server/services/flights';
import { readThread } from '#server/services/messages';
import type { Viewer } from '#server/services/viewer';
import { codeOf, lettersTo } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, takeBaseline } from '#support/training';
import { POST } from '../../src/pages/api/check-ins.ts';

const world = useApp('2026-11-12T09:00:00Z');
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

const told = (more: Partial<CheckInInput> = {}): CheckInInput => ({
  words: 'Three sessions, one late. Slept badly on Tuesday.',
  went: 4,
  sleep: 2,
  soreness: 3,
  effort: 6,
  pain: 'none',
  painWhere: '',
  ...more,
});

/** The endpoint of the island. */
function send(viewer: Viewer, body: unknown, key = world.app.random.uuid()): Promise<Response> {
  const request = new Request('http://localhost:4321/api/check-ins', {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'idempotency-key': key },
    body: JSON.stringify(body),
  });
  return POST({
    request,
    params: {},
    locals: { app: world.app, viewer },
  } as unknown as APIContext) as Promise<Response>;
}
const countOf = (memberId: string) => world.app.db.$count(checkIns, eq(checkIns.memberId, memberId));
const picture = async (memberId: string) => {
  const [row] = await world.app.db
    .insert(photos)
    .values({ memberId, objectKey: world.app.random.uuid(), bytes: 10, createdAt: world.app.clock.now() })
    .returning();
  return row?.id ?? '';
};

describe('the weekly check-in', () => {
  it('is sent once a week: the same key replays, another key is told so, two at once make one', async () => {
    const member = await addMember(world.app, { coach });
    const key = world.app.random.uuid();
    await send(member, told(), key);
    expect((await send(member, told(), key)).headers.get('idempotent-replay')).toBe('true');
    expect(await codeOf(send(member, told()))).toBe('conflict');
    const other = await addMember(world.app, { coach });
    const both = await Promise.all([codeOf(send(other, told())), codeOf(send(other, told({ went: 5 })))]);
    expect(both.sort()).toEqual(['conflict', 'none']);
    expect([await countOf(member.id), await countOf(other.id)]).toEqual([1, 1]);
    world.clock.moveDays(7);
    expect(await codeOf(send(member, told()))).toBe('none');
    world.clock.moveDays(-7);
  });

  it('counts weeks from Monday before the first flight and from the flight’s own day after', async () => {
    const member = await addMember(world.app, { coach });
    const start = () => currentWeekStart(world.app.db, member, world.app.clock.now());
    expect(await start()).toBe('2026-11-09');
    await addHouse(world.app, member);
    await takeBaseline(world.app, member);
    world.clock.moveDays(6);
    expect(await start()).toBe('2026-11-12');
    world.clock.moveDays(1);
    expect(await start()).toBe('2026-11-19');
    world.clock.moveDays(-7);
  });

  it('with strong pain raises an alert with the place; mild pain does not', async () => {
    const [strong, mild] = [await addMember(world.app, { coach }), await addMember(world.app, { coach })];
    await send(strong, told({ pain: 'strong', painWhere: 'left knee' }));
    await send(mild, told({ pain: 'mild', painWhere: 'left knee' }));
    const of = (member: Viewer) => world.app.db.select().from(alerts).where(eq(alerts.memberId, member.id));
    expect(await of(strong)).toMatchObject([
      { kind: 'pain', words: 'Strong pain: left knee', settledAt: null },
    ]);
    expect(await of(mild)).toEqual([]);
  });

  it('takes the member’s own picture and refuses another’s', async () => {
    const [member, other] = [await addMember(world.app, { coach }), await addMember(world.app, { coach })];
    const foreign = await picture(other.id);
    expect(await codeOf(send(member, told({ photoId: foreign })))).toBe('invalid');
    expect(await countOf(member.id)).toBe(0);
    expect(await codeOf(send(member, told({ photoId: await picture(member.id) })))).toBe('none');
  });

  it('drops the draft with the sending, and keeps it when the sending fails', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const key = 'check-in:2026-11-09';
    await saveDraft(app.db, member.id, key, { words: 'half a' }, app.clock.now());
    const mine = and(eq(drafts.userId, member.id), eq(drafts.key, key));
    expect(await codeOf(send(member, told({ photoId: app.random.uuid() })))).toBe('invalid');
    expect(await app.db.$count(drafts, mine)).toBe(1);
    await send(member, told());
    expect(await app.db.$count(drafts, mine)).toBe(0);
  });

  it.each([
    ['no words', { words: '   ' }, 'words'],
    ['4,001 characters', { words: 'a'.repeat(4001) }, 'words'],
    ['sleep of 6', { sleep: 6 }, 'sleep'],
    ['effort of 0', { effort: 0 }, 'effort'],
    ['pain without a place', { pain: 'strong' }, 'painWhere'],
  ])('refuses %s at its field and stores nothing', async (_, more, field) => {
    const member = await addMember(world.app, { coach });
    const sending = send(member, { ...told(), ...more });
    await expect(sending).rejects.toMatchObject({ code: 'invalid' });
    const fields = await sending.catch((error: { fields: Record<string, string> }) => error.fields);
    expect(Object.keys(fields)).toEqual([field]);
    expect(await countOf(member.id)).toBe(0);
  });

  it('refuses a field it does not know: the sender is not one of our pages', async () => {
    const member = await addMember(world.app, { coach });
    expect(await codeOf(send(member, { ...told(), memberId: member.id }))).toBe('bad-request');
    expect(await countOf(member.id)).toBe(0);
  });

  it('is for members: a visitor, the coach and nobody at all are sent away', async () => {
    expect(await codeOf(send(await addPerson(world.app, 'visitor'), told()))).toBe('forbidden');
    expect(await codeOf(send(coach, told()))).toBe('forbidden');
    expect(await codeOf(send(null as unknown as Viewer, told()))).toBe('signed-out');
  });
});

describe('the answer', () => {
  it('stamps what waits, stands in the thread, tells the member once, and comes from their coach alone', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const now = app.clock.now();
    await app.db.transaction((tx) => sendCheckIn(tx, member, told(), { weekStart: '2026-11-02', now }));
    const answer = (by: Viewer, words: string) =>
      app.transaction((tx, enqueue) => answerMember(tx, enqueue, by, { memberId: member.id, words }, now));
    const stranger = await addPerson(app, 'coach');
    expect(await codeOf(answer(stranger, 'Not mine'))).toBe('not-found');
    expect(await answer(coach, 'Sleep first. The same load again.')).toEqual({ answered: true });
    const waiting = and(eq(checkIns.memberId, member.id), isNull(checkIns.answeredAt));
    expect(await app.db.$count(checkIns, waiting)).toBe(0);
    expect(await lettersTo(app, member.id)).toEqual(['answer']);
    const thread = await readThread(app, member.id);
    expect(thread.map(({ kind, byCoach }) => [kind, byCoach])).toEqual([
      ['check-in', false],
      ['message', true],
    ]);
    expect(await answer(coach, 'One more thing.')).toEqual({ answered: false });
    expect(await app.db.$count(messages, eq(messages.memberId, member.id))).toBe(2);
  });
});
