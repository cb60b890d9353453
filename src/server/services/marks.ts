import { and, asc, eq, isNull, ne } from 'drizzle-orm';
import type { MarkInput } from '#contracts/marks';
import { BENCHMARKS, type TestId } from '#domain/benchmark/tests';
import type { App } from '#server/app';
import type { Queryable, Transaction } from '#server/db/client';
import { alerts, houses, marks } from '#server/db/schema/index';
import { notFound } from '#server/errors';
import { audit } from './audit.ts';
import type { Viewer } from './viewer.ts';

/** A mark as charts and rules need it. */
export interface Mark {
  id: string;
  test: TestId;
  form: string | null;
  value: number;
  takenAt: Date;
  testDayId: string | null;
  stairCount: number | null;
  stepHeightMm: number | null;
  effort: number | null;
}

/** All valid marks of a member, oldest first. One query. */
export async function listMarks(at: Queryable, memberId: string): Promise<Mark[]> {
  const rows = await at
    .select({
      id: marks.id,
      test: marks.test,
      form: marks.form,
      value: marks.value,
      takenAt: marks.takenAt,
      testDayId: marks.testDayId,
      stairCount: marks.stairCount,
      stepHeightMm: marks.stepHeightMm,
      effort: marks.effort,
    })
    .from(marks)
    .where(and(eq(marks.memberId, memberId), isNull(marks.voidedAt)))
    .orderBy(asc(marks.takenAt), asc(marks.id));
  return rows as Mark[];
}

/**
 * Writes one result. On a test day a later try of the same test takes the place of the earlier one, which stays, voided.
 * Stairs keep the house's measures of the day: results on other stairs are another test. Strong pain alerts the coach.
 */
export async function saveMark(
  tx: Transaction,
  viewer: Viewer,
  input: Omit<MarkInput, 'once'>,
  { testDayId, now }: { testDayId: string | null; now: Date },
): Promise<{ id: string }> {
  const benchmark = BENCHMARKS[input.test];
  const [house] =
    input.test === 'stairs'
      ? await tx
          .select({ stairCount: houses.stairCount, stepHeightMm: houses.stepHeightMm })
          .from(houses)
          .where(eq(houses.memberId, viewer.id))
      : [];
  const [row] = await tx
    .insert(marks)
    .values({
      memberId: viewer.id,
      testDayId,
      test: input.test,
      form: input.form,
      value: input.value,
      takenAt: now,
      effort: input.effort,
      pain: input.pain,
      conditions: input.conditions || null,
      ...house,
    })
    .returning({ id: marks.id });
  if (!row) throw new Error('the mark was not written');
  if (testDayId) {
    await tx
      .update(marks)
      .set({ voidedAt: now })
      .where(
        and(
          eq(marks.testDayId, testDayId),
          eq(marks.test, input.test),
          ne(marks.id, row.id),
          isNull(marks.voidedAt),
        ),
      );
  }
  if (input.pain === 'strong') {
    const words = `Strong pain in the test: ${benchmark.name.toLowerCase()}`;
    await tx.insert(alerts).values({ memberId: viewer.id, kind: 'pain', words, raisedAt: now });
  }
  return row;
}

/** Takes a mistyped mark out of every chart; it stays on record as voided. @throws AppError not-found for another's */
export async function voidMark(app: App, viewer: Viewer, markId: string): Promise<void> {
  const now = app.clock.now();
  await app.db.transaction(async (tx) => {
    const [row] = await tx
      .update(marks)
      .set({ voidedAt: now })
      .where(and(eq(marks.id, markId), eq(marks.memberId, viewer.id), isNull(marks.voidedAt)))
      .returning({ test: marks.test });
    if (!row) throw notFound();
    await audit(tx, {
      at: now,
      actorId: viewer.id,
      action: 'voided a mark',
      subjectId: viewer.id,
      details: { test: row.test },
    });
  });
}
