import { BENCHMARKS, TEST_IDS, unitWordFor, type TestId } from '#domain/benchmark/tests';
import { judgeChange, type ChangeJudgement } from '#domain/change/judge-change';
import type { Jamb } from '#domain/charts/jamb';
import type { Trend } from '#domain/charts/trend';
import { formatDay, formatDuration, formatNumber } from '#domain/numbers/format';
import { standingOf, type Standing } from '#domain/standing/standing-of';
import type { App } from '#server/app';
import { listMarks, type Mark } from './marks.ts';
import type { MemberState } from './members.ts';

const DAY_MS = 86_400_000;
const LAST_LANDINGS = 1;
/** With fewer marks a curve says nothing that the jamb does not. */
const TREND_MARKS = 4;

/** One test as member and coach see it: marks, verdict, standing and the drawings' values. */
export interface Board {
  test: TestId;
  name: string;
  marks: Mark[];
  /** Against the test day before the last. */
  judgement: ChangeJudgement;
  /** Against the first mark. */
  whole: ChangeJudgement;
  /** The verdict as the first words of a sentence: `Really better.` */
  verdict: string;
  standing: Standing;
  jamb: Jamb;
  trend: Trend | null;
}

const daysOf = (moment: Date) => moment.getTime() / DAY_MS;

/** Results are comparable in one form and, for stairs, on one staircase. */
const formKey = (mark: Mark) =>
  mark.test === 'stairs' ? `${mark.stairCount ?? '?'}x${mark.stepHeightMm ?? '?'}` : (mark.form ?? '');

/** Whole years between a birth date and a moment. */
export function ageAt(birthDate: string | null, now: Date): number | null {
  if (!birthDate) return null;
  const [year = 0, month = 1, day = 1] = birthDate.split('-').map(Number);
  const had = now.getUTCMonth() + 1 > month || (now.getUTCMonth() + 1 === month && now.getUTCDate() >= day);
  return now.getUTCFullYear() - year - (had ? 0 : 1);
}

/** How a result of this test is written. */
export const formatOf = (test: TestId) => (value: number) =>
  BENCHMARKS[test].entry === 'duration'
    ? formatDuration(value)
    : formatNumber(value, BENCHMARKS[test].decimals);

export const VERDICTS: Record<ChangeJudgement['verdict'], string> = {
  'really better': 'Really better.',
  'probably better': 'Probably better.',
  'no real change yet': 'No real change yet.',
  'probably lower': 'Probably lower.',
  'really lower': 'Really lower.',
  'too early': 'Too early to say.',
};

/** The test day before the last one: what 'before' means on the jamb. */
function comparisonStart(marks: readonly Mark[]): Mark | undefined {
  const onTestDays = marks.filter((mark) => mark.testDayId !== null);
  return onTestDays[onTestDays.length - 1 - LAST_LANDINGS] ?? marks[0];
}

function jambOf(
  test: TestId,
  marks: Mark[],
  before: Mark | undefined,
  judgement: ChangeJudgement,
  standing: Standing,
  timeZone: string,
  finding: string,
): Jamb {
  const benchmark = BENCHMARKS[test];
  return {
    id: `jamb-${test}`,
    finding,
    unit: unitWordFor(test, 2),
    marks: marks.map((mark) => ({ value: mark.value, day: formatDay(mark.takenAt, timeZone) })),
    ...(before && marks.length > 1 && { beforeIndex: Math.min(marks.indexOf(before), marks.length - 2) }),
    ...(marks.length > 1 && { error: judgement.smallestRealChange95 }),
    ...(standing.kind === 'placed' && { bands: standing.bands }),
    lowerIsBetter: benchmark.better === 'less',
    format: formatOf(test),
  };
}

function boardOf(
  test: TestId,
  all: Mark[],
  person: { ageYears: number | null; sex: 'male' | 'female' | null; statureCm: number | null },
  timeZone: string,
  now: Date,
): Board | null {
  const last = all.at(-1);
  if (!last) return null;
  const marks = all.filter((mark) => formKey(mark) === formKey(last));
  const benchmark = BENCHMARKS[test];
  const before = comparisonStart(marks);
  const question = {
    testId: test,
    better: benchmark.better === 'less' ? ('less' as const) : ('more' as const),
    marks: marks.map((mark) => ({ atDays: daysOf(mark.takenAt), value: mark.value, form: formKey(mark) })),
    today: daysOf(now),
  };
  const whole = judgeChange(question);
  const judgement = judgeChange({ ...question, ...(before && { since: daysOf(before.takenAt) }) });
  const standing = standingOf({
    test,
    form: last.form,
    value: last.value,
    ageYears: person.ageYears,
    sex: person.sex,
    detail: { heightCm: person.statureCm, stepHeightMm: last.stepHeightMm },
  });
  const judged = benchmark.better !== 'neither' && marks.length > 1;
  const verdict = judged ? VERDICTS[judgement.verdict] : 'Written down.';
  const finding = judged
    ? `${benchmark.name}. ${verdict} ${judgement.sentence}`
    : `${benchmark.name}: ${formatNumber(last.value, benchmark.decimals)} ${unitWordFor(test, last.value)}.`;
  return {
    test,
    name: benchmark.name,
    marks,
    judgement,
    whole,
    verdict,
    standing,
    jamb: jambOf(test, marks, before, judgement, standing, timeZone, finding),
    // The curve shows all of it; the verdict looks back only to the landing before.
    trend: judged && marks.length >= TREND_MARKS ? trendOf(test, marks, whole, timeZone, finding) : null,
  };
}

/** A stretch without marks longer than this is shown as a gap. */
const GAP_DAYS = 28;

/** Splits the curve where the data have a gap. */
function runsOf(points: ChangeJudgement['points'], marks: readonly Mark[]): Trend['bands'] {
  const days = marks.map((mark) => daysOf(mark.takenAt));
  const gaps = days.flatMap((day, index) =>
    index > 0 && day - (days[index - 1] ?? day) > GAP_DAYS ? [day] : [],
  );
  const runs: { at: number; low: number; high: number }[][] = [[]];
  for (const { atDays, low, high } of points) {
    const next = gaps[0];
    if (next !== undefined && atDays >= next) {
      gaps.shift();
      runs.push([]);
    }
    runs.at(-1)?.push({ at: atDays, low, high });
  }
  return runs.filter((run) => run.length > 0);
}

function trendOf(
  test: TestId,
  marks: readonly Mark[],
  judgement: ChangeJudgement,
  timeZone: string,
  finding: string,
): Trend {
  const ends = [marks[0], marks[Math.floor(marks.length / 2)], marks.at(-1)].filter(
    (mark) => mark !== undefined,
  );
  return {
    finding,
    unit: unitWordFor(test, 2),
    points: marks.map((mark) => ({
      at: daysOf(mark.takenAt),
      value: mark.value,
      day: formatDay(mark.takenAt, timeZone),
    })),
    bands: runsOf(judgement.points, marks),
    ticks: ends.map((mark) => ({ at: daysOf(mark.takenAt), label: formatDay(mark.takenAt, timeZone) })),
    format: formatOf(test),
  };
}

/** Every test that a member has marks in, in the order of a test day. One query; the rest is the domain's. */
export async function marksBoard(app: App, state: MemberState): Promise<Board[]> {
  const now = app.clock.now();
  const marks = await listMarks(app.db, state.memberId);
  const person = {
    ageYears: ageAt(state.member.birthDate, now),
    sex: state.member.sex,
    statureCm: state.member.statureCm,
  };
  return TEST_IDS.flatMap((test) => {
    const board = boardOf(
      test,
      marks.filter((mark) => mark.test === test),
      person,
      state.timeZone,
      now,
    );
    return board ? [board] : [];
  });
}
