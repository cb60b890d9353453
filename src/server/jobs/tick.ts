import { lt } from 'drizzle-orm';
import type { App } from '#server/app';
import { idempotencyKeys } from '#server/db/schema/index';
import { followClock } from '#server/services/demo-clock';
import { sendReminders } from '#server/services/reminders';

const KEYS_KEPT_DAYS = 7;

/** What the minute brings: reminders that have become due, and old write keys swept away. May run twice. */
export async function runTick(app: App): Promise<void> {
  await followClock(app);
  await sendReminders(app);
  const before = new Date(app.clock.now().getTime() - KEYS_KEPT_DAYS * 86_400_000);
  await app.db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, before));
}
