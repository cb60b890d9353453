import { and, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { MarkInput } from '#contracts/marks';
import type { TestId } from '#domain/benchmark/tests';
import { alerts, auditEntries, marks } from '#server/db/schema/index';
import { marksBoard } from '#server/services/marks-board';
import { listMarks, saveMark, voidMark } from '#server/services/marks';
import { once } from '#server/once';
import type { Viewer } from '#server/services/viewer';
import { codeOf } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, stateOf } from '#support/training';

const world = useApp();
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

const typed = { test: 'push-ups', form: 'floor', value: '22', effort: '8', pain: 'none', conditions: '' };
const problems = (more: Record<string, unknown>) => {
  const read = MarkInput.safeParse({ once: world.app.random.uuid(), ...typed, ...more });
  return read.success ? [] : read.error.issues.map(({ path }) => path.join('.'));
};
const write = (
  viewer: Viewer,
  value: number,
  pain: 'none' | 'strong' = 'none',
  key = world.app.random.uuid(),
) => {
  const input = { test: 'push-ups' as const, form: 'floor', value, effort: 8, pain, conditions: '' };
  const now = world.app.clock.now();
  return once(world.app, viewer.id, { key, body: input }, (tx) =>
    saveMark(tx, viewer, input, { testDayId: null, now }),
  );
};

describe('a mark', () => {
  it.each([
    ['a count of 900', { value: '900' }],
    ['a count below 0', { value: '-3' }],
    ['words', { value: 'many' }],
    ['half a push-up', { value: '12,5' }],
    ['nothing', { value: '' }],
  ])('is refused at its field with %s', (_, more) => {
    expect(problems(more)).toEqual(['value']);
  });

  it('is refused with a form of another test, an effort of 11 and a field it does not know', () => {
    expect(problems({ form: 'walking' })).toEqual(['form']);
    expect(problems({ effort: '11' })).toEqual(['effort']);
    expect(problems({ value: '22', member: 'somebody' })).toEqual(['']);
    expect(problems({ value: ' 22 ' })).toEqual([]);
  });

  it('is stored once for its key, sent three times', async () => {
    const member = await addMember(world.app, { coach });
    const key = world.app.random.uuid();
    await Promise.all([write(member, 22, 'none', key), write(member, 22, 'none', key)]);
    expect((await write(member, 22, 'none', key)).replayed).toBe(true);
    expect(await world.app.db.$count(marks, eq(marks.memberId, member.id))).toBe(1);
  });

  it('with strong pain raises an alert', async () => {
    const member = await addMember(world.app, { coach });
    await write(member, 10, 'strong');
    const [alert] = await world.app.db.select().from(alerts).where(eq(alerts.memberId, member.id));
    expect(alert).toMatchObject({ kind: 'pain', words: 'Strong pain in the test: push-ups' });
  });

  it('that was mistyped leaves the charts and stays on record; another’s cannot be voided', async () => {
    const member = await addMember(world.app, { coach });
    const stranger = await addMember(world.app, { coach });
    const { reply } = await write(member, 80);
    expect(await codeOf(voidMark(world.app, stranger, reply.id))).toBe('not-found');
    expect(await listMarks(world.app.db, member.id)).toHaveLength(1);
    await voidMark(world.app, member, reply.id);
    expect(await listMarks(world.app.db, member.id)).toEqual([]);
    expect(await world.app.db.$count(marks, eq(marks.id, reply.id))).toBe(1);
    const mine = and(eq(auditEntries.actorId, member.id), eq(auditEntries.action, 'voided a mark'));
    expect(await world.app.db.$count(auditEntries, mine)).toBe(1);
    expect(await codeOf(voidMark(world.app, member, reply.id))).toBe('not-found');
  });
});

describe('the board', () => {
  const boardOf = async (member: Viewer, test: TestId) =>
    (await marksBoard(world.app, await stateOf(world.app, member))).find((board) => board.test === test);

  it('shows the member’s own marks and nobody else’s', async () => {
    const [member, other] = [await addMember(world.app, { coach }), await addMember(world.app, { coach })];
    for (const value of [20, 22, 21, 25]) {
      await write(member, value);
      world.clock.moveDays(7);
    }
    await write(other, 60);
    const board = await boardOf(member, 'push-ups');
    expect(board?.marks.map(({ value }) => value)).toEqual([20, 22, 21, 25]);
  });

  it('does not compare stairs with those of another house', async () => {
    const member = await addMember(world.app, { coach });
    await addHouse(world.app, member);
    const climb = (value: number) => {
      const input = { test: 'stairs' as const, form: 'walking', value, effort: 8, pain: 'none' as const };
      const now = world.app.clock.now();
      return world.app.db.transaction((tx) =>
        saveMark(tx, member, { ...input, conditions: '' }, { testDayId: null, now }),
      );
    };
    for (const value of [120, 160]) {
      await climb(value);
      world.clock.moveDays(28);
    }
    expect((await boardOf(member, 'stairs'))?.judgement.verdict).toBe('really better');
    await world.app.pool.query('update houses set stair_count = 16 where member_id = $1', [member.id]);
    await climb(200);
    expect((await boardOf(member, 'stairs'))?.judgement.verdict).toBe('too early');
  });
});
