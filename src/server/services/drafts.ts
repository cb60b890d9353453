import { and, eq } from 'drizzle-orm';
import type { Queryable } from '#server/db/client';
import { drafts } from '#server/db/schema/index';

export type DraftBody = Record<string, string | number | null>;

/** Keeps unsent words; the newest saving wins. */
export async function saveDraft(
  at: Queryable,
  userId: string,
  key: string,
  body: DraftBody,
  now: Date,
): Promise<void> {
  await at
    .insert(drafts)
    .values({ userId, key, body, savedAt: now })
    .onConflictDoUpdate({ target: [drafts.userId, drafts.key], set: { body, savedAt: now } });
}

export async function readDraft(
  at: Queryable,
  userId: string,
  key: string,
): Promise<{ body: DraftBody; savedAt: Date } | null> {
  const [row] = await at
    .select({ body: drafts.body, savedAt: drafts.savedAt })
    .from(drafts)
    .where(and(eq(drafts.userId, userId), eq(drafts.key, key)));
  return row ? { body: row.body as DraftBody, savedAt: row.savedAt } : null;
}

export async function dropDraft(at: Queryable, userId: string, key: string): Promise<void> {
  await at.delete(drafts).where(and(eq(drafts.userId, userId), eq(drafts.key, key)));
}
