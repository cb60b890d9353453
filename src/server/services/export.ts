import { eq, inArray } from 'drizzle-orm';
import type { PgTable } from 'drizzle-orm/pg-core';
import type { App } from '#server/app';
import * as schema from '#server/db/schema/index';
import { audit } from './audit.ts';
import type { Viewer } from './viewer.ts';

/** Every table that keeps something about a member, by the column that names them. A test holds this list to the schema. */
export const PERSONAL_TABLES = {
  members: [schema.members, schema.members.userId],
  consents: [schema.consents, schema.consents.userId],
  readinessScreens: [schema.readinessScreens, schema.readinessScreens.memberId],
  holds: [schema.holds, schema.holds.memberId],
  houses: [schema.houses, schema.houses.memberId],
  stripeCustomers: [schema.stripeCustomers, schema.stripeCustomers.memberId],
  subscriptions: [schema.subscriptions, schema.subscriptions.memberId],
  invoices: [schema.invoices, schema.invoices.memberId],
  flights: [schema.flights, schema.flights.memberId],
  trainingSessions: [schema.trainingSessions, schema.trainingSessions.memberId],
  targetOverrides: [schema.targetOverrides, schema.targetOverrides.memberId],
  testDays: [schema.testDays, schema.testDays.memberId],
  marks: [schema.marks, schema.marks.memberId],
  alerts: [schema.alerts, schema.alerts.memberId],
  lessonReads: [schema.lessonReads, schema.lessonReads.memberId],
  photos: [schema.photos, schema.photos.memberId],
  checkIns: [schema.checkIns, schema.checkIns.memberId],
  messages: [schema.messages, schema.messages.memberId],
  drafts: [schema.drafts, schema.drafts.userId],
  reminders: [schema.reminders, schema.reminders.userId],
} as const;

/**
 * Everything kept about the person, as one JSON document with a list for each table. Sessions' tokens and keys are not
 * among it: they are secrets, not records.
 */
export async function exportRecords(app: App, viewer: Viewer): Promise<Record<string, unknown>> {
  const [account] = await app.db.select().from(schema.users).where(eq(schema.users.id, viewer.id));
  const entries = await Promise.all(
    Object.entries(PERSONAL_TABLES).map(async ([name, [table, column]]) => {
      const rows = await app.db
        .select()
        .from(table as PgTable)
        .where(eq(column, viewer.id));
      return [name, rows] as const;
    }),
  );
  const records = Object.fromEntries(entries);
  const sessionIds = (records['trainingSessions'] as { id: string }[]).map((session) => session.id);
  const sessionItems = sessionIds.length
    ? await app.db
        .select()
        .from(schema.sessionItems)
        .where(inArray(schema.sessionItems.sessionId, sessionIds))
    : [];
  await audit(app.db, {
    at: app.clock.now(),
    actorId: viewer.id,
    action: 'took their records',
    subjectId: viewer.id,
  });
  return { takenAt: app.clock.now().toISOString(), account, ...records, sessionItems };
}
