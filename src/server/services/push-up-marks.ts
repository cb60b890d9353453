import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { judgeChange, type Verdict } from '#domain/change/judge-change';
import type { App } from '#server/app';
import { marks } from '#server/db/schema/index';

const DAY_MS = 86_400_000;

/** A member's push-ups in three numbers, as a caseload row shows them. */
export interface PushUps {
  now: number;
  before: number | null;
  /** Smallest real change on this person. */
  error: number;
  /** Null with a single mark: there is nothing to compare. */
  verdict: Verdict | null;
}

type Row = { value: number; form: string | null; takenAt: Date; testDayId: string | null };

/** The last mark against the test day before, in the form of the last. */
function judgePushUps(all: readonly Row[]): PushUps | null {
  const last = all.at(-1);
  if (!last) return null;
  const mine = all.filter(({ form }) => form === last.form);
  const before = mine.filter(({ testDayId }) => testDayId !== null).at(-2) ?? mine[0] ?? last;
  const judged = judgeChange({
    testId: 'push-ups',
    better: 'more',
    marks: mine.map(({ value, form, takenAt }) => ({ value, form, atDays: takenAt.getTime() / DAY_MS })),
    since: before.takenAt.getTime() / DAY_MS,
  });
  const alone = mine.length === 1;
  return {
    now: last.value,
    before: alone ? null : before.value,
    error: judged.smallestRealChange95,
    verdict: alone ? null : judged.verdict,
  };
}

/** The push-ups of these members, each judged as on their own marks page. One query. The caller has checked whose they are. */
export async function pushUpsOf(app: App, memberIds: readonly string[]): Promise<Map<string, PushUps>> {
  if (memberIds.length === 0) return new Map();
  const rows = await app.db
    .select({
      memberId: marks.memberId,
      value: marks.value,
      form: marks.form,
      takenAt: marks.takenAt,
      testDayId: marks.testDayId,
    })
    .from(marks)
    .where(and(inArray(marks.memberId, [...memberIds]), eq(marks.test, 'push-ups'), isNull(marks.voidedAt)))
    .orderBy(asc(marks.takenAt), asc(marks.id));
  const byMember = new Map<string, Row[]>();
  for (const { memberId, ...row } of rows) {
    const mine = byMember.get(memberId);
    if (mine) mine.push(row);
    else byMember.set(memberId, [row]);
  }
  return new Map(
    [...byMember].flatMap(([memberId, mine]) => {
      const judged = judgePushUps(mine);
      return judged ? [[memberId, judged] as const] : [];
    }),
  );
}
