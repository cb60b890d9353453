import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LADDERS, MOVEMENTS, movementOf, rungOf, type Kit, type MovementId } from '../movement/ladders.ts';
import { setCost } from './carry.ts';
import { EMPHASES, LIMITS } from './limits.ts';
import { nextTarget, type NextTargetInput } from './next-target.ts';
import type { Done, Emphasis, Pain, Target } from './types.ts';

/** Effort of one set, and of a whole target, in units of the ladder's easiest rung. */
const setEffort = ({ rung, amount }: Target): number => setCost({ rung: rungOf(rung), amount });
const totalEffort = (target: Target): number => target.sets * setEffort(target);
/** For comparing products of the same numbers in another order. */
const TINY = 1e-6;

const emphasis = fc.constantFrom<Emphasis>('breath', 'balanced', 'muscle');
const pain = fc.constantFrom<Pain>('none', 'mild', 'strong');
const kit = fc
  .subarray<Kit>(['bar', 'chair', 'stairs', 'mat'])
  .map((have) => new Set(have) as ReadonlySet<Kit>);
const rung = fc.constantFrom(...MOVEMENTS.flatMap((movement) => LADDERS[movement].rungs));

const target: fc.Arbitrary<Target> = fc
  .record({
    rung,
    sets: fc.integer({ min: 1, max: 6 }),
    amount: fc.integer({ min: 1, max: 150 }),
    effort: fc.integer({ min: 1, max: 10 }),
  })
  .map(({ rung: on, ...rest }) => ({ ...rest, movement: movementOf(on.id), rung: on.id, unit: on.unit }));

const done: fc.Arbitrary<Done> = fc.record({
  askedTotal: fc.integer({ min: 1, max: 600 }),
  doneTotal: fc.integer({ min: 0, max: 900 }),
  effort: fc.option(fc.integer({ min: 1, max: 10 })),
  effortAsked: fc.integer({ min: 1, max: 10 }),
  pain,
});

const input: fc.Arbitrary<NextTargetInput> = fc.record(
  {
    current: target,
    history: fc.array(done, { maxLength: 4 }),
    pain,
    emphasis,
    daysSinceLast: fc.integer({ min: 0, max: 120 }),
    landingWeek: fc.boolean(),
    kit,
    ill: fc.boolean(),
    gentle: fc.boolean(),
  },
  { requiredKeys: ['current', 'history', 'pain', 'emphasis', 'daysSinceLast', 'landingWeek'] },
);

const RUNS = { numRuns: 1000 };

describe('the load, whatever comes in', () => {
  it('pain never raises it: not a set, not the effort, not the work', () => {
    fc.assert(
      fc.property(input, fc.constantFrom<Pain>('mild', 'strong'), (given, now) => {
        const { target: next, rule } = nextTarget({ ...given, pain: now });
        expect(rule).toBe('pain');
        expect(totalEffort(next)).toBeLessThanOrEqual(totalEffort(given.current) + TINY);
        expect(next.sets).toBeLessThanOrEqual(given.current.sets);
        expect(next.effort).toBeLessThanOrEqual(given.current.effort);
      }),
      RUNS,
    );
  });

  it('more pain never asks for more', () => {
    fc.assert(
      fc.property(input, (given) => {
        const [none, mild, strong] = (['none', 'mild', 'strong'] as const).map((now) =>
          totalEffort(nextTarget({ ...given, pain: now }).target),
        );
        expect(mild).toBeLessThanOrEqual(none! + TINY);
        expect(strong).toBeLessThanOrEqual(mild! + TINY);
      }),
      RUNS,
    );
  });

  it('more done never gives less asked', () => {
    fc.assert(
      fc.property(input, done, fc.integer({ min: 0, max: 300 }), (given, last, extra) => {
        const history = (doneTotal: number) => [{ ...last, doneTotal }, ...given.history];
        const fewer = nextTarget({ ...given, history: history(last.doneTotal) });
        const more = nextTarget({ ...given, history: history(last.doneTotal + extra) });
        expect(totalEffort(more.target)).toBeGreaterThanOrEqual(totalEffort(fewer.target) - TINY);
      }),
      { numRuns: 3000 },
    );
  });

  it('the same input gives the same answer, and leaves the input alone', () => {
    fc.assert(
      fc.property(input, (given) => {
        const before = structuredClone(given);
        expect(nextTarget(given)).toEqual(nextTarget(before));
        expect(given).toEqual(before);
      }),
    );
  });

  it('never jumps beyond the stated limits', () => {
    fc.assert(
      fc.property(input, (given) => {
        const { current } = given;
        const { target: next, rule } = nextTarget(given);
        expect(next.sets).toBeLessThanOrEqual(current.sets + LIMITS.setsRise);
        expect(next.effort).toBeLessThanOrEqual(current.effort + 1);
        if (next.rung === current.rung)
          expect(next.amount).toBeLessThanOrEqual(
            current.amount + Math.max(1, (current.amount * LIMITS.risePercent) / 100),
          );
        expect(setEffort(next)).toBeLessThanOrEqual(
          Math.max(
            setEffort(current) * (1 + LIMITS.rungRisePercent / 100),
            setEffort(current) + rungOf(current.rung).costPerUnit,
          ) + TINY,
        );
        // One thing rises at a time.
        if (rule === 'up-reps' || rule === 'up-rung') expect(next.sets).toBeLessThanOrEqual(current.sets);
      }),
      RUNS,
    );
  });

  it('is always something that can be asked', () => {
    fc.assert(
      fc.property(input, (given) => {
        const { target: next, why } = nextTarget(given);
        for (const value of [next.sets, next.amount, next.effort]) expect(Number.isInteger(value)).toBe(true);
        expect(Math.min(next.sets, next.amount, next.effort)).toBeGreaterThanOrEqual(1);
        expect(next.effort).toBeLessThanOrEqual(10);
        expect(next.unit).toBe(rungOf(next.rung).unit);
        expect(next.movement).toBe(given.current.movement);
        expect(why).toMatch(/^[A-Z0-9].*\.$/u);
        expect(why).not.toMatch(/NaN|undefined|null/);
      }),
      RUNS,
    );
  });
});

describe('every rung is reached both ways', () => {
  const ends = MOVEMENTS.flatMap((movement) =>
    (['breath', 'balanced', 'muscle'] as const).map((leaning) => [movement, leaning] as const),
  );
  const ALL: ReadonlySet<Kit> = new Set(['bar', 'chair', 'stairs', 'mat']);

  /** The rungs met when every session brings the same share of what was asked, from a given target. */
  function walk(start: Target, leaning: Emphasis, share: number): Set<string> {
    const met = new Set([start.rung]);
    let current = start;
    for (let session = 0; session < 400; session += 1) {
      const askedTotal = current.sets * current.amount;
      const result: Done = {
        askedTotal,
        doneTotal: Math.floor(askedTotal * share),
        effort: 6,
        effortAsked: 6,
        pain: 'none',
      };
      const next = nextTarget({
        current,
        history: [result, result],
        pain: 'none',
        emphasis: leaning,
        daysSinceLast: 2,
        landingWeek: false,
        kit: ALL,
      });
      current = next.target;
      met.add(current.rung);
    }
    return met;
  }

  const startOn = (movement: MovementId, leaning: Emphasis, end: 'first' | 'last'): Target => {
    const rungs = LADDERS[movement].rungs;
    const on = (end === 'first' ? rungs[0] : rungs.at(-1)) ?? rungs[0];
    const { sets, effort, range } = EMPHASES[leaning];
    return {
      movement,
      rung: on.id,
      sets,
      amount: range[on.unit][end === 'first' ? 0 : 1],
      unit: on.unit,
      effort,
    };
  };

  it.each(ends)('%s, %s: up', (movement, leaning) => {
    const met = walk(startOn(movement, leaning, 'first'), leaning, 1.5);
    expect([...met]).toEqual(LADDERS[movement].rungs.map(({ id }) => id));
  });

  it.each(ends)('%s, %s: down', (movement, leaning) => {
    const met = walk(startOn(movement, leaning, 'last'), leaning, 0.5);
    expect([...met]).toEqual(LADDERS[movement].rungs.map(({ id }) => id).toReversed());
  });
});
