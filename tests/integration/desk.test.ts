import { and, eq, isNull } from 'drizzle-orm';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { AnswerInput } from '#contracts/desk';
import { alerts, auditEntries, checkIns, drafts, holds, marks, messages } from '#server/db/schema/index';
import { once } from '#server/once';
import { answerMember, queueFor, rackOf, settleAlerts } from '#server/services/desk';
import { saveDraft } from '#server/services/drafts';
import { clearHold, holdPlan } from '#server/services/holds';
import { requireOwnMember } from '#server/services/members';
import { writeMessage } from '#server/services/messages';
import type { Viewer } from '#server/services/viewer';
import { codeOf, lettersTo } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const HOUR_MS = 3_600_000;
const world = useApp();
let coach: Viewer;
let other: Viewer;
beforeAll(async () => {
  coach = await addPerson(world.app, 'coach');
  other = await addPerson(world.app, 'coach');
});

const hoursAgo = (hours: number) => new Date(world.app.clock.now().getTime() - hours * HOUR_MS);

async function checkIn(member: Viewer, hours: number): Promise<string> {
  const [row] = await world.app.db
    .insert(checkIns)
    .values({
      memberId: member.id,
      weekStart: hoursAgo(hours).toISOString().slice(0, 10),
      sentAt: hoursAgo(hours),
      words: 'Stairs went easier this week.',
      went: 4,
      sleep: 3,
      soreness: 2,
      effort: 6,
    })
    .returning({ id: checkIns.id });
  return row?.id ?? '';
}

const answer = (viewer: Viewer, memberId: string, words: string, key = world.app.random.uuid()) =>
  once(world.app, viewer.id, { key, body: { memberId, words } }, (tx, enqueue) =>
    answerMember(tx, enqueue, viewer, { memberId, words }, world.app.clock.now()),
  );

const reasonsOf = async (viewer: Viewer, member: Viewer) =>
  (await queueFor(world.app, viewer))
    .find(({ memberId }) => memberId === member.id)
    ?.reasons.map(({ code }) => code);

describe('the queue', () => {
  it('gathers every reason from the records', async () => {
    const member = await addMember(world.app, { coach });
    expect(await reasonsOf(coach, member)).toBeUndefined();
    await checkIn(member, 30);
    await world.app.transaction((tx) =>
      writeMessage(tx, {
        memberId: member.id,
        authorId: member.id,
        byCoach: false,
        words: 'Elbows in?',
        at: hoursAgo(2),
      }),
    );
    await world.app.db
      .insert(alerts)
      .values({ memberId: member.id, kind: 'pain', words: 'Strong pain: right knee', raisedAt: hoursAgo(1) });
    await holdPlan(world.app, coach, { memberId: member.id, reason: 'The knee first.' });
    expect(await reasonsOf(coach, member)).toEqual(['pain', 'held', 'unanswered', 'message']);
  });

  it('holds the coach’s own members only', async () => {
    const mine = await addMember(world.app, { coach });
    const foreign = await addMember(world.app, { coach: other });
    await checkIn(mine, 3);
    await checkIn(foreign, 3);
    const [ids, theirs] = await Promise.all([queueFor(world.app, coach), queueFor(world.app, other)]);
    expect(ids.map(({ memberId }) => memberId)).toContain(mine.id);
    expect(ids.map(({ memberId }) => memberId)).not.toContain(foreign.id);
    expect(theirs.map(({ memberId }) => memberId)).toEqual([foreign.id]);
    for (const role of ['member', 'owner'] as const) {
      expect(await codeOf(queueFor(world.app, await addPerson(world.app, role)))).toBe('forbidden');
    }
  });

  it('says in the rack when an answer falls due, and how much more there is', async () => {
    const someone = await addPerson(world.app, 'coach');
    const member = await addMember(world.app, { coach: someone });
    await checkIn(member, 10);
    const [letter] = rackOf(await queueFor(world.app, someone), 'Europe/London');
    expect(letter).toMatchObject({ memberId: member.id, kind: 'caret', due: 'by 10 Nov, 23:00' });
  });

  it('asks as many questions of the database for many members as for one', async () => {
    const busy = await addPerson(world.app, 'coach');
    const count = async () => {
      const spy = vi.spyOn(world.app.pool, 'query');
      await queueFor(world.app, busy);
      const asked = spy.mock.calls.length;
      spy.mockRestore();
      return asked;
    };
    await checkIn(await addMember(world.app, { coach: busy }), 2);
    const one = await count();
    for (let added = 0; added < 12; added += 1)
      await checkIn(await addMember(world.app, { coach: busy }), added);
    expect(await count()).toBe(one);
    expect(one).toBeGreaterThan(0);
    expect(one).toBeLessThanOrEqual(5);
  });
});

describe('an answer', () => {
  it('stamps the check-in, writes the line, drops the draft, tells the member and takes the letter away', async () => {
    const member = await addMember(world.app, { coach });
    const id = await checkIn(member, 5);
    const key = `answer:${member.id}`;
    await saveDraft(world.app.db, coach.id, key, { words: 'Half a' }, world.app.clock.now());
    await answer(coach, member.id, 'Half with good form.');
    const [stamped] = await world.app.db.select().from(checkIns).where(eq(checkIns.id, id));
    expect(stamped).toMatchObject({ answeredBy: coach.id, answeredAt: world.app.clock.now() });
    const lines = await world.app.db.select().from(messages).where(eq(messages.memberId, member.id));
    expect(lines).toMatchObject([{ byCoach: true, words: 'Half with good form.', checkInId: id }]);
    expect(await world.app.db.select().from(drafts).where(eq(drafts.key, key))).toEqual([]);
    expect(await lettersTo(world.app, member.id)).toEqual(['answer']);
    expect(await reasonsOf(coach, member)).toBeUndefined();
    const [entry] = await world.app.db
      .select()
      .from(auditEntries)
      .where(eq(auditEntries.subjectId, member.id));
    expect(entry).toMatchObject({ action: 'answered a check-in', actorId: coach.id, details: {} });
  });

  it('is written once however often it is sent', async () => {
    const member = await addMember(world.app, { coach });
    const key = world.app.random.uuid();
    await answer(coach, member.id, 'Once.', key);
    expect((await answer(coach, member.id, 'Once.', key)).replayed).toBe(true);
    expect(await codeOf(answer(coach, member.id, 'Other words.', key))).toBe('conflict');
    const lines = await world.app.db.select().from(messages).where(eq(messages.memberId, member.id));
    expect(lines).toHaveLength(1);
  });

  it('to another coach’s member, or to nobody, answers the same 404 and leaves nothing', async () => {
    const foreign = await addMember(world.app, { coach: other });
    const id = await checkIn(foreign, 5);
    expect(await codeOf(answer(coach, foreign.id, 'Not mine.'))).toBe('not-found');
    expect(await codeOf(answer(coach, world.app.random.uuid(), 'Nobody.'))).toBe('not-found');
    const open = await world.app.db
      .select()
      .from(checkIns)
      .where(and(eq(checkIns.id, id), isNull(checkIns.answeredAt)));
    expect(open).toHaveLength(1);
    expect(await lettersTo(world.app, foreign.id)).toEqual([]);
  });

  it.each([
    ['no words', { words: '   ' }],
    ['4,001 letters', { words: 'a'.repeat(4001) }],
    ['a field it does not know', { words: 'Well.', as: 'owner' }],
    ['no member', { words: 'Well.', memberId: '../x' }],
  ])('is refused with %s', (_, more) => {
    expect(AnswerInput.safeParse({ memberId: coach.id, ...more }).success).toBe(false);
  });
});

describe('hold, clear and settle', () => {
  it('holds once with its reason, tells the member, and opens with the clearance', async () => {
    const member = await addMember(world.app, { coach });
    await holdPlan(world.app, coach, { memberId: member.id, reason: 'The wrist first.' });
    expect(await codeOf(holdPlan(world.app, coach, { memberId: member.id, reason: 'Again.' }))).toBe(
      'conflict',
    );
    await clearHold(world.app, coach, { memberId: member.id, clearance: 'Dr Lund, 9 Nov.' });
    const rows = await world.app.db.select().from(holds).where(eq(holds.memberId, member.id));
    expect(rows).toMatchObject([
      { reason: 'The wrist first.', clearance: 'Dr Lund, 9 Nov.', clearedBy: coach.id },
    ]);
    expect(await lettersTo(world.app, member.id)).toEqual(['held', 'cleared']);
    expect(await codeOf(clearHold(world.app, coach, { memberId: member.id, clearance: 'Again.' }))).toBe(
      'conflict',
    );
  });

  it('belongs to the member’s own coach', async () => {
    const foreign = await addMember(world.app, { coach: other });
    await world.app.db
      .insert(alerts)
      .values({ memberId: foreign.id, kind: 'pain', words: 'knee', raisedAt: hoursAgo(1) });
    const tries = [
      holdPlan(world.app, coach, { memberId: foreign.id, reason: 'Not mine.' }),
      clearHold(world.app, coach, { memberId: foreign.id, clearance: 'Not mine.' }),
      settleAlerts(world.app, coach, foreign.id),
      requireOwnMember(world.app, coach, foreign.id),
      requireOwnMember(world.app, coach, world.app.random.uuid()),
    ];
    expect(await Promise.all(tries.map(codeOf))).toEqual(tries.map(() => 'not-found'));
    expect(await reasonsOf(other, foreign)).toContain('pain');
    const owner = await addPerson(world.app, 'owner');
    expect(await codeOf(requireOwnMember(world.app, owner, foreign.id))).toBe('forbidden');
  });

  it('settles what was reported, once', async () => {
    const member = await addMember(world.app, { coach });
    await world.app.db
      .insert(alerts)
      .values({ memberId: member.id, kind: 'pain', words: 'knee', raisedAt: hoursAgo(1) });
    await settleAlerts(world.app, coach, member.id);
    await settleAlerts(world.app, coach, member.id);
    expect(await reasonsOf(coach, member)).toBeUndefined();
    const lines = await world.app.db.select().from(auditEntries).where(eq(auditEntries.subjectId, member.id));
    expect(lines.map(({ action }) => action)).toEqual(['settled an alert']);
  });
});

describe('a drop', () => {
  const DAY_HOURS = 24;
  const marksOf = async (member: Viewer, values: readonly number[]) =>
    world.app.db.insert(marks).values(
      values.map((value, index) => ({
        memberId: member.id,
        test: 'push-ups',
        form: 'floor',
        value,
        takenAt: hoursAgo((values.length - index) * 7 * DAY_HOURS),
      })),
    );

  it.each([
    ['a fall far beyond the error', [24, 25, 24, 25, 24, 12, 11, 12], true],
    ['a fall within the error', [24, 25, 24, 25, 24, 23, 24, 23], false],
    ['a rise', [12, 13, 12, 14, 18, 20, 21, 22], false],
  ])('%s', async (_, values, expected) => {
    const member = await addMember(world.app, { coach });
    await marksOf(member, values);
    expect((await reasonsOf(coach, member))?.includes('real-drop') ?? false).toBe(expected);
  });
});
