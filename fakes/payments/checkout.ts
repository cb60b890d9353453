import { startSubscription } from './billing/start.ts';
import { createCustomer, setDefaultCard } from './calls/customers.ts';
import { createMethod, type TestCard } from './cards.ts';
import type { CheckoutDoc } from './docs.ts';
import { badRequest } from './fault.ts';
import type { Ledger } from './ledger.ts';

/** The time of the person at the checkout page. */
export async function checkoutTime(ledger: Ledger, session: CheckoutDoc): Promise<number> {
  const customer = session.customer ? await ledger.find('customer', session.customer) : null;
  return ledger.time(customer?.test_clock ?? null);
}

/** Where the page leads after success. */
export const successUrl = (session: CheckoutDoc): string =>
  (session.success_url ?? '/').replaceAll('{CHECKOUT_SESSION_ID}', session.id);

/**
 * The card was accepted and its owner is present: makes the customer if need be, the card on file, the subscription,
 * and completes the session. Must run in a transaction.
 * @throws Fault when the card is refused; nothing is kept then, and the page stays open
 */
export async function completeCheckout(
  ledger: Ledger,
  session: CheckoutDoc,
  card: TestCard,
  email: string | null,
): Promise<CheckoutDoc> {
  if (session.status !== 'open') throw badRequest('This page is closed.');
  const at = await checkoutTime(ledger, session);
  const plan = await ledger.need('checkout_plan', session.id);
  const address = session.customer_email ?? email;
  const customer = session.customer
    ? await ledger.need('customer', session.customer)
    : await createCustomer(ledger, { email: address });
  const method = await createMethod(ledger, card, at, { email: customer.email });
  const { subscription, fault } = await startSubscription(ledger, {
    customer: customer.id,
    prices: session.line_items.data.map(({ price, quantity }) => ({ price, quantity: quantity ?? 1 })),
    at,
    trialDays: plan.trial_end_days,
    trialEnd: plan.trial_end,
    metadata: plan.metadata,
    description: plan.description,
    method,
    missingCard: plan.missing_card,
    coupons: plan.coupons,
    session: session.id,
  });
  if (fault) throw fault;
  await ledger.save(
    'customer',
    await setDefaultCard(ledger, await ledger.need('customer', customer.id), method.id),
  );
  const done: CheckoutDoc = {
    ...session,
    status: 'complete',
    url: null,
    customer: customer.id,
    subscription: subscription.id,
    invoice: subscription.latest_invoice,
    payment_status: session.amount_total === 0 ? 'no_payment_required' : 'paid',
    customer_details: {
      address: null,
      business_name: null,
      email: customer.email,
      individual_name: null,
      name: customer.name ?? null,
      phone: null,
      tax_exempt: 'none',
      tax_ids: [],
    },
  };
  await ledger.save('checkout.session', done);
  ledger.emit('checkout.session.completed', done, at);
  return done;
}
