import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { MovingClock } from '#server/clock';
import { practice } from '#server/db/schema/index';
import { notFound } from '#server/errors';
import { audit } from './audit.ts';
import type { Viewer } from './viewer.ts';

const MAX_DAYS = 84;

/**
 * Demo only: moves the practice's clock, and the payment stand-in's with it, so that a month can be lived in a minute.
 * @throws AppError not-found in production
 */
export async function moveClock(app: App, viewer: Viewer | null, days: number): Promise<void> {
  const { clock } = app;
  if (!app.env.demo || !(clock instanceof MovingClock)) throw notFound();
  if (!Number.isInteger(days) || days < 1 || days > MAX_DAYS)
    throw new RangeError(`from 1 to ${MAX_DAYS} days`);
  clock.advance(days * 86_400);
  const [row] = await app.db
    .update(practice)
    .set({ clockOffsetSeconds: clock.offsetSeconds })
    .where(eq(practice.id, 1))
    .returning({ testClockId: practice.testClockId });
  if (row?.testClockId) {
    await app.stripe.testHelpers.testClocks.advance(row.testClockId, {
      frozen_time: Math.floor(clock.now().getTime() / 1000),
    });
  }
  await audit(app.db, {
    at: clock.now(),
    actorId: viewer?.id ?? null,
    action: 'moved the clock',
    details: { days },
  });
  await app.enqueue('tick', {});
}
