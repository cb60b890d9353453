import { z } from 'zod';
import { call, type Call } from '../call.ts';
import type { PortalDoc } from '../docs.ts';
import { params, text } from '../params.ts';
import { liveCustomer } from './customers.ts';

const create = call(
  'POST',
  '/v1/billing_portal/sessions',
  params({
    customer: text,
    return_url: z.url().optional(),
    locale: text.optional(),
    flow_data: z
      .strictObject({
        type: z.enum(['payment_method_update', 'subscription_cancel']),
        subscription_cancel: z.strictObject({ subscription: text }).optional(),
      })
      .optional(),
  }),
  async (ledger, asked) => {
    const customer = await liveCustomer(ledger, asked.customer);
    const id = ledger.id('bps');
    const part = { payment_method_update: '#card', subscription_cancel: '#membership' };
    const session: PortalDoc = {
      id,
      object: 'billing_portal.session',
      configuration: 'bpc_standin',
      created: await ledger.time(customer.test_clock),
      customer: customer.id,
      customer_account: null,
      flow: null,
      livemode: false,
      locale: null,
      on_behalf_of: null,
      return_url: asked.return_url ?? null,
      url: `${ledger.origin}/portal/${id}${asked.flow_data ? part[asked.flow_data.type] : ''}`,
    };
    await ledger.save('billing_portal.session', session);
    return session;
  },
);

export const portalCalls: Call[] = [create];
