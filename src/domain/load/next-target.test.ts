import { describe, expect, it } from 'vitest';
import type { Kit } from '../movement/ladders.ts';
import { GENTLE_EFFORT } from './limits.ts';
import { nextTarget, type NextTargetInput } from './next-target.ts';
import type { Done, Target } from './types.ts';

const target = (change: Partial<Target> = {}): Target => ({
  movement: 'push',
  rung: 'push-up-stair-2',
  sets: 3,
  amount: 10,
  unit: 'reps',
  effort: 6,
  ...change,
});

const done = (doneTotal: number, change: Partial<Done> = {}): Done => ({
  askedTotal: 30,
  doneTotal,
  effort: 6,
  effortAsked: 6,
  pain: 'none',
  ...change,
});

const input = (change: Partial<NextTargetInput> = {}): NextTargetInput => ({
  current: target(),
  history: [done(30)],
  pain: 'none',
  emphasis: 'balanced',
  daysSinceLast: 3,
  landingWeek: false,
  ...change,
});

const hundred = (doneTotal: number): Done => done(doneTotal, { askedTotal: 100 });

describe('the rule of the practice: done over asked (common practice, no source)', () => {
  it.each([
    [99, 'down'],
    [100, 'hold'],
    [115, 'hold'],
    [116, 'up-reps'],
  ] as const)('%i %% twice running: %s', (percent, rule) => {
    expect(nextTarget(input({ history: [hundred(percent), hundred(percent)] })).rule).toBe(rule);
  });

  it('comes down to what was done', () => {
    const { target: next, why } = nextTarget(input({ history: [done(27)] }));
    expect(next.amount).toBe(9);
    expect(why).toBe('27 of 30 done, 90 %: next is 3 sets of 9 reps.');
  });

  it('falls by a fifth at most in one step, however little was done', () => {
    expect(nextTarget(input({ history: [done(0)] })).target.amount).toBe(8);
  });

  it('stays in between, with the numbers said', () => {
    expect(nextTarget(input({ history: [done(33)] }))).toEqual({
      target: target(),
      rule: 'hold',
      why: '33 of 30 done, 110 %: it stays at 3 sets of 10 reps.',
    });
  });

  it('does not go up after one good day', () => {
    expect(nextTarget(input({ history: [done(40)] })).rule).toBe('hold');
    expect(nextTarget(input({ history: [done(40), done(33)] })).rule).toBe('hold');
    expect(nextTarget(input({ history: [done(33), done(40)] })).rule).toBe('hold');
  });

  it('goes up in reps first', () => {
    const { target: next, why } = nextTarget(input({ history: [done(36), done(35)] }));
    expect(next).toEqual(target({ amount: 11 }));
    expect(why).toBe('116 % and 120 %, twice above 115 %: up to 3 sets of 11 reps.');
  });

  it.each([
    [1, 2],
    [19, 20],
    [20, 22],
    [24, 25],
  ])('a set of %i goes up to %i: a tenth, at least one, and not past the range', (amount, next) => {
    const decision = nextTarget(
      input({ emphasis: 'breath', current: target({ amount }), history: [hundred(130), hundred(130)] }),
    );
    expect(decision).toMatchObject({ rule: 'up-reps', target: { amount: next } });
  });

  it('needs two results of its own after a rise', () => {
    const afterRise = [done(40, { askedTotal: 33 }), done(40, { askedTotal: 30 })];
    expect(nextTarget(input({ current: target({ amount: 11 }), history: afterRise })).rule).toBe('hold');
  });

  it('goes to the next rung at the top of the range, at about the same effort', () => {
    const atTop = input({
      current: target({ amount: 15 }),
      history: [done(60, { askedTotal: 45 }), done(60, { askedTotal: 45 })],
    });
    const { target: next, rule, why } = nextTarget(atTop);
    expect(rule).toBe('up-rung');
    // 15 × 1.9 = 28.5; 28.5 / 2.2 = 12.95, so 13.
    expect(next).toEqual(target({ rung: 'push-up-knees', amount: 13 }));
    expect(why).toBe(
      '133 % and 133 %, twice above 115 %: next is “Push-up from the knees”, 3 sets of 13 reps.',
    );
  });

  it('goes on in reps on the last rung, to twice the range and no further', () => {
    const last = (amount: number) =>
      nextTarget(
        input({
          current: target({ rung: 'push-up-feet-stair', amount }),
          history: [hundred(130), hundred(130)],
        }),
      );
    expect(last(15)).toMatchObject({ rule: 'up-reps', target: { amount: 16 } });
    expect(last(30)).toMatchObject({ rule: 'hold', target: { amount: 30 } });
  });

  it('steps down a rung where the amount falls out of the range', () => {
    const { target: next, rule } = nextTarget(
      input({ current: target({ amount: 8 }), history: [done(21, { askedTotal: 24 })] }),
    );
    expect(rule).toBe('down');
    // 7 × 1.9 = 13.3; 13.3 / 1.4 = 9.5, so 9.
    expect(next).toMatchObject({ rung: 'push-up-stair-4', amount: 9 });
  });

  it('passes over rungs that the house does not allow', () => {
    const noStairs = input({
      current: target({ rung: 'push-up-wall', amount: 15 }),
      history: [hundred(130), hundred(130)],
      kit: new Set<Kit>(['mat']),
    });
    expect(nextTarget(noStairs).target).toMatchObject({ rung: 'push-up-knees', amount: 7 });
  });
});

describe('what stands above the rule (common practice, no source)', () => {
  it('mild pain takes a fifth and one step of effort, whatever was done', () => {
    const {
      target: next,
      rule,
      why,
    } = nextTarget(
      input({ history: [done(40, { pain: 'mild' }), done(40)], current: target({ amount: 15 }) }),
    );
    expect(rule).toBe('pain');
    expect(next).toMatchObject({ rung: 'push-up-stair-2', amount: 12, effort: 5 });
    expect(why).toBe(
      'Mild pain was reported, and pain stands above every number: next is 3 sets of 12 reps.',
    );
  });

  it('strong pain takes two fifths, the rung and two steps of effort', () => {
    const { target: next, rule } = nextTarget(input({ pain: 'strong' }));
    expect(rule).toBe('pain');
    // 6 × 1.9 = 11.4; 11.4 / 1.4 = 8.1, so 8.
    expect(next).toMatchObject({ rung: 'push-up-stair-4', amount: 8, effort: 4 });
  });

  it('takes the worse of the pain now and the pain then', () => {
    const mildNow = nextTarget(input({ pain: 'mild', history: [done(30, { pain: 'strong' })] }));
    expect(mildNow.target.rung).toBe('push-up-stair-4');
  });

  it.each([
    [9, 'hold', 10],
    [10, 'gap', 9],
    [20, 'gap', 9],
    [21, 'gap', 7],
    [41, 'gap', 7],
  ] as const)('after %i days: %s, %i reps', (daysSinceLast, rule, amount) => {
    const decision = nextTarget(input({ daysSinceLast, current: target(), emphasis: 'muscle' }));
    expect(decision.rule).toBe(rule);
    expect(decision.target.amount).toBe(amount);
  });

  it('after 42 days it comes back from six tenths', () => {
    const decision = nextTarget(input({ daysSinceLast: 42, current: target({ amount: 15 }) }));
    expect(decision.target.amount).toBe(9);
    expect(decision.why).toBe('42 days since the last time: next is 3 sets of 9 reps.');
  });

  it('an illness takes three tenths and one step of effort', () => {
    const decision = nextTarget(input({ ill: true, current: target({ amount: 15 }) }));
    expect(decision).toMatchObject({ rule: 'illness', target: { amount: 10, effort: 5 } });
  });

  it('a landing week has one set fewer, however often it is asked, and then it comes back', () => {
    const first = nextTarget(input({ landingWeek: true }));
    expect(first).toMatchObject({ rule: 'landing', target: { sets: 2, amount: 10 } });
    const second = nextTarget(input({ landingWeek: true, current: first.target }));
    expect(second.target.sets).toBe(2);
    const after = nextTarget(input({ current: second.target, history: [done(30, { askedTotal: 20 })] }));
    expect(after.target).toMatchObject({ sets: 3, amount: 10 });
  });

  it('does not raise reps in the session that brings a set back', () => {
    const twice = [done(30, { askedTotal: 20 }), done(30, { askedTotal: 20 })];
    expect(nextTarget(input({ current: target({ sets: 2 }), history: twice })).target).toMatchObject({
      sets: 3,
      amount: 10,
    });
  });

  it('keeps the sets the coach has set', () => {
    const coachSets = (sets: number, landingWeek = false) =>
      nextTarget(input({ current: target({ sets }), coachSets: sets, landingWeek })).target.sets;
    expect(coachSets(2)).toBe(2);
    expect(coachSets(2, true)).toBe(1);
    expect(coachSets(1, true)).toBe(1);
  });

  it.each([
    [7, 'hold', 10],
    [8, 'down', 9],
  ] as const)('effort %i where 6 was asked: %s', (effort, rule, amount) => {
    const decision = nextTarget(input({ history: [done(33, { effort })] }));
    expect(decision).toMatchObject({ rule, target: { amount } });
  });

  it('does not rise on two results that were too hard', () => {
    const hard = done(40, { effort: 9 });
    expect(nextTarget(input({ history: [done(40), hard] })).rule).toBe('hold');
    expect(nextTarget(input({ history: [hard, done(40)] }))).toMatchObject({
      rule: 'down',
      why: '40 of 30 done, 133 %, at effort 9 where 6 was asked: next is 3 sets of 9 reps.',
    });
  });

  it('stays gentle where the screen said so', () => {
    expect(nextTarget(input({ gentle: true })).target.effort).toBe(GENTLE_EFFORT);
  });

  it('raises effort by one step at a time', () => {
    expect(nextTarget(input({ current: target({ effort: 4 }) })).target.effort).toBe(5);
  });
});

describe('nonsense in', () => {
  it.each([
    ['nothing asked', done(30, { askedTotal: 0 })],
    ['NaN done', done(NaN)],
    ['a negative count', done(-3)],
    ['an infinite count', done(Infinity)],
  ])('%s counts as no result', (_, bad) => {
    const decision = nextTarget(input({ history: [bad] }));
    expect(decision).toMatchObject({ rule: 'hold', target: { amount: 10 } });
    expect(decision.why).toBe('No result on this rung yet: it stays at 3 sets of 10 reps.');
    expect(nextTarget(input({ history: [done(40), bad] })).rule).toBe('hold');
  });

  it('an unknown rung is an error with its name', () => {
    expect(() => nextTarget(input({ current: target({ rung: 'push-up-moon' }) }))).toThrow(
      "no rung 'push-up-moon'",
    );
  });

  it('never asks for less than one', () => {
    const one = target({ movement: 'squat', rung: 'squat-chair', amount: 1 });
    expect(nextTarget(input({ current: one, history: [done(0)], pain: 'strong' })).target.amount).toBe(1);
  });
});
