import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  smallint,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { id, moment } from './columns.ts';
import { members, users } from './people.ts';

/** A picture a member sent. The file lies in the object store under `objectKey`; `ready` ones were re-encoded by us. */
export const photos = pgTable(
  'photos',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    objectKey: text().notNull().unique(),
    state: text({ enum: ['waiting', 'ready', 'refused'] })
      .notNull()
      .default('waiting'),
    widthPx: integer(),
    heightPx: integer(),
    bytes: integer().notNull(),
    createdAt: moment().notNull(),
  },
  (t) => [
    index('photos_member').on(t.memberId),
    check('photos_state_known', sql`${t.state} in ('waiting', 'ready', 'refused')`),
  ],
);

/** The weekly check-in: one for each week of the member's calendar (`weekStart` is its first local day). */
export const checkIns = pgTable(
  'check_ins',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    weekStart: date().notNull(),
    sentAt: moment().notNull(),
    words: text().notNull(),
    went: smallint().notNull(),
    sleep: smallint().notNull(),
    soreness: smallint().notNull(),
    effort: smallint().notNull(),
    pain: text({ enum: ['none', 'mild', 'strong'] })
      .notNull()
      .default('none'),
    painWhere: text(),
    photoId: uuid().references(() => photos.id, { onDelete: 'set null' }),
    answeredAt: moment(),
    answeredBy: uuid().references(() => users.id, { onDelete: 'set null' }),
  },
  (t) => [
    unique('check_ins_week').on(t.memberId, t.weekStart),
    index('check_ins_unanswered')
      .on(t.memberId, t.sentAt)
      .where(sql`${t.answeredAt} is null`),
    check(
      'check_ins_scales',
      sql`${t.went} between 1 and 5 and ${t.sleep} between 1 and 5 and ${t.soreness} between 1 and 5 and ${t.effort} between 1 and 10`,
    ),
    check('check_ins_words', sql`length(${t.words}) between 1 and 4000`),
    check('check_ins_pain_known', sql`${t.pain} in ('none', 'mild', 'strong')`),
  ],
);

/** The thread between a member and whoever coaches them. */
export const messages = pgTable(
  'messages',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    authorId: uuid().references(() => users.id, { onDelete: 'set null' }),
    byCoach: boolean().notNull(),
    sentAt: moment().notNull(),
    words: text().notNull(),
    checkInId: uuid().references(() => checkIns.id, { onDelete: 'set null' }),
    lessonSlug: text(),
    lessonPlace: text(),
    readAt: moment(),
  },
  (t) => [
    index('messages_member').on(t.memberId, t.sentAt),
    index('messages_unread')
      .on(t.memberId)
      .where(sql`${t.readAt} is null`),
    check('messages_words', sql`length(${t.words}) between 1 and 4000`),
  ],
);

/** Unsent words, kept so that a reload or a lost line loses nothing. `key` names the form. */
export const drafts = pgTable(
  'drafts',
  {
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    key: text().notNull(),
    body: jsonb().$type<Record<string, unknown>>().notNull(),
    savedAt: moment().notNull(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.key] })],
);
