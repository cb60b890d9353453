import { and, eq, isNull } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { DeskForm, type TargetInput } from '#contracts/desk';
import { auditEntries, targetOverrides } from '#server/db/schema/index';
import { readDossier } from '#server/services/dossier';
import { changeTarget } from '#server/services/targets';
import type { Viewer } from '#server/services/viewer';
import { codeOf } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, planned, stateOf, takeBaseline, train } from '#support/training';

const world = useApp();
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

/** A member with a flight and a planned session. */
async function inTraining(): Promise<Viewer> {
  const member = await addMember(world.app, { coach });
  await addHouse(world.app, member);
  await takeBaseline(world.app, member);
  await planned(world.app, member);
  return member;
}

const change = async (viewer: Viewer, member: Viewer, input: Omit<TargetInput, 'do'>) =>
  changeTarget(world.app, viewer, await stateOf(world.app, member), { do: 'target', ...input });

const waiting = (member: Viewer) =>
  world.app.db
    .select()
    .from(targetOverrides)
    .where(and(eq(targetOverrides.memberId, member.id), isNull(targetOverrides.takenAt)));

describe('a target changed in red', () => {
  it('changes the planned session and keeps beside it what the rule said', async () => {
    const member = await inTraining();
    const before = (await planned(world.app, member)).items[0];
    if (!before) throw new Error('an item is planned');
    const { movement, rung, sets, amount, rule, why } = before;
    await change(coach, member, {
      movement,
      rung,
      sets: 2,
      amount: amount + 3,
      effort: 4,
      why: 'The wrist.',
    });
    // A second thought changes what the coach says, never what the rule said.
    await change(coach, member, {
      movement,
      rung,
      sets: 3,
      amount: amount + 1,
      effort: 5,
      why: 'Better so.',
    });
    const after = (await planned(world.app, member)).items[0];
    expect(after).toMatchObject({
      ...{ movement, rung, rule, why, sets: 3, amount: amount + 1, effortAsked: 5 },
      ...{ ruledRung: rung, ruledSets: sets, ruledAmount: amount },
      ...{ overriddenBy: coach.id, overrideWhy: 'Better so.' },
    });
    expect(await waiting(member)).toEqual([]);
    const lines = await world.app.db.select().from(auditEntries).where(eq(auditEntries.subjectId, member.id));
    expect(lines.filter(({ action }) => action === 'changed a target')).toHaveLength(2);
  });

  it('waits for the next session that has the movement, and is taken up there', async () => {
    const member = await inTraining();
    const first = await planned(world.app, member);
    const { next } = await train(world.app, member, 100);
    const movement = first.items.find(
      (item) => !next?.items.some((other) => other.movement === item.movement),
    );
    if (!movement) throw new Error('the two sessions differ');
    const wish = { movement: movement.movement, rung: movement.rung, sets: 2, amount: 7, effort: 4 };
    await change(coach, member, { ...wish, why: 'Slower.' });
    expect(await waiting(member)).toHaveLength(1);
    let found: Awaited<ReturnType<typeof planned>>['items'][number] | undefined;
    for (let session = 0; session < 6 && !found; session += 1) {
      world.clock.moveDays(1);
      const step = await train(world.app, member, 100);
      found = step.next?.items.find((item) => item.movement === wish.movement);
    }
    expect(found).toMatchObject({ sets: 2, amount: 7, effortAsked: 4, overrideWhy: 'Slower.' });
    expect(await waiting(member)).toEqual([]);
  });

  it('is refused to another coach, to the owner, and with a variant of another movement', async () => {
    const member = await inTraining();
    const item = (await planned(world.app, member)).items[0];
    if (!item) throw new Error('an item is planned');
    const input = { movement: item.movement, rung: item.rung, sets: 1, amount: 1, effort: 1, why: 'No.' };
    expect(await codeOf(change(await addPerson(world.app, 'coach'), member, input))).toBe('not-found');
    expect(await codeOf(change(await addPerson(world.app, 'owner'), member, input))).toBe('forbidden');
    expect(await codeOf(change(coach, member, { ...input, rung: 'no such rung' }))).toBe('invalid');
    expect((await planned(world.app, member)).items[0]?.overriddenBy).toBeNull();
  });

  it.each([
    ['sets', '0'],
    ['sets', '11'],
    ['amount', '900'],
    ['amount', '-3'],
    ['amount', '7,5'],
    ['effort', '11'],
    ['why', ' '],
  ])('is refused at the field %s with %j', (field, value) => {
    const form = {
      do: 'target',
      movement: 'push-up',
      rung: 'x',
      sets: '3',
      amount: '8',
      effort: '6',
      why: 'So.',
    };
    const read = DeskForm.safeParse({ ...form, [field]: value });
    expect(read.success ? [] : read.error.issues.map(({ path }) => path.join('.'))).toEqual([field]);
  });
});

describe('the dossier', () => {
  it('shows marks, flight, plan and letters of the one member', async () => {
    const member = await inTraining();
    await train(world.app, member, 100);
    const dossier = await readDossier(world.app, await stateOf(world.app, member));
    expect(dossier.boards.map(({ test }) => test).sort()).toEqual(['push-ups', 'sit-ups', 'stairs']);
    expect(dossier.flight?.number).toBe(1);
    expect(dossier.newest).toHaveLength(1);
    expect(dossier.planned?.items.length).toBeGreaterThan(0);
    expect(dossier.strip?.weeks).toHaveLength(1);
  });
});
