import { eq, lt } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { idempotencyKeys, users } from '#server/db/schema/index';
import { sendMail } from '#server/email/send';
import { runTick } from '#server/jobs/tick';
import { startWorker } from '#server/jobs/worker';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();

interface Job {
  state: string;
  data: unknown;
}

const jobsFor = async (address: string) =>
  (
    await world.app.pool.query<Job>(
      `select state, data from pgboss.job where name = 'mail' and data->>'address' = $1`,
      [address],
    )
  ).rows;
const letter = (address: string) => ({
  letter: 'sign-in' as const,
  address,
  data: { path: '/sign-in/confirm' },
});

describe('a job', () => {
  it('is there with the change it belongs to', async () => {
    const { id } = await addPerson(world.app, 'visitor');
    await world.app.transaction(async (tx, enqueue) => {
      await tx.update(users).set({ name: 'Kept' }).where(eq(users.id, id));
      await enqueue('mail', letter('kept@skerrow.example'));
      expect(await jobsFor('kept@skerrow.example')).toEqual([]);
    });
    expect(await jobsFor('kept@skerrow.example')).toHaveLength(1);
  });

  it('vanishes with it', async () => {
    const { id, name } = await addPerson(world.app, 'visitor');
    const broken = world.app.transaction(async (tx, enqueue) => {
      await tx.update(users).set({ name: 'Lost' }).where(eq(users.id, id));
      await enqueue('mail', letter('lost@skerrow.example'));
      throw new Error('broken');
    });
    await expect(broken).rejects.toThrow('broken');
    expect(await jobsFor('lost@skerrow.example')).toEqual([]);
    const [user] = await world.app.db.select().from(users).where(eq(users.id, id));
    expect(user?.name).toBe(name);
  });

  it('is done by the worker, and tried again when its handler fails', async () => {
    const send = world.app.mailer.send.bind(world.app.mailer);
    world.app.mailer.send = (mail) =>
      mail.to === 'refused@skerrow.example' ? Promise.reject(new Error('450')) : send(mail);
    await startWorker(world.app);
    await world.app.enqueue('mail', letter('done@skerrow.example'));
    await world.app.enqueue('mail', letter('refused@skerrow.example'));
    const states = async () =>
      [...(await jobsFor('done@skerrow.example')), ...(await jobsFor('refused@skerrow.example'))].map(
        ({ state }) => state,
      );
    await expect.poll(states, { timeout: 10_000 }).toEqual(['completed', 'retry']);
    expect(world.mails.filter(({ to }) => to === 'done@skerrow.example')).toHaveLength(1);
  });
});

describe('a letter', () => {
  it('goes to the address a person has when it goes, and to nobody who is gone', async () => {
    const person = await addPerson(world.app, 'member');
    await world.app.db.update(users).set({ email: 'moved@skerrow.example' }).where(eq(users.id, person.id));
    const job = { letter: 'welcome' as const, userId: person.id };
    await sendMail(world.app, job);
    expect(world.mails.filter(({ to }) => to === 'moved@skerrow.example')).toHaveLength(1);
    await world.app.db.delete(users).where(eq(users.id, person.id));
    const before = world.mails.length;
    await sendMail(world.app, job);
    expect(world.mails).toHaveLength(before);
  });

  it('has a text part and only links of the public origin', async () => {
    const member = await addMember(world.app, { coach: null });
    await sendMail(world.app, { letter: 'welcome', userId: member.id });
    const mail = world.mails.find(({ to }) => to === member.email);
    expect(mail?.text).toContain(`Dear ${member.name},`);
    for (const [, origin] of `${mail?.text} ${mail?.html}`.matchAll(/(https?:\/\/[^/\s"]+)/g))
      expect(origin).toBe(world.app.env.publicOrigin);
  });
});

describe('the minute', () => {
  it('sweeps old write keys, keeps new ones, and may come twice', async () => {
    const { id } = await addPerson(world.app, 'member');
    const now = world.clock.now().getTime();
    const key = (days: number) => ({
      userId: id,
      key: `days-old-${days}`.padEnd(20, '0'),
      bodyHash: 'x',
      status: 200,
      reply: {},
      createdAt: new Date(now - days * 86_400_000),
    });
    await world.app.db.insert(idempotencyKeys).values([key(6), key(8)]);
    await Promise.all([runTick(world.app), runTick(world.app)]);
    const left = await world.app.db.select().from(idempotencyKeys).where(eq(idempotencyKeys.userId, id));
    expect(left.map((row) => row.key)).toEqual(['days-old-6'.padEnd(20, '0')]);
    expect(
      await world.app.db.$count(
        idempotencyKeys,
        lt(idempotencyKeys.createdAt, new Date(now - 7 * 86_400_000)),
      ),
    ).toBe(0);
  });
});
