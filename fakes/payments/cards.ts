import type { Doc } from '../core/doc-store.ts';

export type CardBehaviour = 'succeeds' | 'is declined' | 'needs authentication' | 'fails at the next renewal';

/** The provider's published test numbers that this stand-in understands. */
export const CARDS: readonly { number: string; behaviour: CardBehaviour }[] = [
  { number: '4242424242424242', behaviour: 'succeeds' },
  { number: '4000000000000002', behaviour: 'is declined' },
  { number: '4000002500003155', behaviour: 'needs authentication' },
  { number: '4000000000000341', behaviour: 'fails at the next renewal' },
];

export interface PaymentMethod extends Doc {
  id: string;
  customer: string;
  card: { brand: string; last4: string; exp_month: number; exp_year: number };
  _behaviour: CardBehaviour;
}

/** Reads a number as typed, with or without gaps; null when it is none of ours. */
export const cardOf = (typed: string) =>
  CARDS.find(({ number }) => number === typed.replace(/[\s-]/g, '')) ?? null;

export const newPaymentMethod = (
  id: string,
  customer: string,
  number: string,
  behaviour: CardBehaviour,
): PaymentMethod => ({
  id,
  object: 'payment_method',
  type: 'card',
  customer,
  card: { brand: 'visa', last4: number.slice(-4), exp_month: 12, exp_year: 2034 },
  metadata: {},
  _behaviour: behaviour,
});
