import { z } from 'zod';
import { attachMethod, methodBehind } from '../cards.ts';
import { call, pageOf, type Call } from '../call.ts';
import { endSubscription } from '../billing/lifecycle.ts';
import type { CustomerDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { listParams, mergeMetadata, metadata, params, text, unsettable, whole } from '../params.ts';
import { customerShape } from '../shapes/customer.ts';

const FIELDS = {
  email: unsettable.optional(),
  name: unsettable.optional(),
  phone: unsettable.optional(),
  description: unsettable.optional(),
  metadata: metadata.optional(),
  balance: whole.optional(),
  invoice_settings: z.strictObject({ default_payment_method: text.optional() }).optional(),
};

/** Keys with a value given; `undefined` would wipe what is there. */
const given = <T extends object>(fields: T) =>
  Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined)) as Partial<T>;

const emailShape = z.union([z.null(), z.email()]);

function checkEmail(email: string | null | undefined): void {
  if (email !== undefined && !emailShape.safeParse(email).success) {
    throw badRequest(`Invalid email address: ${String(email)}`, { code: 'email_invalid', param: 'email' });
  }
}

/** A customer who was not deleted. @throws Fault 404 */
export const liveCustomer = (ledger: Ledger, id: string, param = 'customer'): Promise<CustomerDoc> =>
  ledger.need('customer', id, param);

/** Makes a customer's card the one that pays. @throws Fault when it is not theirs */
export async function setDefaultCard(
  ledger: Ledger,
  customer: CustomerDoc,
  method: string,
): Promise<CustomerDoc> {
  const card = await ledger.need('payment_method', method, 'invoice_settings[default_payment_method]');
  if (card.customer !== customer.id) {
    throw badRequest('The payment method must be attached to the customer first.', {
      param: 'invoice_settings[default_payment_method]',
    });
  }
  return { ...customer, invoice_settings: { ...customer.invoice_settings, default_payment_method: method } };
}

interface NewCustomer {
  email?: string | null | undefined;
  name?: string | null | undefined;
  phone?: string | null | undefined;
  description?: string | null | undefined;
  metadata?: Record<string, string>;
  testClock?: string | null | undefined;
}

export async function createCustomer(ledger: Ledger, asked: NewCustomer): Promise<CustomerDoc> {
  checkEmail(asked.email ?? null);
  const at = await ledger.time(asked.testClock ?? null);
  const id = ledger.id('cus');
  const customer = customerShape({ ...asked, id, at, invoicePrefix: id.slice(-8).toUpperCase() });
  await ledger.save('customer', customer);
  ledger.emit('customer.created', customer, at);
  return customer;
}

const create = call(
  'POST',
  '/v1/customers',
  params({ ...FIELDS, payment_method: text.optional(), test_clock: text.optional() }),
  async (ledger, asked) => {
    const customer = await createCustomer(ledger, {
      ...asked,
      metadata: mergeMetadata({}, asked.metadata),
      testClock: asked.test_clock,
    });
    if (!asked.payment_method) return customer;
    const method = await methodBehind(ledger, asked.payment_method, customer.created);
    await attachMethod(ledger, method, customer.id, customer.created);
    if (!asked.invoice_settings?.default_payment_method) return customer;
    const paying = await setDefaultCard(ledger, customer, method.id);
    await ledger.save('customer', paying);
    return paying;
  },
);

const update = call('POST', '/v1/customers/:id', params(FIELDS), async (ledger, asked, id) => {
  const before = await liveCustomer(ledger, id, 'id');
  checkEmail(asked.email);
  const { metadata: newMetadata, invoice_settings: settings, ...plain } = asked;
  let after: CustomerDoc = {
    ...before,
    ...given({ ...plain, expand: undefined }),
    metadata: mergeMetadata(before.metadata, newMetadata),
  };
  if (settings?.default_payment_method)
    after = await setDefaultCard(ledger, after, settings.default_payment_method);
  await ledger.save('customer', after);
  ledger.emit('customer.updated', after, await ledger.time(after.test_clock));
  return after;
});

const remove = call('DELETE', '/v1/customers/:id', params({}), async (ledger, _asked, id) => {
  const customer = await liveCustomer(ledger, id, 'id');
  const at = await ledger.time(customer.test_clock);
  for (const { id: subscription, status } of await ledger.all('subscription', { customer: id })) {
    if (status === 'canceled' || status === 'incomplete_expired') continue;
    await endSubscription(ledger, subscription, 'cancellation_requested', at);
  }
  const deleted = { id, object: 'customer', deleted: true } as const;
  ledger.emit('customer.deleted', customer, at);
  await ledger.remove('customer', id);
  await ledger.save('deleted_customer', deleted);
  return deleted;
});

export const customerCalls: Call[] = [
  create,
  update,
  remove,
  call(
    'GET',
    '/v1/customers',
    listParams({ email: text.optional(), test_clock: text.optional() }),
    async (ledger, asked) =>
      pageOf(
        '/v1/customers',
        await ledger.all('customer', given({ email: asked.email, test_clock: asked.test_clock })),
        asked,
      ),
  ),
  call('GET', '/v1/customers/:id', params({}), async (ledger, _asked, id) => {
    const deleted = await ledger.find('deleted_customer', id);
    return deleted ?? ledger.need('customer', id);
  }),
];
