import { sql } from 'drizzle-orm';
import {
  check,
  date,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  smallint,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { id, moment } from './columns.ts';
import { members, users } from './people.ts';

/** Twelve weeks. `startsOn` is the local Monday (or day) of week 1 in the member's zone. */
export const flights = pgTable(
  'flights',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    number: smallint().notNull(),
    startsOn: date().notNull(),
    emphasis: text({ enum: ['breath', 'balanced', 'muscle'] }).notNull(),
    createdAt: moment().notNull(),
  },
  (t) => [
    unique('flights_number').on(t.memberId, t.number),
    check('flights_number_positive', sql`${t.number} > 0`),
    check('flights_emphasis_known', sql`${t.emphasis} in ('breath', 'balanced', 'muscle')`),
  ],
);

/** One training session: planned (the next one) or done. A member has at most one planned session. */
export const trainingSessions = pgTable(
  'training_sessions',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    flightId: uuid()
      .notNull()
      .references(() => flights.id, { onDelete: 'cascade' }),
    week: smallint().notNull(),
    ordinal: smallint().notNull(),
    title: text().notNull(),
    plannedAt: moment().notNull(),
    doneAt: moment(),
    minutes: smallint(),
    effort: smallint(),
    pain: text({ enum: ['none', 'mild', 'strong'] }),
    painWhere: text(),
    note: text(),
    shareDone: doublePrecision(),
  },
  (t) => [
    index('training_sessions_member').on(t.memberId, t.doneAt),
    index('training_sessions_flight').on(t.flightId, t.week),
    uniqueIndex('training_sessions_one_planned')
      .on(t.memberId)
      .where(sql`${t.doneAt} is null`),
    check('training_sessions_week', sql`${t.week} between 1 and 12`),
    check('training_sessions_ordinal', sql`${t.ordinal} between 1 and 14`),
    check('training_sessions_effort', sql`${t.effort} between 1 and 10`),
    check('training_sessions_minutes', sql`${t.minutes} between 1 and 240`),
    check('training_sessions_pain', sql`${t.pain} in ('none', 'mild', 'strong')`),
  ],
);

/** One movement of a session: what was asked, why, what the coach changed, what was done (total over all sets). */
export const sessionItems = pgTable(
  'session_items',
  {
    id: id(),
    sessionId: uuid()
      .notNull()
      .references(() => trainingSessions.id, { onDelete: 'cascade' }),
    position: smallint().notNull(),
    movement: text().notNull(),
    rung: text().notNull(),
    sets: smallint().notNull(),
    amount: smallint().notNull(),
    unit: text({ enum: ['reps', 'seconds', 'flights'] }).notNull(),
    effortAsked: smallint().notNull(),
    rule: text().notNull(),
    why: text().notNull(),
    ruledRung: text(),
    ruledSets: smallint(),
    ruledAmount: smallint(),
    overriddenBy: uuid().references(() => users.id, { onDelete: 'set null' }),
    overrideWhy: text(),
    doneTotal: smallint(),
    effortDone: smallint(),
    pain: text({ enum: ['none', 'mild', 'strong'] }),
  },
  (t) => [
    unique('session_items_position').on(t.sessionId, t.position),
    check('session_items_sets', sql`${t.sets} between 1 and 10`),
    check('session_items_amount', sql`${t.amount} between 1 and 600`),
    check('session_items_unit', sql`${t.unit} in ('reps', 'seconds', 'flights')`),
    check(
      'session_items_effort',
      sql`${t.effortAsked} between 1 and 10 and ${t.effortDone} between 1 and 10`,
    ),
    check('session_items_done', sql`${t.doneTotal} between 0 and 6000`),
    check('session_items_override_whole', sql`${t.overriddenBy} is null or ${t.overrideWhy} is not null`),
  ],
);

/** A coach's standing wish for a movement, taken up by the next planned session and then marked as taken. */
export const targetOverrides = pgTable(
  'target_overrides',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    movement: text().notNull(),
    rung: text().notNull(),
    sets: smallint().notNull(),
    amount: smallint().notNull(),
    effort: smallint().notNull(),
    why: text().notNull(),
    coachId: uuid().references(() => users.id, { onDelete: 'set null' }),
    createdAt: moment().notNull(),
    takenAt: moment(),
  },
  (t) => [index('target_overrides_member').on(t.memberId, t.createdAt)],
);

/** A test day: week 0 is the baseline, 4, 8 and 12 are landings. */
export const testDays = pgTable(
  'test_days',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    flightId: uuid().references(() => flights.id, { onDelete: 'cascade' }),
    week: smallint().notNull(),
    takenOn: date().notNull(),
    conditions: text(),
    finishedAt: moment(),
    createdAt: moment().notNull(),
  },
  (t) => [
    unique('test_days_week').on(t.flightId, t.week),
    index('test_days_member').on(t.memberId, t.takenOn),
    uniqueIndex('test_days_one_open')
      .on(t.memberId)
      .where(sql`${t.finishedAt} is null`),
    check('test_days_week_known', sql`${t.week} in (0, 4, 8, 12)`),
  ],
);

/** One benchmark result. */
export const marks = pgTable(
  'marks',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    testDayId: uuid().references(() => testDays.id, { onDelete: 'set null' }),
    test: text().notNull(),
    form: text(),
    value: doublePrecision().notNull(),
    takenAt: moment().notNull(),
    effort: smallint(),
    pain: text({ enum: ['none', 'mild', 'strong'] })
      .notNull()
      .default('none'),
    conditions: text(),
    entry: text({ enum: ['form', 'runner'] })
      .notNull()
      .default('form'),
    tapsMs: jsonb().$type<number[]>(),
    stairCount: smallint(),
    stepHeightMm: smallint(),
    voidedAt: moment(),
  },
  (t) => [
    index('marks_member').on(t.memberId, t.test, t.takenAt),
    check('marks_value_plausible', sql`${t.value} >= 0 and ${t.value} < 10000 and ${t.value} <> 'NaN'`),
    check('marks_effort', sql`${t.effort} between 1 and 10`),
    check('marks_entry_known', sql`${t.entry} in ('form', 'runner')`),
    check('marks_pain_known', sql`${t.pain} in ('none', 'mild', 'strong')`),
  ],
);

/** A report that needs a person: a stop pressed, pain named. */
export const alerts = pgTable(
  'alerts',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    kind: text({ enum: ['warning-sign', 'pain'] }).notNull(),
    words: text().notNull(),
    raisedAt: moment().notNull(),
    settledAt: moment(),
    settledBy: uuid().references(() => users.id, { onDelete: 'set null' }),
  },
  (t) => [
    index('alerts_open')
      .on(t.memberId)
      .where(sql`${t.settledAt} is null`),
    check('alerts_kind_known', sql`${t.kind} in ('warning-sign', 'pain')`),
  ],
);

/** Which lesson a member has read, and the place where they stopped. */
export const lessonReads = pgTable(
  'lesson_reads',
  {
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    slug: text().notNull(),
    place: integer().notNull().default(0),
    openedAt: moment().notNull(),
    readAt: moment(),
  },
  (t) => [unique('lesson_reads_once').on(t.memberId, t.slug)],
);
