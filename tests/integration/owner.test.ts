import { beforeAll, describe, expect, it } from 'vitest';
import type { App } from '#server/app';
import { auditEntries, invites, invoices, practice, subscriptions } from '#server/db/schema/index';
import { caseload, CASELOAD_PAGE } from '#server/services/caseload';
import { incomeByMonth, membersByState, planStretches } from '#server/services/income';
import { inviteCoach, listCoaches, listMembers, moveMember, openInvites } from '#server/services/people';
import { queueFor } from '#server/services/desk';
import { requireOwnMember } from '#server/services/members';
import type { Viewer } from '#server/services/viewer';
import { codeOf, queued } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp('2026-11-10T09:00:00Z');
let owner: Viewer;
let coach: Viewer;
beforeAll(async () => {
  await world.app.db.insert(practice).values({ name: 'Newel' }).onConflictDoNothing();
  owner = await addPerson(world.app, 'owner');
  coach = await addPerson(world.app, 'coach');
});

describe('income', () => {
  it('counts what came in by the day it was paid, in the practice’s own month', async () => {
    const member = await addMember(world.app, { coach });
    const bill = (id: string, issued: string, paid: string | null, amountMinor = 3900) => ({
      id,
      memberId: member.id,
      status: paid ? ('paid' as const) : ('open' as const),
      amountMinor,
      paidMinor: paid ? amountMinor : 0,
      currency: 'gbp',
      issuedAt: new Date(issued),
      paidAt: paid ? new Date(paid) : null,
    });
    await world.app.db.insert(invoices).values([
      bill('in_1', '2026-10-30T10:00:00Z', '2026-11-02T10:00:00Z'),
      bill('in_2', '2026-11-03T10:00:00Z', '2026-11-03T10:01:00Z'),
      bill('in_3', '2026-11-04T10:00:00Z', null, 1250),
      // Half past midnight on 1 October in Skerrow is still September by Greenwich.
      bill('in_4', '2026-09-30T23:30:00Z', '2026-09-30T23:30:00Z'),
    ]);
    const months = await incomeByMonth(world.app, owner);
    expect(months).toHaveLength(12);
    expect(months[0]).toMatchObject({ month: '2026-11-01', paidMinor: 7800, openMinor: 1250, invoices: 2 });
    expect(months[1]).toMatchObject({ month: '2026-10-01', paidMinor: 3900, openMinor: 0, invoices: 2 });
    expect(months[2]).toMatchObject({ month: '2026-09-01', paidMinor: 0, invoices: 0 });
  });

  it('counts members and leavings by month, and members by the state of their plan', async () => {
    const leaver = await addMember(world.app, { coach, plan: false });
    const day = (text: string) => new Date(`${text}T12:00:00Z`);
    await world.app.db.insert(subscriptions).values({
      id: 'sub_left',
      memberId: leaver.id,
      status: 'canceled',
      startedAt: day('2026-08-10'),
      currentPeriodStart: day('2026-09-10'),
      currentPeriodEnd: day('2026-10-10'),
      endedAt: day('2026-10-10'),
      syncedAt: day('2026-10-10'),
    });
    const months = await incomeByMonth(world.app, owner);
    expect(months.slice(0, 4).map(({ ended }) => ended)).toEqual([0, 1, 0, 0]);
    expect(months.slice(0, 4).map(({ members }) => members)).toEqual([1, 2, 1, 1]);
    const states = await membersByState(world.app, owner);
    expect([states.get('active'), states.get('cancelled')]).toEqual([1, 1]);
    const stretch = (await planStretches(world.app, owner)).find(({ memberId }) => memberId === leaver.id);
    expect(stretch).toMatchObject({ from: '2026-08-10', endedOn: '2026-10-10', failed: false });
  });

  it('reaches back to what was paid before the provider’s books begin, in the first stretch alone', async () => {
    const member = await addMember(world.app, { coach, plan: false });
    const day = (text: string) => new Date(`${text}T12:00:00Z`);
    const plan = (id: string, from: string, endedAt: Date | null) => ({
      id,
      memberId: member.id,
      status: endedAt ? ('canceled' as const) : ('active' as const),
      startedAt: day(from),
      currentPeriodStart: day(from),
      currentPeriodEnd: day('2026-12-01'),
      endedAt,
      syncedAt: day(from),
    });
    await world.app.db
      .insert(subscriptions)
      .values([plan('sub_a', '2026-06-01', day('2026-07-01')), plan('sub_b', '2026-11-01', null)]);
    const bill = {
      memberId: member.id,
      status: 'paid' as const,
      amountMinor: 3900,
      paidMinor: 3900,
      currency: 'gbp',
    };
    const paidAt = day('2026-03-08');
    await world.app.db.insert(invoices).values({ ...bill, id: 'in_past', issuedAt: paidAt, paidAt });
    const mine = (await planStretches(world.app, owner)).filter(({ memberId }) => memberId === member.id);
    expect(mine.map(({ from }) => from)).toEqual(['2026-03-08', '2026-11-01']);
  });
});

describe('people', () => {
  it('invites a coach once, by mail, and writes it down', async () => {
    const input = { name: 'Tomasz Wren', address: 'tomasz@skerrow.example' };
    await inviteCoach(world.app, owner, input);
    expect(await codeOf(inviteCoach(world.app, owner, input))).toBe('conflict');
    expect(await codeOf(inviteCoach(world.app, owner, { ...input, address: coach.email }))).toBe('conflict');
    expect(await world.app.db.select().from(invites)).toMatchObject([{ email: input.address }]);
    expect((await queued(world.app, 'mail')).filter(({ letter }) => letter === 'invite')).toHaveLength(1);
  });

  it('moves a member: the new coach sees them, the old one does not', async () => {
    const member = await addMember(world.app, { coach });
    const next = await addPerson(world.app, 'coach');
    await moveMember(world.app, owner, { member: member.id, coach: next.id });
    expect(await codeOf(requireOwnMember(world.app, coach, member.id))).toBe('not-found');
    expect((await requireOwnMember(world.app, next, member.id)).memberId).toBe(member.id);
    const somewhere = world.app.random.uuid();
    for (const target of [somewhere, member.id, owner.id])
      expect(await codeOf(moveMember(world.app, owner, { member: member.id, coach: target }))).toBe(
        'not-found',
      );
    expect(await codeOf(moveMember(world.app, owner, { member: somewhere, coach: next.id }))).toBe(
      'not-found',
    );
    const lines = await world.app.db.select().from(auditEntries);
    expect(lines.filter(({ action }) => action === 'moved a member')).toHaveLength(1);
  });
});

type Room = (app: App, viewer: Viewer) => unknown;
const enter = async (room: Room, viewer: Viewer) => room(world.app, viewer);

describe('the caseload', () => {
  it('shows a page of a coach’s own members, and the last page for one beyond it', async () => {
    const busy = await addPerson(world.app, 'coach');
    for (let made = 0; made < CASELOAD_PAGE + 2; made += 1)
      await addMember(world.app, { coach: busy, plan: false });
    const sizes = [1, 2, 99].map(async (page) => (await caseload(world.app, busy, 'name', page)).rows.length);
    expect(await Promise.all(sizes)).toEqual([CASELOAD_PAGE, 2, 2]);
    expect((await caseload(world.app, await addPerson(world.app, 'coach'))).total).toBe(0);
  });
});

describe('roles', () => {
  it('keeps the owner’s rooms to the owner, and the desk to coaches', async () => {
    const member = await addMember(world.app, { coach });
    const rooms: Room[] = [
      incomeByMonth,
      membersByState,
      planStretches,
      listCoaches,
      listMembers,
      openInvites,
    ];
    for (const viewer of [coach, member]) {
      for (const room of rooms) expect(await codeOf(enter(room, viewer))).toBe('forbidden');
      expect(await codeOf(inviteCoach(world.app, viewer, { name: 'X', address: 'x@y.example' }))).toBe(
        'forbidden',
      );
      expect(await codeOf(moveMember(world.app, viewer, { member: member.id, coach: coach.id }))).toBe(
        'forbidden',
      );
    }
    for (const viewer of [owner, member])
      for (const room of [queueFor, caseload])
        expect(await codeOf(room(world.app, viewer))).toBe('forbidden');
  });
});
