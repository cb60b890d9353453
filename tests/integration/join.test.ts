import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { openCheckout } from '#server/billing/checkout';
import { consents, holds, members, readinessScreens, stripeCustomers, users } from '#server/db/schema/index';
import { clearHold } from '#server/services/holds';
import { saveHouse } from '#server/services/house';
import { finishJoin, joinFacts } from '#server/services/join';
import { answerReadiness } from '#server/services/readiness';
import { addPlanOnSale, CLEAR, codeOf, DOCTOR, lettersTo } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();
const answer = (
  viewer: Awaited<ReturnType<typeof addPerson>>,
  answers = CLEAR,
  once = world.app.random.uuid(),
) => answerReadiness(world.app, viewer, { once, answers });

describe('readiness', () => {
  it('holds the plan, tells the person, and opens no checkout until a coach has recorded the clearance', async () => {
    const { app } = world;
    const coach = await addPerson(app, 'coach');
    const visitor = await addPerson(app, 'visitor');
    const plan = await addPlanOnSale(app);
    expect(await codeOf(openCheckout(app, visitor, plan.id))).toBe('conflict');
    expect((await answer(visitor, DOCTOR)).result).toBe('doctor');
    expect(await joinFacts(app, visitor)).toMatchObject({ screened: true, held: true, paid: false });
    expect(await lettersTo(app, visitor.id)).toEqual(['held']);
    expect(await codeOf(openCheckout(app, visitor, plan.id))).toBe('held');
    const customers = await app.db
      .select()
      .from(stripeCustomers)
      .where(eq(stripeCustomers.memberId, visitor.id));
    expect(customers).toEqual([]);

    await app.db.update(members).set({ coachId: coach.id }).where(eq(members.userId, visitor.id));
    await clearHold(app, coach, { memberId: visitor.id, clearance: 'Dr Amsel, 9 Nov, by letter' });
    expect(await lettersTo(app, visitor.id)).toEqual(['held', 'cleared']);
    expect(await openCheckout(app, visitor, plan.id)).toMatch(/^http:\/\/127\.0\.0\.1:4323\/pay\//);
  });

  it('keeps answers and consent once when the form is sent twice, even at the same time', async () => {
    const { app } = world;
    const visitor = await addPerson(app, 'visitor');
    const key = app.random.uuid();
    await Promise.all([answer(visitor, DOCTOR, key), answer(visitor, DOCTOR, key)]);
    await answer(visitor, DOCTOR, key);
    const counts = await Promise.all([
      app.db.$count(readinessScreens, eq(readinessScreens.memberId, visitor.id)),
      app.db.$count(consents, eq(consents.userId, visitor.id)),
      app.db.$count(holds, eq(holds.memberId, visitor.id)),
    ]);
    expect(counts).toEqual([1, 1, 1]);
    expect(await codeOf(answer(visitor, CLEAR, key))).toBe('conflict');
  });

  it('gives somebody new the coach with the fewest members', async () => {
    const { app } = world;
    const [busy, free] = [await addPerson(app, 'coach'), await addPerson(app, 'coach')];
    await app.pool.query(`update users set disabled_at = created_at where role = 'coach' and id <> all($1)`, [
      [busy.id, free.id],
    ]);
    await addMember(app, { coach: busy });
    const visitor = await addPerson(app, 'visitor');
    await answer(visitor);
    const [row] = await app.db.select().from(members).where(eq(members.userId, visitor.id));
    expect(row).toMatchObject({ coachId: free.id, joinedAt: null });
  });
});

describe('joining', () => {
  it('can be left and found again: each step is read from what is written', async () => {
    const { app } = world;
    const visitor = await addPerson(app, 'visitor');
    expect(await joinFacts(app, visitor)).toMatchObject({ signedIn: true, screened: false, house: false });
    await answer(visitor);
    await saveHouse(app, visitor, {
      stairCount: 13,
      stepHeightMm: 175,
      rail: 'one side',
      matLengthCm: 180,
      matWidthCm: 60,
      marginCm: 60,
      chair: true,
      chairHeightCm: 45,
      bar: false,
      pulseMeter: false,
    });
    expect(await joinFacts(app, visitor)).toMatchObject({
      screened: true,
      held: false,
      house: true,
      paid: false,
    });
  });

  it('makes a member and sends the welcome once, however often it is finished', async () => {
    const { app } = world;
    const visitor = await addPerson(app, 'visitor');
    await answer(visitor);
    const finish = () =>
      app.transaction((tx, enqueue) => finishJoin(tx, enqueue, visitor.id, app.clock.now()));
    const joined = app.clock.now();
    await Promise.all([finish(), finish()]);
    world.clock.moveDays(1);
    await finish();
    expect(await lettersTo(app, visitor.id)).toEqual(['welcome']);
    const [user] = await app.db.select().from(users).where(eq(users.id, visitor.id));
    const [row] = await app.db.select().from(members).where(eq(members.userId, visitor.id));
    expect([user?.role, row?.joinedAt]).toEqual(['member', joined]);
  });
});
