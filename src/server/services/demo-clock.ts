import { eq } from 'drizzle-orm';
import type { App } from '#server/app';
import { isMovingClock } from '#server/clock';
import { practice } from '#server/db/schema/index';
import { notFound } from '#server/errors';
import { audit } from './audit.ts';
import type { Viewer } from './viewer.ts';

const MAX_DAYS = 84;

const MINUTES_BEHIND = 10;

const advanceTestClock = (app: App, id: string) =>
  app.stripe.testHelpers.testClocks.advance(
    id,
    { frozen_time: Math.floor(app.clock.now().getTime() / 1000) },
    { timeout: 60_000 },
  );

/** Demo only: the stand-in's test clock stands still by itself, so it is brought up to the practice's now and then. */
export async function followClock(app: App): Promise<void> {
  if (!app.env.demo) return;
  const [row] = await app.db.select({ id: practice.testClockId }).from(practice).where(eq(practice.id, 1));
  if (!row?.id) return;
  const { frozen_time: frozen } = await app.stripe.testHelpers.testClocks.retrieve(row.id);
  if (app.clock.now().getTime() / 1000 - frozen > MINUTES_BEHIND * 60) await advanceTestClock(app, row.id);
}

/**
 * Demo only: moves the practice's clock, and the payment stand-in's with it, so that a month can be lived in a minute.
 * @throws AppError not-found in production
 */
export async function moveClock(app: App, viewer: Viewer | null, days: number): Promise<void> {
  const { clock } = app;
  if (!app.env.demo || !isMovingClock(clock)) throw notFound();
  if (!Number.isInteger(days) || days < 1 || days > MAX_DAYS)
    throw new RangeError(`from 1 to ${MAX_DAYS} days`);
  clock.advance(days * 86_400);
  const [row] = await app.db
    .update(practice)
    .set({ clockOffsetSeconds: clock.offsetSeconds })
    .where(eq(practice.id, 1))
    .returning({ testClockId: practice.testClockId });
  if (row?.testClockId) await advanceTestClock(app, row.testClockId);
  await audit(app.db, {
    at: clock.now(),
    actorId: viewer?.id ?? null,
    action: 'moved the clock',
    details: { days },
  });
  await app.enqueue('tick', {});
}
