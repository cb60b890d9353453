/**
 * Calibrates the judgement of change by simulation and prints the table; writes the same numbers to
 * src/domain/change/calibration.json for the methods page. Run: npx tsx scripts/simulate-change.ts [members].
 * The seed is fixed and no date is written, so the same code gives the same file.
 */
import { writeFileSync } from 'node:fs';
import { CALIBRATED } from '../src/domain/change/calibrated.ts';
import {
  limitFor,
  measureCoverage,
  measureLevelErrors,
  measureSinceLanding,
  medianWeek,
  MODEL_NAME,
  shareEver,
  shareOfLooks,
  WATCHERS,
  watchYears,
  worstLook,
} from './simulate-change/measure.ts';
import { CONDITIONS, gainsOverAFlight, stays, type Conditions } from './simulate-change/members.ts';

const SEED = 20_251;
const members = Number(process.argv[2] ?? 1000);
const GAINS = [1, 2, 3];
/** All rules set to this yearly share of false alarms, so that their speed can be compared. */
const EQUAL_YEARLY = 0.05;
const COMPARED = ['Clean', 'Learning', 'All three', 'Test days'].map(conditionsNamed);

const coverage = CONDITIONS.map((conditions, i) => ({
  conditions: conditions.name,
  weeks: measureCoverage(conditions, members * 3, SEED + i).map(rounded),
}));

const levels = CONDITIONS.map((conditions, i) => ({
  conditions: conditions.name,
  errors: measureLevelErrors(conditions, Math.ceil(members / 4), SEED + 50 + i).map(({ name, error }) => ({
    name,
    error: round(error),
  })),
}));

const sinceLanding = COMPARED.flatMap((conditions, i) =>
  [0, 3, 6].map((gain) => ({
    conditions: conditions.name,
    gain,
    weeks: measureSinceLanding(gainsOverAFlight(gain), conditions, Math.ceil(members / 2), SEED + 70 + i).map(
      (cell) => ({ ...cell, falseAlarm: round(cell.falseAlarm), coverage: round(cell.coverage) }),
    ),
  })),
);

const rules = COMPARED.map((conditions, i) => {
  const unchanged = watchYears(stays, conditions, members, SEED + 100 + i);
  const gained = GAINS.map((gain) =>
    watchYears(gainsOverAFlight(gain), conditions, Math.ceil(members / 2), SEED + 200 + 10 * i + gain),
  );
  return {
    conditions: conditions.name,
    rules: WATCHERS.map(({ name, usualLimit }, at) => {
      const equalLimit = limitFor(unchanged, at, EQUAL_YEARLY);
      return {
        rule: name,
        falseAlarmPerLook: round(shareOfLooks(unchanged, at, usualLimit)),
        falseAlarmWorstWeek: round(worstLook(unchanged, at, usualLimit)),
        falseAlarmInAYear: round(shareEver(unchanged, at, usualLimit)),
        noticed: GAINS.map((gain, g) => ({
          gain,
          usual: noticed(gained[g] ?? [], at, usualLimit),
          equal: noticed(gained[g] ?? [], at, equalLimit),
        })),
      };
    }),
  };
});

function noticed(years: Parameters<typeof medianWeek>[0], watcher: number, limit: number) {
  return { medianWeek: medianWeek(years, watcher, limit), inAYear: round(shareEver(years, watcher, limit)) };
}

writeFileSync(
  new URL('../src/domain/change/calibration.json', import.meta.url),
  `${JSON.stringify({ seed: SEED, members, equalYearly: EQUAL_YEARLY, constants: CALIBRATED, coverage, levels, sinceLanding, rules }, null, 2)}\n`,
);
printTables();

function printTables(): void {
  console.log(
    `Seed ${SEED}. ${members * 3} members a row of coverage, ${members} unchanged and ${Math.ceil(members / 2)} of each gain.\n`,
  );
  console.log('The 95 % interval holds the truth, level (change), by week');
  for (const row of coverage) {
    const cells = row.weeks.map((cell) => `${percent(cell.level)} (${percent(cell.change)})`);
    console.log(`${row.conditions.padEnd(12)}${cells.map((cell) => cell.padStart(16)).join('')}`);
  }
  console.log('\nWhere the member stands now: root mean square error in typical errors');
  for (const row of levels) {
    const cells = row.errors.map(({ name, error }) => `${name} ${error.toFixed(2)}`);
    console.log(`${row.conditions.padEnd(12)}${cells.join(' · ')}`);
  }
  console.log(
    '\nSince the landing at week 12, nothing gained after it: false alarms (coverage) 4, 8, 12, 24, 40 weeks on',
  );
  for (const row of sinceLanding) {
    const cells = row.weeks.map((cell) => `${percent(cell.falseAlarm)} (${percent(cell.coverage)})`);
    console.log(
      `${`${row.conditions}, gain ${row.gain}`.padEnd(20)}${cells.map((cell) => cell.padStart(16)).join('')}`,
    );
  }
  for (const table of rules) {
    console.log(
      `\n${table.conditions}: false alarms, then week by which half of the gains are noticed (share in a year)`,
    );
    console.log(
      `${''.padEnd(28)}   a look   worst  a year   gain 1 / 2 / 3 errors, usual limit | all at ${percent(EQUAL_YEARLY)} a year`,
    );
    for (const row of table.rules) {
      const weeks = (kind: 'usual' | 'equal'): string =>
        row.noticed
          .map((cell) => `${cell[kind].medianWeek ?? '-'} (${percent(cell[kind].inAYear)})`.padStart(14))
          .join('');
      const alarms = [row.falseAlarmPerLook, row.falseAlarmWorstWeek, row.falseAlarmInAYear];
      console.log(
        `${row.rule.padEnd(28)}${alarms.map((a) => percent(a).padStart(8)).join('')}${weeks('usual')} |${weeks('equal')}`,
      );
    }
  }
  const ours = rules.flatMap((table) => table.rules.filter((row) => row.rule === MODEL_NAME));
  console.log(
    `\nOurs, worst false alarm at a checked week: ${percent(Math.max(...ours.map((row) => row.falseAlarmWorstWeek)))}`,
  );
}

function conditionsNamed(name: string): Conditions {
  const found = CONDITIONS.find((conditions) => conditions.name === name);
  if (!found) throw new Error(`No conditions named ${name}`);
  return found;
}

function rounded(cell: { week: number; level: number; change: number }) {
  return { week: cell.week, level: round(cell.level), change: round(cell.change) };
}

function round(share: number): number {
  return Math.round(share * 10_000) / 10_000;
}

function percent(share: number): string {
  return `${(100 * share).toFixed(1)} %`;
}
