import { and, eq, sql } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { idempotencyKeys } from '#server/db/schema/index';
import { AppError } from '#server/errors';
import type { Enqueue } from '#server/jobs/boss';

/** JSON's null, which the column takes; drizzle turns a plain null into SQL's, which it refuses. */
const asJson = (value: unknown) => sql`${JSON.stringify(value ?? null)}::jsonb`;

export interface Written<T> {
  status: number;
  reply: T;
  /** True when the same key was written before and nothing was done now. */
  replayed: boolean;
}

/**
 * Does a write once for a person and key. A second sending of the same body gets the first reply; a parallel one waits
 * for the first to commit. The key, the change and its jobs share one transaction.
 * @throws AppError conflict when the key comes again with another body
 */
export function once<T>(
  app: App,
  userId: string,
  { key, body }: { key: string; body: unknown },
  work: (tx: Transaction, enqueue: Enqueue) => Promise<T>,
): Promise<Written<T>> {
  const bodyHash = createHash('sha256').update(JSON.stringify(body)).digest('base64url');
  return app.transaction(async (tx, enqueue) => {
    const mine = and(eq(idempotencyKeys.userId, userId), eq(idempotencyKeys.key, key));
    const claimed = await tx
      .insert(idempotencyKeys)
      .values({ userId, key, bodyHash, status: 200, reply: asJson(null), createdAt: app.clock.now() })
      .onConflictDoNothing()
      .returning({ key: idempotencyKeys.key });
    if (claimed.length === 0) {
      const [before] = await tx.select().from(idempotencyKeys).where(mine);
      if (before?.bodyHash !== bodyHash) {
        throw new AppError(
          'conflict',
          'This was sent before with other contents. Reload the page and look before you send again.',
        );
      }
      return { status: before.status, reply: before.reply as T, replayed: true };
    }
    const reply = await work(tx, enqueue);
    await tx
      .update(idempotencyKeys)
      .set({ reply: asJson(reply) })
      .where(mine);
    return { status: 200, reply, replayed: false };
  });
}
