import { sql } from 'drizzle-orm';
import {
  check,
  date,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  smallint,
  text,
  uniqueIndex,
  uuid,
  boolean,
} from 'drizzle-orm/pg-core';
import { id, moment } from './columns.ts';

/** Everyone who can sign in. `visitor` has an address and is on the way to joining. */
export const users = pgTable(
  'users',
  {
    id: id(),
    name: text(),
    email: text().notNull(),
    emailVerified: moment(),
    image: text(),
    role: text({ enum: ['visitor', 'member', 'coach', 'owner'] })
      .notNull()
      .default('visitor'),
    timeZone: text().notNull().default('Europe/London'),
    units: text({ enum: ['metric', 'imperial'] })
      .notNull()
      .default('metric'),
    disabledAt: moment(),
    createdAt: moment().notNull(),
  },
  (t) => [
    uniqueIndex('users_email_unique').on(sql`lower(${t.email})`),
    index('users_role').on(t.role),
    check('users_role_known', sql`${t.role} in ('visitor', 'member', 'coach', 'owner')`),
    check('users_units_known', sql`${t.units} in ('metric', 'imperial')`),
    check('users_email_shape', sql`${t.email} like '%_@_%' and length(${t.email}) <= 254`),
  ],
);

/** Auth.js sessions; the stored token is the SHA-256 of what the cookie holds. */
export const sessions = pgTable(
  'sessions',
  {
    sessionToken: text().primaryKey(),
    id: uuid()
      .notNull()
      .default(sql`gen_random_uuid()`)
      .unique(),
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    expires: moment().notNull(),
    createdAt: moment()
      .notNull()
      .default(sql`now()`),
    seenAt: moment(),
    device: text(),
  },
  (t) => [index('sessions_user').on(t.userId)],
);

/** Kept for the Auth.js adapter; no outside account is linked today. */
export const accounts = pgTable(
  'accounts',
  {
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    type: text().notNull(),
    provider: text().notNull(),
    providerAccountId: text().notNull(),
    refresh_token: text(),
    access_token: text(),
    expires_at: integer(),
    token_type: text(),
    scope: text(),
    id_token: text(),
    session_state: text(),
  },
  (t) => [primaryKey({ columns: [t.provider, t.providerAccountId] })],
);

export const verificationTokens = pgTable(
  'verification_tokens',
  { identifier: text().notNull(), token: text().notNull(), expires: moment().notNull() },
  (t) => [primaryKey({ columns: [t.identifier, t.token] })],
);

/** A coach invited by the owner; the row is spent when the address first signs in. */
export const invites = pgTable(
  'invites',
  {
    id: id(),
    email: text().notNull(),
    name: text().notNull(),
    invitedBy: uuid()
      .notNull()
      .references(() => users.id),
    createdAt: moment().notNull(),
    acceptedAt: moment(),
  },
  (t) => [
    uniqueIndex('invites_email_open')
      .on(sql`lower(${t.email})`)
      .where(sql`${t.acceptedAt} is null`),
  ],
);

/** What a member is, beside being a user. Exists from the first join step on. */
export const members = pgTable(
  'members',
  {
    userId: uuid()
      .primaryKey()
      .references(() => users.id, { onDelete: 'cascade' }),
    coachId: uuid().references(() => users.id),
    joinedAt: moment(),
    birthDate: date(),
    sex: text({ enum: ['female', 'male'] }),
    statureCm: smallint(),
    about: text(),
    emphasis: text({ enum: ['breath', 'balanced', 'muscle'] })
      .notNull()
      .default('balanced'),
    measuresBody: boolean().notNull().default(false),
    wantsReminders: boolean().notNull().default(true),
    wantsLetter: boolean().notNull().default(true),
    unsubscribeToken: uuid()
      .notNull()
      .default(sql`gen_random_uuid()`)
      .unique(),
    watch: text(),
  },
  (t) => [
    index('members_coach').on(t.coachId),
    check('members_sex_known', sql`${t.sex} in ('female', 'male')`),
    check('members_emphasis_known', sql`${t.emphasis} in ('breath', 'balanced', 'muscle')`),
    check('members_stature_plausible', sql`${t.statureCm} between 100 and 250`),
  ],
);

/** Consent to keep and use health data, as given; never updated. */
export const consents = pgTable(
  'consents',
  {
    id: id(),
    userId: uuid()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    kind: text({ enum: ['health-data', 'terms', 'photo'] }).notNull(),
    wording: text().notNull(),
    givenAt: moment().notNull(),
    withdrawnAt: moment(),
  },
  (t) => [index('consents_user').on(t.userId)],
);

/** Answers to the readiness questions and what they led to. Kept, never changed. */
export const readinessScreens = pgTable(
  'readiness_screens',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    answeredAt: moment().notNull(),
    answers: jsonb().$type<Record<string, unknown>>().notNull(),
    result: text({ enum: ['clear', 'gentle', 'doctor'] }).notNull(),
    reasons: jsonb().$type<string[]>().notNull(),
    validUntil: date().notNull(),
  },
  (t) => [
    index('screens_member').on(t.memberId, t.answeredAt),
    check('screens_result_known', sql`${t.result} in ('clear', 'gentle', 'doctor')`),
  ],
);

/** A stretch of time in which a member's plan is held. Two of them never overlap (exclusion constraint, see migrations). */
export const holds = pgTable(
  'holds',
  {
    id: id(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    cause: text({ enum: ['screen', 'warning-sign', 'pain', 'coach'] }).notNull(),
    reason: text().notNull(),
    startedAt: moment().notNull(),
    openedBy: uuid().references(() => users.id, { onDelete: 'set null' }),
    endedAt: moment(),
    clearedBy: uuid().references(() => users.id, { onDelete: 'set null' }),
    clearance: text(),
  },
  (t) => [
    index('holds_member').on(t.memberId, t.startedAt),
    check('holds_cause_known', sql`${t.cause} in ('screen', 'warning-sign', 'pain', 'coach')`),
    check('holds_period', sql`${t.endedAt} is null or ${t.endedAt} >= ${t.startedAt}`),
    check('holds_cleared_whole', sql`(${t.endedAt} is null) = (${t.clearance} is null)`),
  ],
);

/** The member's stairs, space and kit. */
export const houses = pgTable(
  'houses',
  {
    memberId: uuid()
      .primaryKey()
      .references(() => members.userId, { onDelete: 'cascade' }),
    stairCount: smallint().notNull(),
    stepHeightMm: smallint().notNull(),
    rail: text({ enum: ['none', 'one side', 'both sides'] }).notNull(),
    matLengthCm: smallint(),
    matWidthCm: smallint(),
    marginCm: smallint(),
    chair: boolean().notNull().default(false),
    chairHeightCm: smallint(),
    bar: boolean().notNull().default(false),
    pulseMeter: boolean().notNull().default(false),
    updatedAt: moment().notNull(),
  },
  (t) => [
    check('houses_stairs_plausible', sql`${t.stairCount} between 0 and 60`),
    check('houses_step_plausible', sql`${t.stepHeightMm} between 80 and 300`),
    check('houses_rail_known', sql`${t.rail} in ('none', 'one side', 'both sides')`),
  ],
);
