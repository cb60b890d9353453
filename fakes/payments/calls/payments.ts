import { z } from 'zod';
import { attachMethod, methodBehind } from '../cards.ts';
import { call, pageOf, type Call } from '../call.ts';
import type { ChargeDoc, RefundDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, mergeMetadata, metadata, params, text, whole } from '../params.ts';
import { liveCustomer } from './customers.ts';

const attach = call(
  'POST',
  '/v1/payment_methods/:id/attach',
  params({ customer: text }),
  async (ledger, asked, id) => {
    const customer = await liveCustomer(ledger, asked.customer);
    const at = await ledger.time(customer.test_clock);
    return attachMethod(ledger, await methodBehind(ledger, id, at), customer.id, at);
  },
);

const detach = call('POST', '/v1/payment_methods/:id/detach', params({}), async (ledger, _asked, id) => {
  const method = await ledger.need('payment_method', id);
  const customer = method.customer ? await ledger.find('customer', method.customer) : null;
  const detached = { ...method, customer: null };
  await ledger.save('payment_method', detached);
  if (customer?.invoice_settings.default_payment_method === id) {
    const settings = { ...customer.invoice_settings, default_payment_method: null };
    await ledger.save('customer', { ...customer, invoice_settings: settings });
  }
  ledger.emit('payment_method.detached', detached, await ledger.time(customer?.test_clock ?? null));
  return detached;
});

async function chargeFor(
  ledger: Ledger,
  asked: { charge?: string | undefined; payment_intent?: string | undefined },
): Promise<ChargeDoc> {
  if (asked.charge) return ledger.need('charge', asked.charge, 'charge');
  if (!asked.payment_intent) {
    throw badRequest('One of the following params should be provided: payment_intent or charge.', {
      code: 'parameter_missing',
    });
  }
  const intent = await ledger.need('payment_intent', asked.payment_intent, 'payment_intent');
  if (!intent.latest_charge)
    throw badRequest('This PaymentIntent does not have a successful charge to refund.');
  return ledger.need('charge', intent.latest_charge);
}

const refund = call(
  'POST',
  '/v1/refunds',
  params({
    charge: text.optional(),
    payment_intent: text.optional(),
    amount: whole.refine((amount) => amount > 0, 'above 0').optional(),
    reason: z.enum(['duplicate', 'fraudulent', 'requested_by_customer']).optional(),
    metadata: metadata.optional(),
  }),
  async (ledger, asked) => {
    const charge = await chargeFor(ledger, asked);
    if (!charge.paid) throw badRequest('This charge did not succeed and cannot be refunded.');
    const left = charge.amount - charge.amount_refunded;
    if (left === 0) {
      throw badRequest(`Charge ${charge.id} has already been refunded.`, { code: 'charge_already_refunded' });
    }
    const amount = asked.amount ?? left;
    if (amount > left) {
      throw badRequest(`Refund amount (${amount}) is greater than unrefunded amount on charge (${left})`, {
        param: 'amount',
      });
    }
    const customer = charge.customer ? await ledger.find('customer', charge.customer) : null;
    const at = await ledger.time(customer?.test_clock ?? null);
    const made: RefundDoc = {
      id: ledger.id('re'),
      object: 'refund',
      amount,
      balance_transaction: null,
      charge: charge.id,
      created: at,
      currency: charge.currency,
      customer: charge.customer,
      customer_account: null,
      metadata: mergeMetadata({}, asked.metadata),
      payment_intent: charge.payment_intent,
      payment_method: charge.payment_method,
      reason: asked.reason ?? null,
      receipt_number: null,
      source_transfer_reversal: null,
      status: 'succeeded',
      transfer_reversal: null,
    };
    const refunded: ChargeDoc = {
      ...charge,
      amount_refunded: charge.amount_refunded + amount,
      refunded: amount === left,
    };
    await ledger.save('refund', made);
    await ledger.save('charge', refunded);
    ledger.emit('refund.created', made, at);
    ledger.emit('charge.refunded', refunded, at, { amount_refunded: charge.amount_refunded });
    return made;
  },
);

const ofCustomer = (customer: string | undefined) => (customer ? { customer } : {});

export const paymentCalls: Call[] = [
  attach,
  detach,
  call('GET', '/v1/payment_methods/:id', params({}), (ledger, _asked, id) =>
    ledger.need('payment_method', id),
  ),
  call(
    'GET',
    '/v1/payment_methods',
    listParams({ customer: text, type: z.literal('card').optional() }),
    async (ledger, { customer, ...paging }) =>
      pageOf('/v1/payment_methods', await ledger.all('payment_method', { customer }), paging),
  ),
  call(
    'GET',
    '/v1/customers/:id/payment_methods',
    listParams({ type: z.literal('card').optional() }),
    async (ledger, paging, id) =>
      pageOf(
        `/v1/customers/${id}/payment_methods`,
        await ledger.all('payment_method', { customer: id }),
        paging,
      ),
  ),
  call('GET', '/v1/payment_intents/:id', params({}), (ledger, _asked, id) =>
    ledger.need('payment_intent', id),
  ),
  call('GET', '/v1/charges/:id', params({}), (ledger, _asked, id) => ledger.need('charge', id)),
  call(
    'GET',
    '/v1/charges',
    listParams({ customer: text.optional(), payment_intent: text.optional() }),
    async (ledger, { customer, payment_intent: intent, ...paging }) =>
      pageOf(
        '/v1/charges',
        await ledger.all('charge', { ...ofCustomer(customer), ...(intent && { payment_intent: intent }) }),
        paging,
      ),
  ),
  refund,
  call('GET', '/v1/refunds/:id', params({}), (ledger, _asked, id) => ledger.need('refund', id)),
  call(
    'GET',
    '/v1/refunds',
    listParams({ charge: text.optional(), payment_intent: text.optional() }),
    async (ledger, { charge, payment_intent: intent, ...paging }) =>
      pageOf(
        '/v1/refunds',
        await ledger.all('refund', { ...(charge && { charge }), ...(intent && { payment_intent: intent }) }),
        paging,
      ),
  ),
];
