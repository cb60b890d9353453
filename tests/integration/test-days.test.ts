import { and, eq, isNull } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { flights, marks, testDays } from '#server/db/schema/index';
import { dueTestDay } from '#server/services/test-days';
import type { Viewer } from '#server/services/viewer';
import { codeOf } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, finishDay, planned, stateOf, takeBaseline, takeTest } from '#support/training';

const world = useApp('2026-11-10T23:30:00Z');
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

async function newcomer(stairCount = 13) {
  const member = await addMember(world.app, { coach });
  await addHouse(world.app, member, stairCount);
  return member;
}
const marksOf = (memberId: string) =>
  world.app.db.select().from(marks).where(eq(marks.memberId, memberId)).orderBy(marks.takenAt);
const due = async (member: Viewer) =>
  dueTestDay(world.app.db, await stateOf(world.app, member), world.app.clock.now());

describe('a test day', () => {
  it('keeps the second try and voids the first, which stays on record', async () => {
    const member = await newcomer();
    await takeTest(world.app, member, 'push-ups', 18);
    await takeTest(world.app, member, 'push-ups', 21);
    const all = await marksOf(member.id);
    expect(all.map(({ value, voidedAt }) => [value, voidedAt !== null]).sort()).toEqual([
      [18, true],
      [21, false],
    ]);
  });

  it('is not finished while a required test is missing, and says which', async () => {
    const member = await newcomer();
    await takeTest(world.app, member, 'push-ups', 18);
    await expect(finishDay(world.app, member)).rejects.toMatchObject({
      code: 'invalid',
      message: expect.stringMatching(/Still missing: sit-ups.*stairs/) as string,
    });
    await takeTest(world.app, member, 'sit-ups', 24, 'feet held');
    await takeTest(world.app, member, 'stairs', 143, 'walking');
    expect(await finishDay(world.app, member)).toEqual({ week: 0 });
    expect(await codeOf(finishDay(world.app, member))).toBe('conflict');
  });

  it('asks no stairs of a house without them', async () => {
    const member = await newcomer(0);
    await takeTest(world.app, member, 'push-ups', 18);
    await takeTest(world.app, member, 'sit-ups', 24, 'feet held');
    expect(await finishDay(world.app, member)).toEqual({ week: 0 });
  });

  it('begins the first flight on the member’s own day, where they live', async () => {
    const member = await newcomer();
    await world.app.pool.query(`update users set time_zone = 'Pacific/Auckland' where id = $1`, [member.id]);
    await takeBaseline(world.app, member);
    const [flight] = await world.app.db.select().from(flights).where(eq(flights.memberId, member.id));
    // 23:30 UTC on the 10th is half past noon on the 11th in Auckland.
    expect(flight).toMatchObject({ number: 1, startsOn: '2026-11-11' });
    expect((await planned(world.app, member)).session.ordinal).toBe(1);
  });

  it('keeps the stairs it was done on, so that a move of house begins another test', async () => {
    const member = await newcomer();
    await takeBaseline(world.app, member);
    await world.app.pool.query('update houses set stair_count = 16 where member_id = $1', [member.id]);
    const [stairs] = await world.app.db
      .select()
      .from(marks)
      .where(and(eq(marks.memberId, member.id), eq(marks.test, 'stairs')));
    expect(stairs).toMatchObject({ stairCount: 13, stepHeightMm: 175 });
  });

  it('is due at the baseline and in weeks 4, 8 and 12, once each, and never between', async () => {
    const member = await newcomer();
    expect(await due(member)).toEqual({ kind: 'baseline', week: 0, flightId: null });
    await takeBaseline(world.app, member);
    const weeks: (number | null)[] = [];
    for (let week = 1; week <= 12; week += 1) {
      const found = await due(member);
      weeks.push(found.kind === 'landing' ? found.week : null);
      if (found.kind === 'landing') {
        await takeTest(world.app, member, 'push-ups', 20 + week);
        await takeTest(world.app, member, 'sit-ups', 24, 'feet held');
        await takeTest(world.app, member, 'stairs', 150, 'walking');
        await finishDay(world.app, member);
        expect((await due(member)).kind).toBe('none');
      } else {
        expect(await codeOf(takeTest(world.app, member, 'push-ups', 20))).toBe('conflict');
      }
      world.clock.moveDays(7);
    }
    expect(weeks).toEqual([null, null, null, 4, null, null, null, 8, null, null, null, 12]);
    expect(await world.app.db.$count(testDays, eq(testDays.memberId, member.id))).toBe(4);
    expect(
      await world.app.db.$count(testDays, and(eq(testDays.memberId, member.id), isNull(testDays.finishedAt))),
    ).toBe(0);
  });
});
