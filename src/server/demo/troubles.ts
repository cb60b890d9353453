import type { ReadinessAnswers } from '#domain/readiness/questions';
import type { App } from '#server/app';
import * as schema from '#server/db/schema/index';
import type { Person } from './cast.ts';

const HOUR = 3_600_000;

/** What each of the cast answered to the readiness questions. */
export function answersOf(person: Person): ReadinessAnswers {
  const { age } = person;
  return {
    activity: person.start[2] > 100 ? 'active' : 'inactive',
    disease: ['none'],
    signs: person.arc === 'held' && person.weeks <= 1 ? ['chest'] : ['none'],
    pregnancy: 'no',
    age: age === null || age < 45 ? '18-44' : age < 65 ? '45-64' : '65-plus',
    medicinesPulse: person.watch?.includes('blood pressure') ? 'yes' : 'no',
    bloodPressure: age !== null && age > 60 ? 'normal' : 'unknown',
    recentIllnessOrSurgery: 'no',
    effort: person.emphasis === 'muscle' ? 'vigorous' : 'light-moderate',
  } as ReadinessAnswers;
}

/** Holds and alerts that stand open today, and one that was cleared long ago. */
export async function openTroubles(
  app: App,
  person: Person,
  memberId: string,
  coachId: string,
): Promise<void> {
  const now = app.clock.now().getTime();
  const before = (hours: number) => new Date(now - hours * HOUR);
  if (person.arc === 'stopped') {
    const words = 'Pain or pressure in the chest';
    await app.db
      .insert(schema.alerts)
      .values({ memberId, kind: 'warning-sign', words, raisedAt: before(0.7) });
    await app.db
      .insert(schema.holds)
      .values({ memberId, cause: 'warning-sign', reason: words, startedAt: before(0.7), openedBy: memberId });
  }
  if (person.arc === 'held' && person.weeks <= 1) {
    const reason =
      'What you have noticed can come from the heart, the vessels or the kidneys. A doctor should look first.';
    await app.db
      .insert(schema.holds)
      .values({ memberId, cause: 'screen', reason, startedAt: before(30), openedBy: memberId });
  }
  if (person.arc === 'held' && person.weeks > 1) {
    const reason = 'The palpitations want looking at before the stairs do.';
    await app.db
      .insert(schema.holds)
      .values({ memberId, cause: 'coach', reason, startedAt: before(5 * 24), openedBy: coachId });
  }
  if (person.arc === 'hurt and back' && person.weeks > 10) {
    const raisedAt = before(person.weeks * 7 * 24 * 0.55);
    const settledAt = new Date(raisedAt.getTime() + 30 * HOUR);
    await app.db.insert(schema.alerts).values({
      memberId,
      kind: 'pain',
      words: 'Strong pain in a session',
      raisedAt,
      settledAt,
      settledBy: coachId,
    });
  }
  if (person.name === 'Petra Lund') {
    await app.db.insert(schema.alerts).values({
      memberId,
      kind: 'pain',
      words: 'Strong pain in a session: left shoulder',
      raisedAt: before(9),
    });
  }
}
