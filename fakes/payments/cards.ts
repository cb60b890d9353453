import type { PaymentMethodDoc } from './docs.ts';
import { badRequest, Fault } from './fault.ts';
import type { Ledger } from './ledger.ts';

/** What a test card does; numbers as published in the provider's testing guide (memory). */
export interface TestCard {
  choice: 'succeeds' | 'declined' | 'authenticate' | 'fails-later';
  number: string;
  brand: 'visa';
  label: string;
  /** The name that the provider's SDK examples use for it. */
  token: string;
}

export const TEST_CARDS: readonly TestCard[] = [
  {
    choice: 'succeeds',
    number: '4242424242424242',
    brand: 'visa',
    label: 'Succeeds',
    token: 'pm_card_visa',
  },
  {
    choice: 'declined',
    number: '4000000000000002',
    brand: 'visa',
    label: 'Is declined',
    token: 'pm_card_visa_chargeDeclined',
  },
  {
    choice: 'authenticate',
    number: '4000002500003155',
    brand: 'visa',
    label: 'Needs authentication',
    token: 'pm_card_authenticationRequiredOnSetup',
  },
  {
    choice: 'fails-later',
    number: '4000000000000341',
    brand: 'visa',
    label: 'Succeeds now, fails at the next renewal',
    token: 'pm_card_chargeCustomerFail',
  },
];

export const cardByNumber = (typed: string): TestCard | undefined =>
  TEST_CARDS.find(({ number }) => number === typed.replace(/[\s-]/g, ''));

export const cardByChoice = (choice: string): TestCard | undefined =>
  TEST_CARDS.find((card) => card.choice === choice);

/** `4242 4242 4242 4242` */
export const inFours = (number: string) => number.replace(/(\d{4})(?=\d)/g, '$1 ');

const behaviourOf = (method: PaymentMethodDoc): TestCard['choice'] =>
  TEST_CARDS.find(({ number }) => number.endsWith(method.card.last4))?.choice ?? 'succeeds';

export const declined = () =>
  new Fault(402, 'card_error', 'Your card was declined.', {
    code: 'card_declined',
    decline_code: 'generic_decline',
  });

/**
 * What the bank says to a charge.
 * @param present whether the card's owner sits before the page (and has approved, where the bank asks)
 * @returns null when the money moves
 */
export function chargeFault(method: PaymentMethodDoc, present: boolean): Fault | null {
  const behaviour = behaviourOf(method);
  if (behaviour === 'declined') return declined();
  return behaviour === 'fails-later' && !present ? declined() : null;
}

/** Makes a card on file, attached to nobody yet. */
export async function createMethod(
  ledger: Ledger,
  { number, brand }: TestCard,
  at: number,
  billing: { name?: string | null; email?: string | null } = {},
): Promise<PaymentMethodDoc> {
  const method: PaymentMethodDoc = {
    id: ledger.id('pm'),
    object: 'payment_method',
    allow_redisplay: 'unspecified',
    billing_details: {
      address: null,
      email: billing.email ?? null,
      name: billing.name ?? null,
      phone: null,
      tax_id: null,
    },
    card: {
      brand,
      checks: null,
      country: 'IE',
      display_brand: brand,
      exp_month: 12,
      exp_year: new Date(at * 1000).getUTCFullYear() + 5,
      funding: 'credit',
      generated_from: null,
      last4: number.slice(-4),
      networks: { available: [brand], preferred: null },
      regulated_status: 'regulated',
      three_d_secure_usage: { supported: true },
      wallet: null,
    },
    created: at,
    customer: null,
    customer_account: null,
    livemode: false,
    metadata: {},
    type: 'card',
  };
  await ledger.save('payment_method', method);
  return method;
}

/** The card behind an id, or a fresh one for a test token such as `pm_card_visa`. @throws Fault 404 */
export async function methodBehind(ledger: Ledger, id: string, at: number): Promise<PaymentMethodDoc> {
  const card = TEST_CARDS.find(({ token }) => token === id);
  return card ? createMethod(ledger, card, at) : ledger.need('payment_method', id, 'payment_method');
}

/** Puts a card on a customer's file. @throws Fault when it is another customer's, or the bank refuses it at once */
export async function attachMethod(
  ledger: Ledger,
  method: PaymentMethodDoc,
  customer: string,
  at: number,
): Promise<PaymentMethodDoc> {
  if (method.customer === customer) return method;
  if (method.customer) {
    throw badRequest('The payment method is already attached to another customer.', {
      param: 'payment_method',
    });
  }
  if (behaviourOf(method) === 'declined') throw declined();
  const attached = { ...method, customer };
  await ledger.save('payment_method', attached);
  ledger.emit('payment_method.attached', attached, at);
  return attached;
}
