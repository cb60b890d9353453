/**
 * Prints how fast the judgement of change is. Run: npx tsx scripts/bench-domain.mjs
 * Goals: the trend of five tests over two years of weeks in 2 ms, a caseload of 200 members in 150 ms,
 * 10,000 members in 20 s, all on one core.
 */
import { judgeChange } from '../src/domain/change/judge-change.ts';
import { describePace } from '../src/domain/pace/describe-pace.ts';

const TESTS = /** @type {const} */ (['sit-ups', 'push-ups', 'stairs', 'pull-ups', 'step-test']);

/** A series that rises, levels off and wobbles, different for each seed. */
function makeMarks(weeks, everyWeeks, seed) {
  const marks = [];
  for (let week = 0; week <= weeks; week += everyWeeks) {
    const wobble = ((week * 37 + seed * 101) % 17) / 4 - 2;
    marks.push({ atDays: week * 7, value: Math.round(30 + 8 * (1 - Math.exp(-week / 12)) + wobble) });
  }
  return marks;
}

const judge = (testId, marks) =>
  judgeChange({
    testId,
    better: testId === 'step-test' ? 'less' : 'more',
    marks,
    today: marks.at(-1).atDays + 3,
  });

/** Median milliseconds of `rounds` runs, after a warm-up. */
function time(name, goalMs, rounds, run) {
  for (let i = 0; i < Math.max(2, rounds / 5); i += 1) run();
  const taken = Array.from({ length: rounds }, () => {
    const start = performance.now();
    run();
    return performance.now() - start;
  }).sort((a, b) => a - b);
  const median = taken[taken.length >> 1];
  const sign = median <= goalMs ? 'within' : 'ABOVE';
  console.log(`${name.padEnd(58)}${median.toFixed(2).padStart(10)} ms   ${sign} ${goalMs} ms`);
}

const twoYears = TESTS.map((testId, seed) => [testId, makeMarks(104, 1, seed)]);
time('Five tests over two years, weekly', 2, 200, () => twoYears.forEach(([id, marks]) => judge(id, marks)));

const caseload = Array.from({ length: 200 }, (_, seed) =>
  TESTS.slice(0, 3).map((testId) => [testId, makeMarks(26, 1, seed)]),
);
const judgeAll = (members) => members.forEach((tests) => tests.forEach(([id, marks]) => judge(id, marks)));
time('Caseload of 200 members, three tests over half a year, weekly', 150, 15, () => judgeAll(caseload));

const practice = Array.from({ length: 10_000 }, (_, seed) => caseload[seed % 200]);
time('10,000 members, three tests over half a year, weekly', 20_000, 1, () => judgeAll(practice));

const long = makeMarks(9_999, 1, 3);
time('One test with 10,000 marks', 200, 5, () => judge('sit-ups', long));

const taps = Array.from({ length: 45 }, (_, i) => i * 1300 + ((i * 7) % 5) * 40);
time('Pace of 1,000 tests of 45 reps', 100, 10, () => {
  for (let i = 0; i < 1000; i += 1) describePace({ tapsMs: taps, durationMs: 60_000 });
});
