import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { alerts, auditEntries, holds } from '#server/db/schema/index';
import { clearHold, holdPlan, listHolds } from '#server/services/holds';
import { memberState, requireTraining } from '#server/services/members';
import { reportWarningSign } from '#server/services/stops';
import type { Viewer } from '#server/services/viewer';
import { codeOf, lettersTo } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));
const holdsOf = (memberId: string) => world.app.db.select().from(holds).where(eq(holds.memberId, memberId));

describe('a warning sign', () => {
  it('alerts the coach, holds the plan and stops training, in one go; pressed twice it is held once', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    expect(await codeOf(requireTraining(app, member))).toBe('none');
    await Promise.all([
      reportWarningSign(app, member, 'Pressure in the chest'),
      reportWarningSign(app, member, 'Pressure in the chest'),
    ]);
    expect(await holdsOf(member.id)).toMatchObject([{ cause: 'warning-sign', endedAt: null }]);
    expect(await app.db.$count(alerts, eq(alerts.memberId, member.id))).toBe(2);
    expect(new Set(await lettersTo(app, coach.id))).toEqual(new Set(['stop-alert']));
    expect(await codeOf(requireTraining(app, member))).toBe('held');
    expect((await memberState(app, member.id))?.access).toMatchObject({ mayRead: true, mayTrain: false });
  });

  it('ends when the coach records the clearance: alerts are settled, the member is told, the audit has both', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    await reportWarningSign(app, member, 'Dizzy on the stairs');
    world.clock.moveDays(2);
    await clearHold(app, coach, { memberId: member.id, clearance: 'Dr Amsel, 12 Nov' });
    expect(await listHolds(app, member.id)).toMatchObject([
      { clearedBy: coach.name, hold: { clearance: 'Dr Amsel, 12 Nov', endedAt: app.clock.now() } },
    ]);
    const open = await app.db.select().from(alerts).where(eq(alerts.memberId, member.id));
    expect(open.map(({ settledBy }) => settledBy)).toEqual([coach.id]);
    expect(await codeOf(requireTraining(app, member))).toBe('none');
    expect(await lettersTo(app, member.id)).toContain('cleared');
    const lines = await app.db.select().from(auditEntries).where(eq(auditEntries.subjectId, member.id));
    expect(lines.map(({ action }) => action).sort()).toEqual(['cleared a plan', 'held a plan']);
    expect(JSON.stringify(lines)).not.toContain('Dizzy');
    expect(await codeOf(clearHold(app, coach, { memberId: member.id, clearance: 'again' }))).toBe('conflict');
  });
});

describe('a coach', () => {
  it('holds and clears their own members only, and each hold once', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const stranger = await addPerson(app, 'coach');
    const input = { memberId: member.id, reason: 'The ankle first.' };
    expect(await codeOf(holdPlan(app, stranger, input))).toBe('not-found');
    expect(await codeOf(holdPlan(app, member, input))).toBe('forbidden');
    await holdPlan(app, coach, input);
    expect(await codeOf(holdPlan(app, coach, input))).toBe('conflict');
    expect(await codeOf(clearHold(app, stranger, { memberId: member.id, clearance: 'x' }))).toBe('not-found');
    expect(await holdsOf(member.id)).toHaveLength(1);
    expect(await lettersTo(app, member.id)).toEqual(['held']);
  });

  it('may hold again after a clearance on the same day', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    await holdPlan(app, coach, { memberId: member.id, reason: 'The ankle first.' });
    await clearHold(app, coach, { memberId: member.id, clearance: 'Walks without pain' });
    await holdPlan(app, coach, { memberId: member.id, reason: 'It came back.' });
    expect(await holdsOf(member.id)).toHaveLength(2);
  });
});
