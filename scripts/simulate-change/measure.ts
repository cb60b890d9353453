import { judgeChange, type ChangeJudgement, type ChangeMark } from '../../src/domain/change/judge-change.ts';
import { PLAIN_LEVELS, PLAIN_RULES } from '../../src/domain/change/plain-rules/rules.ts';
import { drawLife, drawMember, PRIOR_ERROR, seededRandom, type Conditions, type Path } from './members.ts';

export const MODEL_NAME = 'Local linear trend (ours)';

export const CHECK_WEEKS = [4, 8, 13, 26, 52] as const;

export interface Coverage {
  readonly week: number;
  /** Shares in which the 95 % interval holds the true level and the true change. */
  readonly level: number;
  readonly change: number;
}

/** Coverage of the 95 % intervals over members drawn from `drawLife`, judged on the marks up to each week. */
export function measureCoverage(conditions: Conditions, members: number, seed: number): Coverage[] {
  const random = seededRandom(seed);
  const hits = CHECK_WEEKS.map(() => ({ level: 0, change: 0 }));
  for (let i = 0; i < members; i += 1) {
    const member = drawMember(drawLife(random), conditions, random);
    CHECK_WEEKS.forEach((week, at) => {
      const day = week * 7;
      const marks = marksUntil(member.marks, day + 2);
      const judged = judgeSitUps(marks, day);
      const lastDay = Math.max(day, marks.at(-1)?.atDays ?? 0);
      const level = member.levelAt(lastDay / 7);
      const hit = hits[at];
      if (!hit || !judged.level || !judged.difference) return;
      hit.level += Number(holds(judged.level, level));
      hit.change += Number(holds(judged.difference, level - member.levelAt(0)));
    });
  }
  return hits.map(({ level, change }, at) => ({
    week: CHECK_WEEKS[at] ?? 0,
    level: level / members,
    change: change / members,
  }));
}

/** Weeks after the landing at week 12 at which the change since then is judged. */
export const WEEKS_SINCE = [4, 8, 12, 24, 40] as const;

/**
 * Members who rise over the first flight and then hold: the change since the landing at week 12 is nought.
 * Share called 'really better' and share of intervals that hold the truth, at each of `WEEKS_SINCE`.
 */
export function measureSinceLanding(path: Path, conditions: Conditions, members: number, seed: number) {
  const random = seededRandom(seed);
  const sums = WEEKS_SINCE.map((weeks) => ({ weeks, alarms: 0, held: 0 }));
  for (let i = 0; i < members; i += 1) {
    const member = drawMember(path, conditions, random);
    for (const sum of sums) {
      const marks = marksUntil(member.marks, (12 + sum.weeks) * 7 + 2);
      const judged = judgeChange({ testId: 'sit-ups', better: 'more', marks, since: 12 * 7 });
      const change = member.levelAt((marks.at(-1)?.atDays ?? 0) / 7) - member.levelAt(12);
      sum.alarms += Number(judged.verdict === 'really better');
      sum.held += Number(judged.difference !== null && holds(judged.difference, change));
    }
  }
  return sums.map(({ weeks, alarms, held }) => ({
    weeks,
    falseAlarm: alarms / members,
    coverage: held / members,
  }));
}

/** Root mean square error of 'where the member stands now' after 3, 10, 17, … marks, in typical errors, for each way to say it. */
export function measureLevelErrors(conditions: Conditions, members: number, seed: number) {
  const random = seededRandom(seed);
  const names = [MODEL_NAME, ...PLAIN_LEVELS.map((plain) => plain.name)];
  const sums = names.map(() => 0);
  let looks = 0;
  for (let i = 0; i < members; i += 1) {
    const member = drawMember(drawLife(random), conditions, random);
    for (let end = 3; end <= member.marks.length; end += 7) {
      const marks = member.marks.slice(0, end);
      const weeks = marks.map((mark) => mark.atDays / 7);
      const series = { weeks, values: marks.map((mark) => mark.value), typicalError: PRIOR_ERROR };
      const truth = member.levelAt(weeks.at(-1) ?? 0);
      const levels = [
        judgeSitUps(marks).level?.value ?? 0,
        ...PLAIN_LEVELS.map((plain) => plain.levelOf(series)),
      ];
      levels.forEach(
        (level, at) => (sums[at] = (sums[at] ?? 0) + ((level - truth) / member.typicalError) ** 2),
      );
      looks += 1;
    }
  }
  return names.map((name, at) => ({ name, error: Math.sqrt((sums[at] ?? 0) / looks) }));
}

/** A rule's score after each mark, from the second on: above the limit it says 'really better'. */
export interface Watcher {
  readonly name: string;
  readonly usualLimit: number;
  readonly score: (marks: readonly ChangeMark[]) => number;
}

export const WATCHERS: readonly Watcher[] = [
  {
    name: MODEL_NAME,
    usualLimit: 1,
    score: (marks) => {
      const judged = judgeSitUps(marks);
      return judged.verdict === 'really better' ? 1 + judged.chanceBetter : judged.chanceBetter;
    },
  },
  ...PLAIN_RULES.map((rule) => ({
    name: rule.name,
    usualLimit: rule.usualLimit,
    score: (marks: readonly ChangeMark[]) =>
      rule.score({
        weeks: marks.map((mark) => mark.atDays / 7),
        values: marks.map((mark) => mark.value),
        typicalError: PRIOR_ERROR,
      }),
  })),
];

/** One year looked at after every mark: the score of each watcher, in order of the looks. */
export interface Year {
  readonly weeks: readonly number[];
  readonly scores: readonly (readonly number[])[];
}

/** Years of members who all follow the same path. Costs one judgement a mark and member. */
export function watchYears(path: Path, conditions: Conditions, members: number, seed: number): Year[] {
  const random = seededRandom(seed);
  return Array.from({ length: members }, () => {
    const { marks } = drawMember(path, conditions, random);
    const looks = marks.map((_, i) => marks.slice(0, i + 1)).slice(1);
    return {
      weeks: looks.map((seen) => (seen.at(-1)?.atDays ?? 0) / 7),
      scores: WATCHERS.map((watcher) => looks.map(watcher.score)),
    };
  });
}

/** Share of single looks above the limit, at test days (every fourth week) so that each counts the same. */
export function shareOfLooks(years: readonly Year[], watcher: number, limit: number): number {
  let looks = 0;
  let calls = 0;
  for (const { weeks, scores } of years) {
    weeks.forEach((week, i) => {
      if (Math.round(week) % 4 !== 0) return;
      looks += 1;
      calls += Number((scores[watcher]?.[i] ?? 0) > limit);
    });
  }
  return calls / looks;
}

/** The largest share above the limit at any one of the checked weeks. */
export function worstLook(years: readonly Year[], watcher: number, limit: number): number {
  return Math.max(
    ...CHECK_WEEKS.flatMap((check) => {
      const looks = years.flatMap(({ weeks, scores }) => {
        const at = weeks.findIndex((week) => Math.round(week) === check);
        return at < 0 ? [] : [(scores[watcher]?.[at] ?? 0) > limit];
      });
      return looks.length === 0 ? [] : [looks.filter(Boolean).length / looks.length];
    }),
  );
}

/** Share of members called better at least once in the year, looked at after every mark. */
export function shareEver(years: readonly Year[], watcher: number, limit: number): number {
  return years.filter(({ scores }) => scores[watcher]?.some((score) => score > limit)).length / years.length;
}

/** Week by which half the members have been called better; null when fewer than half are within the year. */
export function medianWeek(years: readonly Year[], watcher: number, limit: number): number | null {
  const first = years
    .map(({ weeks, scores }) => weeks[scores[watcher]?.findIndex((score) => score > limit) ?? -1] ?? Infinity)
    .sort((a, b) => a - b);
  const week = first[first.length >> 1] ?? Infinity;
  return Number.isFinite(week) ? Math.round(week) : null;
}

/** The limit at which this share of unchanged members is called better in a year. */
export function limitFor(years: readonly Year[], watcher: number, share: number): number {
  const highest = years.map(({ scores }) => Math.max(...(scores[watcher] ?? [0]))).sort((a, b) => b - a);
  return highest[Math.floor(share * highest.length)] ?? Infinity;
}

function judgeSitUps(marks: readonly ChangeMark[], today?: number): ChangeJudgement {
  return judgeChange({ testId: 'sit-ups', better: 'more', marks, today });
}

function marksUntil(marks: readonly ChangeMark[], day: number): ChangeMark[] {
  return marks.filter((mark) => mark.atDays <= day);
}

function holds({ low, high }: { low: number; high: number }, truth: number): boolean {
  return low <= truth && truth <= high;
}
