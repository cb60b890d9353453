import type Stripe from 'stripe';
import type { InvoiceDoc, LineDoc, SubscriptionDoc } from '../docs.ts';
import type { Ledger } from '../ledger.ts';
import { invoiceShape } from '../shapes/invoice.ts';
import { discountAmounts, prorationLine } from './amounts.ts';

export interface NewInvoice {
  subscription: SubscriptionDoc;
  reason: InvoiceDoc['billing_reason'];
  lines: LineDoc[];
  at: number;
  period: { start: number; end: number };
}

/** Works an invoice out and keeps nothing: totals, discounts, and the balance a customer has with us. */
export async function draftInvoice(
  ledger: Ledger,
  id: string,
  { subscription, reason, lines, at, period }: NewInvoice,
): Promise<InvoiceDoc> {
  const customer = await ledger.need('customer', subscription.customer);
  const subtotal = lines.reduce((sum, { amount }) => sum + amount, 0);
  const running = subscription.discounts.filter(({ end }) => end === null || end > at);
  const taken = await discountAmounts(ledger, running, lines);
  const total = subtotal - taken.reduce((sum, { amount }) => sum + amount, 0);
  const withBalance = total + customer.balance;
  return invoiceShape({
    id,
    at,
    customer,
    subscription,
    reason,
    lines: lines.map((line) => ({ ...line, invoice: id })),
    discountAmounts: taken,
    subtotal,
    total,
    startingBalance: customer.balance,
    endingBalance: Math.min(0, withBalance),
    amountDue: Math.max(0, withBalance),
    period,
  });
}

/** The prorations that wait for this subscription's next invoice, oldest first. */
export async function pendingItems(ledger: Ledger, subscription: string) {
  const parent = { subscription_details: { subscription } };
  return (await ledger.all('invoiceitem', { invoice: null, parent })).reverse();
}

/** The discounts that go on after an invoice: one for a single use is used up as soon as it took something off. */
async function discountsAfter(ledger: Ledger, subscription: SubscriptionDoc, invoice: InvoiceDoc) {
  const kept: SubscriptionDoc['discounts'] = [];
  for (const discount of subscription.discounts) {
    const coupon = await ledger.need('coupon', discount.source.coupon);
    const taken = invoice.total_discount_amounts?.find((one) => one.discount === discount.id)?.amount ?? 0;
    const over = discount.end !== null && discount.end <= invoice.created;
    if (!over && (coupon.duration !== 'once' || taken === 0)) kept.push(discount);
  }
  return kept;
}

/** Writes an invoice with everything that waited for it, numbers it and opens it; paying is another step. */
export async function issueInvoice(ledger: Ledger, asked: NewInvoice): Promise<InvoiceDoc> {
  const { subscription, at } = asked;
  const pending = await pendingItems(ledger, subscription.id);
  const prorations = await Promise.all(pending.map((item) => prorationLine(ledger, item)));
  const id = ledger.id('in');
  const draft = await draftInvoice(ledger, id, { ...asked, lines: [...prorations, ...asked.lines] });
  for (const item of pending) await ledger.save('invoiceitem', { ...item, invoice: id });

  const customer = await ledger.need('customer', draft.customer);
  const sequence = customer.next_invoice_sequence;
  await ledger.save('customer', {
    ...customer,
    balance: draft.ending_balance ?? 0,
    next_invoice_sequence: sequence + 1,
  });
  const open: InvoiceDoc = {
    ...draft,
    number: `${customer.invoice_prefix}-${String(sequence).padStart(4, '0')}`,
    status: 'open',
    effective_at: at,
    hosted_invoice_url: `${ledger.origin}/invoice/${id}`,
    status_transitions: { ...draft.status_transitions, finalized_at: at },
  };
  await ledger.save('invoice', open);
  const discounts = await discountsAfter(ledger, subscription, open);
  await ledger.save('subscription', { ...subscription, latest_invoice: id, discounts });
  ledger.emit('invoice.created', draft, at);
  ledger.emit('invoice.finalized', open, at);
  return open;
}

/** An invoice nobody shall pay: collection is paused, or it was withdrawn. */
export async function setAside(
  ledger: Ledger,
  invoice: InvoiceDoc,
  how: Stripe.Subscription.PauseCollection['behavior'],
  at: number,
): Promise<InvoiceDoc> {
  const moments: Record<string, [InvoiceDoc['status'], Partial<InvoiceDoc['status_transitions']>]> = {
    void: ['void', { voided_at: at }],
    mark_uncollectible: ['uncollectible', { marked_uncollectible_at: at }],
    keep_as_draft: ['draft', { finalized_at: null }],
  };
  const [status, moment] = moments[how] ?? ['void', { voided_at: at }];
  const changed: InvoiceDoc = {
    ...invoice,
    status,
    auto_advance: false,
    next_payment_attempt: null,
    status_transitions: { ...invoice.status_transitions, ...moment },
  };
  await ledger.save('invoice', changed);
  if (status === 'void') ledger.emit('invoice.voided', changed, at);
  if (status === 'uncollectible') ledger.emit('invoice.marked_uncollectible', changed, at);
  return changed;
}
