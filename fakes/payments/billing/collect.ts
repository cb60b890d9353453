import { chargeFault } from '../cards.ts';
import type { InvoiceDoc, PaymentMethodDoc, SubscriptionDoc } from '../docs.ts';
import { badRequest, type Fault } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { chargeShape, paymentIntentShape } from '../shapes/payment.ts';
import { DAY_SECONDS } from './periods.ts';

/** Days after the first failure on which the card is tried again; after the last the subscription ends. */
const RETRY_DAYS = [3, 5, 7] as const;

export interface Attempt {
  at: number;
  /** Whether the card's owner sits before the page. */
  present: boolean;
  /** Whether the ladder of retries counts it: its own attempts, and whoever makes the first. */
  counted: boolean;
  /** Another card than the one on file. */
  method?: PaymentMethodDoc | undefined;
}

/** The card that pays: the subscription's own, else the customer's default. */
export async function cardOnFile(
  ledger: Ledger,
  subscription: SubscriptionDoc,
): Promise<PaymentMethodDoc | null> {
  const customer = await ledger.find('customer', subscription.customer);
  const id = subscription.default_payment_method ?? customer?.invoice_settings.default_payment_method;
  return id ? ledger.find('payment_method', id) : null;
}

/** Writes the payment intent and, when there is a card, the charge. */
async function writePayment(
  ledger: Ledger,
  invoice: InvoiceDoc,
  method: PaymentMethodDoc | null,
  fault: Fault | null,
  at: number,
): Promise<string> {
  const known = invoice.payments.data[0]?.payment.payment_intent;
  const intent = typeof known === 'string' ? known : ledger.id('pi');
  const charge = method && chargeShape({ id: ledger.id('ch'), at, intent, invoice, method, fault });
  if (charge) {
    await ledger.save('charge', charge);
    ledger.emit(fault ? 'charge.failed' : 'charge.succeeded', charge, at);
  }
  const payment = paymentIntentShape({ id: intent, at, invoice, method, charge: charge?.id ?? null, fault });
  await ledger.save('payment_intent', payment);
  ledger.emit(fault ? 'payment_intent.payment_failed' : 'payment_intent.succeeded', payment, at);
  return intent;
}

function withPayment(
  ledger: Ledger,
  invoice: InvoiceDoc,
  intent: string,
  paid: boolean,
  at: number,
): InvoiceDoc {
  const [known] = invoice.payments.data;
  const payment: InvoiceDoc['payments']['data'][number] = {
    id: known?.id ?? ledger.id('inpay'),
    object: 'invoice_payment',
    amount_paid: paid ? invoice.amount_due : null,
    amount_requested: invoice.amount_due,
    created: known?.created ?? at,
    currency: invoice.currency,
    invoice: invoice.id,
    is_default: true,
    livemode: false,
    payment: { type: 'payment_intent', payment_intent: intent },
    status: paid ? 'paid' : 'open',
    status_transitions: { canceled_at: null, paid_at: paid ? at : null },
  };
  return { ...invoice, payments: { ...invoice.payments, data: [payment] } };
}

function nextAttempt(invoice: InvoiceDoc, attempts: number): number | null {
  const days = RETRY_DAYS[attempts - 1];
  const first = invoice.status_transitions.finalized_at ?? invoice.created;
  return days === undefined ? null : first + days * DAY_SECONDS;
}

async function markPaid(ledger: Ledger, invoice: InvoiceDoc, at: number): Promise<InvoiceDoc> {
  const paid: InvoiceDoc = {
    ...invoice,
    status: 'paid',
    amount_paid: invoice.amount_due,
    amount_remaining: 0,
    attempted: true,
    next_payment_attempt: null,
    status_transitions: { ...invoice.status_transitions, paid_at: at },
  };
  await ledger.save('invoice', paid);
  ledger.emit('invoice.paid', paid, at);
  ledger.emit('invoice.payment_succeeded', paid, at);
  return paid;
}

/**
 * Tries to get an open invoice paid. The subscription's state is the caller's to set.
 * @returns the invoice as it now is, and the bank's refusal if there was one
 */
export async function collect(
  ledger: Ledger,
  invoice: InvoiceDoc,
  subscription: SubscriptionDoc,
  { at, present, counted, method: given }: Attempt,
): Promise<{ invoice: InvoiceDoc; fault: Fault | null }> {
  const counts = counted || invoice.attempt_count === 0;
  const tried = { ...invoice, attempt_count: invoice.attempt_count + (counts ? 1 : 0) };
  if (invoice.amount_due === 0) return { invoice: await markPaid(ledger, tried, at), fault: null };
  const method = given ?? (await cardOnFile(ledger, subscription));
  const fault = method
    ? chargeFault(method, present)
    : badRequest('This customer has no attached payment source or default payment method.', {
        code: 'resource_missing',
      });
  const intent = await writePayment(ledger, tried, method, fault, at);
  const noted = withPayment(ledger, tried, intent, fault === null, at);
  if (!fault) return { invoice: await markPaid(ledger, noted, at), fault: null };
  const failed: InvoiceDoc = {
    ...noted,
    attempted: true,
    next_payment_attempt: counts ? nextAttempt(noted, noted.attempt_count) : noted.next_payment_attempt,
  };
  await ledger.save('invoice', failed);
  ledger.emit('invoice.payment_failed', failed, at);
  return { invoice: failed, fault };
}
