import { CreateBucketCommand, GetObjectCommand } from '@aws-sdk/client-s3';
import { getTableName, sql } from 'drizzle-orm';
import { getTableConfig } from 'drizzle-orm/pg-core';
import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import { syncCustomer } from '#server/billing/sync';
import * as schema from '#server/db/schema/index';
import { deleteAccount } from '#server/services/account';
import { sendCheckIn } from '#server/services/check-ins';
import { saveDraft } from '#server/services/drafts';
import { exportRecords, PERSONAL_TABLES } from '#server/services/export';
import { markThreadRead, writeMessage } from '#server/services/messages';
import { receivePhoto } from '#server/services/photos';
import { answerReadiness } from '#server/services/readiness';
import { reportWarningSign } from '#server/services/stops';
import { changeTarget } from '#server/services/targets';
import type { Viewer } from '#server/services/viewer';
import { CLEAR, codeOf, queued } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { addHouse, stateOf, takeBaseline, train } from '#support/training';

const world = useApp();
let coach: Viewer;
beforeAll(async () => {
  coach = await addPerson(world.app, 'coach');
  await world.app.objects.send(new CreateBucketCommand({ Bucket: world.app.env.s3.bucket }));
});

/** Tables with a person's key that are no records: secrets, and keys of the write-once rule. */
const NO_RECORDS = ['accounts', 'idempotency_keys', 'sessions'];

/** A member with at least one row in every personal table. */
async function livedMember() {
  const { app } = world;
  const member = await addMember(app, { coach, plan: false });
  await answerReadiness(app, member, { once: app.random.uuid(), answers: CLEAR });
  await addHouse(app, member);
  await takeBaseline(app, member);
  await train(app, member, 100);
  const wish = {
    do: 'target' as const,
    movement: 'push',
    rung: 'push-up-knees',
    sets: 2,
    amount: 9,
    effort: 4,
  };
  await changeTarget(app, coach, await stateOf(app, member), { ...wish, why: 'Wrist first.' });
  const now = app.clock.now();
  const picture = await sharp({ create: { width: 9, height: 9, channels: 3, background: '#333' } })
    .png()
    .toBuffer();
  const { id: photoId } = await receivePhoto(app, member, picture);
  const scales = { went: 4, sleep: 3, soreness: 2, effort: 6, pain: 'none' as const, painWhere: '' };
  await app.db.transaction((tx) =>
    sendCheckIn(tx, member, { words: 'A quiet week.', ...scales, photoId }, { weekStart: '2026-11-10', now }),
  );
  const line = { memberId: member.id, authorId: coach.id, byCoach: true, at: now };
  await writeMessage(app.db, { ...line, words: 'Good. The same again.' });
  await markThreadRead(app.db, member.id, 'member', now);
  await saveDraft(app.db, member.id, 'message', { words: 'half' }, now);
  await app.db.insert(schema.lessonReads).values({ memberId: member.id, slug: 'stairs', openedAt: now });
  await app.db.insert(schema.reminders).values({ userId: member.id, about: 'check-in:1', sentAt: now });
  const customer = await app.stripe.customers.create({
    email: member.email,
    payment_method: 'pm_card_visa',
    invoice_settings: { default_payment_method: 'pm_card_visa' },
  });
  await app.db
    .insert(schema.stripeCustomers)
    .values({ memberId: member.id, customerId: customer.id, createdAt: now });
  const product = await app.stripe.products.create({ name: 'With a coach' });
  const recurring = { interval: 'month' as const };
  const price = await app.stripe.prices.create({
    product: product.id,
    currency: 'gbp',
    unit_amount: 3900,
    recurring,
  });
  await app.stripe.subscriptions.create({ customer: customer.id, items: [{ price: price.id }] });
  await syncCustomer(app, customer.id);
  await reportWarningSign(app, member, 'Dizzy on the stairs');
  return { member, customer: customer.id, objectKey: `waiting/${photoId}` };
}

describe('taking one’s records', () => {
  it('names every table with a key to a person, as the database itself lists them', async () => {
    const { rows } = await world.app.pool.query<{ table_name: string }>(
      `select distinct table_name from information_schema.columns
        where table_schema = 'public' and column_name in ('member_id', 'user_id') order by table_name`,
    );
    const listed = Object.values(PERSONAL_TABLES).map(([table]) => getTableName(table));
    expect([...listed, ...NO_RECORDS].sort()).toEqual(rows.map(({ table_name: name }) => name));
  });

  it('gives every table with its rows, of this person and nobody else, and no secret', async () => {
    const { app } = world;
    const [{ member }, other] = [await livedMember(), await livedMember()];
    const records = await exportRecords(app, member);
    const names = [...Object.keys(PERSONAL_TABLES), 'sessionItems'];
    for (const name of names) {
      expect([name, (records[name] as unknown[]).length > 0]).toEqual([name, true]);
    }
    const text = JSON.stringify(records);
    expect(text).toContain(member.email);
    expect(text).not.toContain(other.member.id);
    expect(text).not.toContain(other.member.email);
    const { rows } = await app.pool.query<{ session_token: string }>('select session_token from sessions');
    for (const { session_token: token } of rows) expect(text).not.toContain(token);
  });
});

describe('deleting an account', () => {
  it('leaves no row, no picture, no running plan, and one audit line that names nobody', async () => {
    const { app } = world;
    const [{ member, customer, objectKey }, other] = [await livedMember(), await livedMember()];
    await deleteAccount(app, member);
    const { rows } = await app.pool.query<{ table_name: string; column_name: string }>(
      `select table_name, column_name from information_schema.columns where table_schema = 'public'
        and data_type = 'uuid' and table_name <> 'audit_entries'`,
    );
    for (const { table_name: table, column_name: column } of rows) {
      const left = await app.pool.query(`select 1 from "${table}" where "${column}" = $1`, [member.id]);
      expect([table, column, left.rowCount]).toEqual([table, column, 0]);
    }
    const orphans = await app.db.execute(
      sql`select 1 from session_items i left join training_sessions s on s.id = i.session_id where s.id is null`,
    );
    expect(orphans.rowCount).toBe(0);
    const gone = new GetObjectCommand({ Bucket: app.env.s3.bucket, Key: objectKey });
    await expect(app.objects.send(gone)).rejects.toMatchObject({ name: 'NoSuchKey' });
    const running = await app.stripe.subscriptions
      .list({ customer, status: 'active' })
      .catch(() => ({ data: [] }));
    expect(running.data).toEqual([]);
    const lines = await app.pool.query(`select * from audit_entries where action = 'deleted an account'`);
    expect(lines.rows).toMatchObject([{ actor_id: null, subject_id: null, details: {} }]);
    const letters = (await queued(app, 'mail')).filter(({ letter }) => letter === 'deleted');
    expect(letters).toEqual([{ letter: 'deleted', address: member.email }]);
    expect((await exportRecords(app, other.member))['marks']).toHaveLength(3);
  });

  it('is refused to a coach, on whom members hang', async () => {
    expect(await codeOf(deleteAccount(world.app, coach))).toBe('forbidden');
  });

  it('reaches every table that points at a person: each such key cascades or is let go', () => {
    const tables = Object.values(schema);
    const kept = tables.flatMap((table) => {
      const { name, foreignKeys } = getTableConfig(table);
      return foreignKeys
        .filter(({ onDelete, reference }) => {
          const target = getTableName(reference().foreignTable);
          return ['users', 'members'].includes(target) && !['cascade', 'set null'].includes(onDelete ?? '');
        })
        .map(
          ({ reference }) =>
            `${name}.${reference()
              .columns.map((column) => column.name)
              .join()}`,
        );
    });
    // Staff, who are never deleted while somebody hangs on them.
    expect(kept.sort()).toEqual(['invites.invitedBy', 'members.coachId']);
  });
});
