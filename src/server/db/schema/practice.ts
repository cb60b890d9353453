import { sql } from 'drizzle-orm';
import { bigint, check, index, integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { moment } from './columns.ts';
import { users } from './people.ts';

/** The practice itself: one row. `clockOffsetSeconds` moves the demo's clock and is 0 in production. */
export const practice = pgTable(
  'practice',
  {
    id: integer().primaryKey().default(1),
    name: text().notNull(),
    answerWithinHours: integer().notNull().default(24),
    timeZone: text().notNull().default('Europe/London'),
    clockOffsetSeconds: bigint({ mode: 'number' }).notNull().default(0),
    testClockId: text(),
    filledAt: moment(),
  },
  (t) => [check('practice_single', sql`${t.id} = 1`)],
);

/** Who did what, to whom. Append only (trigger, see migrations); `details` never holds health data. */
export const auditEntries = pgTable(
  'audit_entries',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    at: moment().notNull(),
    actorId: uuid(),
    action: text().notNull(),
    subjectId: uuid(),
    details: jsonb().$type<Record<string, string | number | boolean | null>>().notNull().default({}),
  },
  (t) => [index('audit_at').on(t.at)],
);

/** A write from an island, remembered by its key so that a second sending changes nothing. */
export const idempotencyKeys = pgTable(
  'idempotency_keys',
  {
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    key: text().notNull(),
    bodyHash: text().notNull(),
    status: integer().notNull(),
    reply: jsonb().$type<unknown>().notNull(),
    createdAt: moment().notNull(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.key] }), index('idempotency_created').on(t.createdAt)],
);

/** Reminders already sent, so that each is sent once: `about` names the occasion. */
export const reminders = pgTable(
  'reminders',
  {
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    about: text().notNull(),
    sentAt: moment().notNull(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.about] })],
);
