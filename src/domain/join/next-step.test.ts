import { describe, expect, it } from 'vitest';
import { JOIN_STEPS, joinPath, nextJoinStep, type JoinFacts } from './next-step.ts';

const facts = (change: Partial<JoinFacts> = {}): JoinFacts => ({
  signedIn: true,
  screened: true,
  held: false,
  house: true,
  planChosen: true,
  paid: false,
  ...change,
});

/** Every combination of the six facts. */
const ALL_FACTS: JoinFacts[] = Array.from({ length: 64 }, (_, bits) => {
  const bit = (n: number): boolean => (bits & (1 << n)) !== 0;
  return {
    signedIn: bit(0),
    screened: bit(1),
    held: bit(2),
    house: bit(3),
    planChosen: bit(4),
    paid: bit(5),
  };
});

describe('where joining goes on', () => {
  it.each([
    ['nobody signed in', { signedIn: false }, 'address'],
    ['not screened', { screened: false }, 'readiness'],
    ['held', { held: true }, 'answer'],
    ['no house', { house: false }, 'house'],
    ['no plan', { planChosen: false }, 'plan'],
    ['not paid', {}, 'payment'],
    ['paid', { paid: true }, 'done'],
    ['paid, then held', { paid: true, held: true }, 'done'],
    ['paid, no house', { paid: true, house: false }, 'house'],
    ['answers run out', { paid: true, screened: false }, 'readiness'],
  ] as const)('%s: %s', (_, change, step) => {
    expect(nextJoinStep(facts(change))).toBe(step);
  });

  it('never leads a held person who has not paid to the plan or the payment', () => {
    const held = ALL_FACTS.filter((given) => given.held && !given.paid);
    expect(held).toHaveLength(16);
    for (const given of held) expect(['address', 'readiness', 'answer']).toContain(nextJoinStep(given));
  });

  it('never charges anybody who is not screened, and is never done without a payment', () => {
    for (const given of ALL_FACTS) {
      const step = nextJoinStep(given);
      if (step === 'payment')
        expect(given).toMatchObject({ signedIn: true, screened: true, held: false, house: true });
      if (step === 'done') expect(given).toMatchObject({ paid: true, screened: true, house: true });
    }
  });

  it('has six steps, each with its page', () => {
    expect(JOIN_STEPS.map(({ label }) => label)).toEqual([
      'Address',
      'Readiness',
      'Answer',
      'House',
      'Plan',
      'Payment',
    ]);
    expect(JOIN_STEPS.map(({ id }) => joinPath(id))).toEqual([
      '/join',
      '/join/readiness',
      '/join/result',
      '/join/house',
      '/join/plan',
      '/join/payment',
    ]);
  });
});
