import { eq } from 'drizzle-orm';
import { HEALTH_CONSENT } from '#contracts/readiness';
import { localDate } from '#domain/flight/calendar';
import type { ReadinessAnswers } from '#domain/readiness/questions';
import { screen, validUntil, type Screen } from '#domain/readiness/screen';
import type { App } from '#server/app';
import { consents, members, readinessScreens } from '#server/db/schema/index';
import { once } from '#server/once';
import { openHold } from './holds.ts';
import { leastLoadedCoach } from './members.ts';
import type { Viewer } from './viewer.ts';

/**
 * Keeps the answers with the consent, and acts on the result: `doctor` holds the plan, and the coach finds it at the desk.
 * The first answers also make the member row, with the coach who has the fewest members.
 */
export async function answerReadiness(
  app: App,
  viewer: Viewer,
  input: { once: string; answers: ReadinessAnswers },
): Promise<Screen> {
  const now = app.clock.now();
  const result = screen(input.answers);
  const coachId = await leastLoadedCoach(app);
  await once(app, viewer.id, { key: input.once, body: input.answers }, async (tx, enqueue) => {
    await tx.insert(members).values({ userId: viewer.id, coachId }).onConflictDoNothing();
    const [consented] = await tx
      .select({ id: consents.id })
      .from(consents)
      .where(eq(consents.userId, viewer.id))
      .limit(1);
    if (!consented) {
      await tx
        .insert(consents)
        .values({ userId: viewer.id, kind: 'health-data', wording: HEALTH_CONSENT, givenAt: now });
    }
    await tx.insert(readinessScreens).values({
      memberId: viewer.id,
      answeredAt: now,
      answers: input.answers,
      result: result.result,
      reasons: [...result.reasons],
      validUntil: validUntil(localDate(now, viewer.timeZone)),
    });
    if (result.result === 'doctor') {
      const reason = result.reasons[0] ?? 'A doctor should look first.';
      const opened = await openHold(tx, {
        memberId: viewer.id,
        cause: 'screen',
        reason,
        openedBy: viewer.id,
        at: now,
      });
      if (opened) await enqueue('mail', { letter: 'held', userId: viewer.id });
    }
    return { result: result.result };
  });
  return result;
}
