import { describe, expect, test } from 'vitest';
import { CALIBRATED } from './calibrated.ts';
import calibration from './calibration.json' with { type: 'json' };

const ours = calibration.rules.map(({ conditions, rules }) => ({ conditions, ...rules[0] }));

test('the table was made with the constants that the code runs', () => {
  expect(calibration.constants).toEqual(JSON.parse(JSON.stringify(CALIBRATED)));
});

describe.each(ours)('$conditions: $rule', (row) => {
  test('false “really better” at any checked week and over all looks is at most 2.5 %', () => {
    expect(row.falseAlarmWorstWeek).toBeLessThanOrEqual(0.025);
    expect(row.falseAlarmPerLook).toBeLessThanOrEqual(0.025);
  });

  test('no plain rule has fewer false alarms in a year', () => {
    const others =
      calibration.rules.find(({ conditions }) => conditions === row.conditions)?.rules.slice(1) ?? [];
    expect(others.filter((other) => other.falseAlarmInAYear < (row.falseAlarmInAYear ?? 1))).toEqual([]);
  });

  test('a gain of three errors is noticed as soon as by any plain rule set to as few false alarms', () => {
    const weekOf = (noticed: typeof row.noticed): number => noticed?.[2]?.equal.medianWeek ?? Infinity;
    const others =
      calibration.rules.find(({ conditions }) => conditions === row.conditions)?.rules.slice(1) ?? [];
    expect(weekOf(row.noticed)).toBeLessThanOrEqual(
      Math.min(...others.map((other) => weekOf(other.noticed))),
    );
  });
});

describe.each(calibration.coverage)('$conditions', ({ weeks }) => {
  test('the interval of the level holds the truth in 93 to 99 of a hundred', () => {
    for (const { level } of weeks) {
      expect(level).toBeGreaterThanOrEqual(0.93);
      expect(level).toBeLessThanOrEqual(0.99);
    }
  });
});

test.each(calibration.sinceLanding)(
  'since a landing, $conditions, gain $gain before it: at most 2.5 %',
  ({ weeks }) => {
    for (const { falseAlarm } of weeks) expect(falseAlarm).toBeLessThanOrEqual(0.025);
  },
);

test.each(calibration.levels)('$conditions: the model’s level is nearest the truth', ({ errors }) => {
  const [model, ...plain] = errors;
  for (const other of plain) expect(model?.error).toBeLessThan(other.error);
});
