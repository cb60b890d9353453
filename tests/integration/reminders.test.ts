import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import {
  flights,
  idempotencyKeys,
  members,
  readinessScreens,
  reminders,
  subscriptions,
} from '#server/db/schema/index';
import { sendMail } from '#server/email/send';
import { runTick } from '#server/jobs/tick';
import { unsubscribe } from '#server/services/account';
import { sendReminders } from '#server/services/reminders';
import type { Viewer } from '#server/services/viewer';
import { lettersTo, queued } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp('2026-11-10T09:00:00Z');
let coach: Viewer;
beforeAll(async () => void (coach = await addPerson(world.app, 'coach')));

const HOUR_MS = 3_600_000;
/** Moves the clock to a moment, forward or back. */
const standAt = (moment: string) =>
  world.clock.moveDays((new Date(moment).getTime() - world.app.clock.now().getTime()) / (24 * HOUR_MS));

/** A paying member in a zone whose flight begins on a local day. */
async function flying(timeZone: string, startsOn: string) {
  const { app } = world;
  const member = await addMember(app, { coach });
  await app.pool.query('update users set time_zone = $1 where id = $2', [timeZone, member.id]);
  await app.db
    .insert(flights)
    .values({ memberId: member.id, number: 1, startsOn, emphasis: 'balanced', createdAt: app.clock.now() });
  return member;
}

/** The letters for one member of ticks at these moments, each with the moment that brought it. */
async function lettersAt(member: Viewer, moments: readonly string[]): Promise<[string, string][]> {
  const found: [string, string][] = [];
  for (const moment of moments) {
    standAt(moment);
    const before = (await lettersTo(world.app, member.id)).length;
    await sendReminders(world.app);
    for (const letter of (await lettersTo(world.app, member.id)).slice(before)) found.push([moment, letter]);
  }
  return found;
}

describe('the check-in reminder', () => {
  it('comes on the sixth local day, once, however often it is looked', async () => {
    const member = await flying('Europe/London', '2026-11-02');
    const letters = await lettersAt(member, [
      '2026-11-06T23:59:00Z',
      '2026-11-07T00:01:00Z',
      '2026-11-07T00:02:00Z',
      '2026-11-08T12:00:00Z',
    ]);
    expect(letters).toEqual([['2026-11-07T00:01:00Z', 'check-in-due']]);
  });

  it('is sent once by two workers that look at the same time', async () => {
    standAt('2026-11-07T09:00:00Z');
    const member = await flying('Europe/London', '2026-11-02');
    await Promise.all([sendReminders(world.app), sendReminders(world.app), sendReminders(world.app)]);
    expect(await lettersTo(world.app, member.id)).toEqual(['check-in-due']);
  });

  it.each([
    // Midnight at the start of Saturday, as each place has it.
    ['Pacific/Auckland', '2026-11-06T10:59:00Z', '2026-11-06T11:00:00Z'],
    ['America/Los_Angeles', '2026-11-07T07:59:00Z', '2026-11-07T08:00:00Z'],
    ['Asia/Kathmandu', '2026-11-06T18:14:00Z', '2026-11-06T18:15:00Z'],
  ])('follows the day of %s', async (zone, before, after) => {
    const member = await flying(zone, '2026-11-02');
    expect(await lettersAt(member, [before, after])).toEqual([[after, 'check-in-due']]);
  });

  it.each([
    // The clocks went back on 25 Oct 2026: the night before the sixth day has 25 hours.
    ['the long night of autumn', '2026-10-20', '2026-10-24T22:59:00Z', '2026-10-24T23:00:00Z'],
    ['the day after it', '2026-10-21', '2026-10-25T23:59:00Z', '2026-10-26T00:00:00Z'],
    // They go forward on 28 Mar 2027: the day has 23 hours.
    ['the short night of spring', '2027-03-23', '2027-03-27T23:59:00Z', '2027-03-28T00:00:00Z'],
    ['the day after it', '2027-03-24', '2027-03-28T22:59:00Z', '2027-03-28T23:00:00Z'],
  ])('keeps to the local day through %s', async (_, startsOn, before, after) => {
    const member = await flying('Europe/London', startsOn);
    await world.app.db
      .update(subscriptions)
      .set({ currentPeriodEnd: new Date('2028-01-01T00:00:00Z') })
      .where(eq(subscriptions.memberId, member.id));
    expect(await lettersAt(member, [before, after])).toEqual([[after, 'check-in-due']]);
  });

  it('does not come once the week is written, while held, unpaid, or unwanted', async () => {
    standAt('2026-11-07T09:00:00Z');
    const { app } = world;
    const written = await flying('Europe/London', '2026-11-02');
    await app.pool.query(
      `insert into check_ins (member_id, week_start, sent_at, words, went, sleep, soreness, effort)
        values ($1, '2026-11-02', $2, 'Done.', 4, 4, 2, 5)`,
      [written.id, app.clock.now()],
    );
    const held = await flying('Europe/London', '2026-11-02');
    await app.pool.query(
      `insert into holds (member_id, cause, reason, started_at) values ($1, 'coach', 'The ankle', $2)`,
      [held.id, app.clock.now()],
    );
    const unpaid = await flying('Europe/London', '2026-11-02');
    await app.db
      .update(subscriptions)
      .set({ status: 'canceled' })
      .where(eq(subscriptions.memberId, unpaid.id));
    const unwanted = await flying('Europe/London', '2026-11-02');
    const [row] = await app.db.select().from(members).where(eq(members.userId, unwanted.id));
    expect(await unsubscribe(app, row?.unsubscribeToken ?? '')).toBe(true);
    await sendReminders(app);
    for (const member of [written, held, unpaid, unwanted])
      expect(await lettersTo(app, member.id)).toEqual([]);
  });
});

describe('the other reminders', () => {
  it('tell of each landing once, in its week', async () => {
    const member = await flying('Europe/London', '2026-11-02');
    const days = Array.from({ length: 84 }, (_, day) =>
      new Date(Date.UTC(2026, 10, 2 + day, 12)).toISOString(),
    );
    const landings = (await lettersAt(member, days)).filter(([, letter]) => letter === 'test-day');
    expect(landings.map(([moment]) => moment.slice(0, 10))).toEqual([
      '2026-11-23',
      '2026-12-21',
      '2027-01-18',
    ]);
  });

  it('tell of a trial’s end three days before, with the date and the amount, once', async () => {
    standAt('2026-11-10T09:00:00Z');
    const { app } = world;
    const member = await addMember(app, { coach });
    const trialEnd = new Date('2026-11-20T09:00:00Z');
    await app.db
      .update(subscriptions)
      .set({ status: 'trialing', trialEnd })
      .where(eq(subscriptions.memberId, member.id));
    const letters = await lettersAt(member, [
      '2026-11-17T08:59:00Z',
      '2026-11-17T09:01:00Z',
      '2026-11-18T09:00:00Z',
    ]);
    expect(letters).toEqual([['2026-11-17T09:01:00Z', 'trial-ends']]);
    const [mail] = (await queued(app, 'mail')).filter(({ userId }) => userId === member.id);
    expect(mail?.data).toEqual({ when: '20 Nov', amount: '£39.00' });
  });

  it('tell of the yearly questions two weeks before they run out, once for each sheet', async () => {
    standAt('2026-11-10T09:00:00Z');
    const { app } = world;
    const member = await addMember(app, { coach });
    const sheet = { memberId: member.id, answers: {}, result: 'clear' as const, reasons: [] };
    await app.db
      .insert(readinessScreens)
      .values({ ...sheet, answeredAt: new Date('2025-12-01'), validUntil: '2026-12-01' });
    const letters = await lettersAt(member, [
      '2026-11-16T12:00:00Z',
      '2026-11-17T12:00:00Z',
      '2026-11-18T12:00:00Z',
    ]);
    expect(letters).toEqual([['2026-11-17T12:00:00Z', 'questions-due']]);
    await app.db
      .insert(readinessScreens)
      .values({ ...sheet, answeredAt: app.clock.now(), validUntil: '2027-11-18' });
    expect(await lettersAt(member, ['2026-11-30T12:00:00Z'])).toEqual([]);
  });
});

describe('a reminder mail', () => {
  it('has a text part and one-click unsubscribe, and is not sent to whoever has said no meanwhile', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    await sendMail(app, { letter: 'check-in-due', userId: member.id });
    const mail = world.mails.at(-1);
    expect(mail).toMatchObject({
      to: member.email,
      headers: { 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' },
    });
    expect(mail?.text).toContain('/unsubscribe?token=');
    const count = world.mails.length;
    await app.db.update(members).set({ wantsReminders: false }).where(eq(members.userId, member.id));
    await sendMail(app, { letter: 'check-in-due', userId: member.id });
    expect(world.mails).toHaveLength(count);
    await sendMail(app, { letter: 'answer', userId: member.id, data: { coach: 'Odile' } });
    expect(world.mails).toHaveLength(count + 1);
  });
});

describe('the tick', () => {
  it('sweeps keys of writes older than a week and leaves the younger', async () => {
    const { app } = world;
    const person = await addPerson(app, 'member');
    const aged = (days: number) => new Date(app.clock.now().getTime() - days * 24 * HOUR_MS);
    for (const days of [8, 6]) {
      await app.pool.query(
        `insert into idempotency_keys (user_id, key, body_hash, status, reply, created_at) values ($1, $2, '', 200, '{}', $3)`,
        [person.id, `key-of-${days}-days`, aged(days)],
      );
    }
    await runTick(app);
    const left = await app.db.select().from(idempotencyKeys).where(eq(idempotencyKeys.userId, person.id));
    expect(left.map(({ key }) => key)).toEqual(['key-of-6-days']);
    expect(await app.db.$count(reminders, eq(reminders.userId, person.id))).toBe(0);
  });
});
