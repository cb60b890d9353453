import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  index,
  integer,
  pgTable,
  smallint,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { id, moment } from './columns.ts';
import { members } from './people.ts';

/** What the practice sells. Money in minor units of `currency`. */
export const plans = pgTable(
  'plans',
  {
    id: id(),
    slug: text().notNull().unique(),
    name: text().notNull(),
    summary: text().notNull(),
    interval: text({ enum: ['month', 'year'] }).notNull(),
    amountMinor: integer().notNull(),
    currency: text().notNull().default('gbp'),
    trialDays: smallint().notNull().default(0),
    stripeProductId: text(),
    stripePriceId: text().unique(),
    position: smallint().notNull().default(0),
    onSale: boolean().notNull().default(true),
    createdAt: moment().notNull(),
  },
  (t) => [
    check('plans_interval_known', sql`${t.interval} in ('month', 'year')`),
    check('plans_amount_positive', sql`${t.amountMinor} > 0`),
    check('plans_trial_bounds', sql`${t.trialDays} between 0 and 60`),
    check('plans_currency_shape', sql`${t.currency} ~ '^[a-z]{3}$'`),
  ],
);

export const stripeCustomers = pgTable('stripe_customers', {
  memberId: uuid()
    .primaryKey()
    .references(() => members.userId, { onDelete: 'cascade' }),
  customerId: text().notNull().unique(),
  createdAt: moment().notNull(),
});

/** Mirror of the payment provider's subscription, rewritten from a fresh read on every event. */
export const subscriptions = pgTable(
  'subscriptions',
  {
    id: text().primaryKey(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    planId: uuid().references(() => plans.id),
    status: text({
      enum: [
        'incomplete',
        'incomplete_expired',
        'trialing',
        'active',
        'past_due',
        'canceled',
        'unpaid',
        'paused',
      ],
    }).notNull(),
    startedAt: moment().notNull(),
    trialEnd: moment(),
    currentPeriodStart: moment().notNull(),
    currentPeriodEnd: moment().notNull(),
    cancelAtPeriodEnd: boolean().notNull().default(false),
    endedAt: moment(),
    pastDueSince: moment(),
    syncedAt: moment().notNull(),
  },
  (t) => [
    index('subscriptions_member').on(t.memberId),
    uniqueIndex('subscriptions_one_live')
      .on(t.memberId)
      .where(sql`${t.status} in ('trialing', 'active', 'past_due', 'unpaid', 'paused')`),
    check('subscriptions_period', sql`${t.currentPeriodEnd} >= ${t.currentPeriodStart}`),
  ],
);

export const invoices = pgTable(
  'invoices',
  {
    id: text().primaryKey(),
    memberId: uuid()
      .notNull()
      .references(() => members.userId, { onDelete: 'cascade' }),
    subscriptionId: text(),
    number: text(),
    status: text({ enum: ['draft', 'open', 'paid', 'void', 'uncollectible'] }).notNull(),
    amountMinor: integer().notNull(),
    paidMinor: integer().notNull().default(0),
    currency: text().notNull(),
    issuedAt: moment().notNull(),
    paidAt: moment(),
    pageUrl: text(),
  },
  (t) => [
    index('invoices_member').on(t.memberId, t.issuedAt),
    index('invoices_issued').on(t.issuedAt),
    check('invoices_paid_bounds', sql`${t.paidMinor} between 0 and ${t.amountMinor}`),
  ],
);

/** Every webhook event once; `appliedAt` is set when its object was read again and written here. */
export const stripeEvents = pgTable('stripe_events', {
  id: text().primaryKey(),
  type: text().notNull(),
  objectId: text().notNull(),
  customerId: text(),
  receivedAt: moment().notNull(),
  appliedAt: moment(),
});
