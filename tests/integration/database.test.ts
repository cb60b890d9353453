import { eq } from 'drizzle-orm';
import pg from 'pg';
import { describe, expect, inject, it } from 'vitest';
import { migrateDatabase } from '#server/db/migrate';
import { auditEntries, holds, members, subscriptions, users } from '#server/db/schema/index';
import { audit } from '#server/services/audit';
import { memberState } from '#server/services/members';
import { useApp } from '#support/test-app';
import { addMember, addPerson } from '#support/people';

const world = useApp();
const at = (day: number) => new Date(Date.UTC(2026, 9, day));

/** The constraint that a write broke, from anywhere in the chain of causes. */
async function brokenConstraint(write: PromiseLike<unknown>): Promise<string> {
  try {
    await write;
    return 'none';
  } catch (error) {
    for (let cause = error; cause instanceof Error; cause = cause.cause) {
      if ('constraint' in cause && cause.constraint) return String(cause.constraint);
      if ('code' in cause && cause.code === 'P0001') return cause.message;
    }
    throw error;
  }
}

describe('the schema', () => {
  it('lets no two holds of one member overlap, and lets them follow each other', async () => {
    const member = await addMember(world.app, { coach: null });
    const hold = { memberId: member.id, cause: 'coach' as const, reason: 'a sore knee', openedBy: null };
    const add = (startedAt: Date, endedAt: Date | null) =>
      world.app.db.insert(holds).values({ ...hold, startedAt, endedAt, clearance: endedAt && 'rested' });
    await add(at(1), at(5));
    await add(at(5), at(9));
    expect(await brokenConstraint(add(at(8), at(12)))).toBe('holds_no_overlap');
    await add(at(20), null);
    expect(await brokenConstraint(add(at(25), at(26)))).toBe('holds_no_overlap');
  });

  it('never changes a line of the audit list', async () => {
    const owner = await addPerson(world.app, 'owner');
    await audit(world.app.db, { at: at(1), actorId: owner.id, action: 'changed a plan' });
    const mine = eq(auditEntries.actorId, owner.id);
    const refused = /never changed/;
    expect(
      await brokenConstraint(world.app.db.update(auditEntries).set({ action: 'x' }).where(mine)),
    ).toMatch(refused);
    expect(await brokenConstraint(world.app.db.delete(auditEntries).where(mine))).toMatch(refused);
  });

  it('takes one address once, however it is spelled', async () => {
    await addPerson(world.app, 'visitor', { email: 'edda@skerrow.example' });
    const again = addPerson(world.app, 'visitor', { email: 'EDDA@Skerrow.example' });
    expect(await brokenConstraint(again)).toBe('users_email_unique');
  });

  it('refuses a role it does not know and a plan that lives twice', async () => {
    const member = await addMember(world.app, { coach: null });
    const role = world.app.pool.query('update users set role = $1 where id = $2', ['captain', member.id]);
    expect(await brokenConstraint(role)).toBe('users_role_known');
    const [first] = await world.app.db
      .select()
      .from(subscriptions)
      .where(eq(subscriptions.memberId, member.id));
    if (!first) throw new Error('the member has a plan');
    const second = world.app.db.insert(subscriptions).values({ ...first, id: 'sub_second' });
    expect(await brokenConstraint(second)).toBe('subscriptions_one_live');
  });

  it('stores every moment with its zone and every table key of a person as an id that cannot be guessed', async () => {
    const bare = await world.app.pool.query(
      `select table_name, column_name from information_schema.columns
        where table_schema = 'public' and data_type = 'timestamp without time zone'`,
    );
    expect(bare.rows).toEqual([]);
    const keys = await world.app.pool.query(
      `select data_type from information_schema.columns where table_name = any($1) and column_name = 'id'`,
      [['users', 'photos', 'check_ins', 'messages', 'invites']],
    );
    expect(keys.rows.map((row: { data_type: string }) => row.data_type)).toEqual(Array(5).fill('uuid'));
  });

  it('takes a deleted person out of every table that holds their data', async () => {
    const member = await addMember(world.app, { coach: null });
    await world.app.db.delete(users).where(eq(users.id, member.id));
    expect(await world.app.db.select().from(members).where(eq(members.userId, member.id))).toEqual([]);
    expect(await memberState(world.app, member.id)).toBeNull();
  });
});

describe('migrating', () => {
  it('is done once when two processes start together, and finds nothing to do later', async () => {
    const name = 't_two_at_once';
    const admin = new pg.Client({ connectionString: `${inject('cluster')}/postgres` });
    await admin.connect();
    try {
      await admin.query(`create database ${name}`);
      const url = `${inject('cluster')}/${name}`;
      await Promise.all([migrateDatabase(url), migrateDatabase(url)]);
      await migrateDatabase(url);
      const client = new pg.Client({ connectionString: url });
      await client.connect();
      const { rows } = await client.query('select created_at from drizzle.__drizzle_migrations order by id');
      await client.end();
      const journal = (await import('../../drizzle/meta/_journal.json')).default;
      expect(rows.map((row: { created_at: string }) => Number(row.created_at))).toEqual(
        journal.entries.map(({ when }) => when),
      );
    } finally {
      await admin.query(`drop database if exists ${name} with (force)`);
      await admin.end();
    }
  });
});

describe('the pool', () => {
  it('outlives a database that throws everybody out', async () => {
    await world.app.pool.query('select 1');
    const admin = new pg.Client({ connectionString: `${inject('cluster')}/postgres` });
    await admin.connect();
    await admin.query(
      'select pg_terminate_backend(pid) from pg_stat_activity where datname = $1 and pid <> pg_backend_pid()',
      [new URL(world.app.env.databaseUrl).pathname.slice(1)],
    );
    await admin.end();
    await expect
      .poll(() =>
        world.app.pool.query('select 1 as one').then(
          ({ rows }) => rows,
          () => [],
        ),
      )
      .toEqual([{ one: 1 }]);
  });
});
