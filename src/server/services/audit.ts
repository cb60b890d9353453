import { desc, eq } from 'drizzle-orm';
import type { App } from '#server/app';
import type { Queryable } from '#server/db/client';
import { auditEntries, users } from '#server/db/schema/index';

/** What is written in the audit list; verbs in the past, so that a row reads as a sentence. */
export type AuditAction =
  | 'invited a coach'
  | 'moved a member'
  | 'changed a plan'
  | 'added a plan'
  | 'held a plan'
  | 'cleared a plan'
  | 'changed a target'
  | 'answered a check-in'
  | 'settled an alert'
  | 'took their records'
  | 'deleted an account'
  | 'moved the clock'
  | 'voided a mark'
  | 'disabled a person';

/** Adds a line to the audit list, in the transaction of the change. `details` holds names and numbers, never health data. */
export async function audit(
  at: Queryable,
  entry: {
    at: Date;
    actorId: string | null;
    action: AuditAction;
    subjectId?: string | null;
    details?: Record<string, string | number | boolean | null>;
  },
): Promise<void> {
  await at.insert(auditEntries).values({ ...entry, details: entry.details ?? {} });
}

/** The newest lines with the actor's name. Owner only; the page checks the role. */
export function listAudit(app: App, limit = 100) {
  return app.db
    .select({
      id: auditEntries.id,
      at: auditEntries.at,
      action: auditEntries.action,
      actor: users.name,
      subjectId: auditEntries.subjectId,
      details: auditEntries.details,
    })
    .from(auditEntries)
    .leftJoin(users, eq(users.id, auditEntries.actorId))
    .orderBy(desc(auditEntries.id))
    .limit(limit);
}
