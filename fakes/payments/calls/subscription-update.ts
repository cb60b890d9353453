import { z } from 'zod';
import { periodLines } from '../billing/amounts.ts';
import { planChange } from '../billing/change.ts';
import { issueInvoice } from '../billing/invoicing.ts';
import { billNow, changeSubscription, currentPeriod, renew, settle } from '../billing/lifecycle.ts';
import { call, type Call } from '../call.ts';
import type { SubscriptionDoc } from '../docs.ts';
import { badRequest } from '../fault.ts';
import type { Ledger } from '../ledger.ts';
import { mergeMetadata, metadata, moment, momentOrNow, params, text, unsettable, yesNo } from '../params.ts';
import {
  changedDiscounts,
  coupons,
  orDefault,
  prorationBehaviour,
  quantity,
  trialSettings,
} from './subscriptions.ts';

export const itemChanges = z.array(
  z.strictObject({
    id: text.optional(),
    price: text.optional(),
    quantity,
    deleted: yesNo.optional(),
  }),
);

const schema = params({
  items: itemChanges.optional(),
  proration_behavior: prorationBehaviour,
  proration_date: moment.optional(),
  cancel_at_period_end: yesNo.optional(),
  cancel_at: z.union([z.literal(''), moment]).optional(),
  cancellation_details: z
    .strictObject({ comment: unsettable.optional(), feedback: unsettable.optional() })
    .optional(),
  pause_collection: z
    .union([
      z.literal(''),
      z.strictObject({
        behavior: z.enum(['void', 'keep_as_draft', 'mark_uncollectible']),
        resumes_at: moment.optional(),
      }),
    ])
    .optional(),
  trial_end: momentOrNow.optional(),
  trial_settings: trialSettings,
  default_payment_method: text.optional(),
  discounts: coupons,
  description: unsettable.optional(),
  metadata: metadata.optional(),
});

type Asked = z.output<typeof schema>;

/** The fields that are set as they come. */
function plainChange(before: SubscriptionDoc, asked: Asked, at: number): Partial<SubscriptionDoc> {
  const { cancel_at_period_end: ends, cancel_at: endsAt, pause_collection: pause } = asked;
  const details = before.cancellation_details;
  const missing = asked.trial_settings?.end_behavior.missing_payment_method;
  return {
    ...(ends !== undefined && {
      cancel_at_period_end: ends,
      cancel_at: ends ? currentPeriod(before).end : null,
      canceled_at: ends ? at : null,
      cancellation_details: {
        comment: ends ? (asked.cancellation_details?.comment ?? null) : null,
        feedback: ends ? (asked.cancellation_details?.feedback ?? null) : null,
        feedback_option: null,
        reason: ends
          ? 'cancellation_requested'
          : details?.reason === 'cancellation_requested'
            ? null
            : (details?.reason ?? null),
      },
    }),
    ...(endsAt !== undefined && { cancel_at: endsAt || null, canceled_at: endsAt ? at : null }),
    ...(pause !== undefined && {
      pause_collection: pause ? { behavior: pause.behavior, resumes_at: pause.resumes_at ?? null } : null,
    }),
    ...(missing && {
      trial_settings: { end_behavior: { billing_cycle_anchor: null, missing_payment_method: missing } },
    }),
    ...(asked.default_payment_method && { default_payment_method: asked.default_payment_method }),
    ...(asked.description !== undefined && { description: asked.description }),
    ...(asked.metadata !== undefined && { metadata: mergeMetadata(before.metadata, asked.metadata) }),
  };
}

/** A new end of the trial moves the period's end and the day of every later renewal. */
function trialChange(before: SubscriptionDoc, trialEnd: number, at: number): Partial<SubscriptionDoc> {
  const data = before.items.data.map((item) => ({
    ...item,
    current_period_start: at,
    current_period_end: trialEnd,
  }));
  return {
    status: 'trialing',
    trial_start: before.trial_start ?? at,
    trial_end: trialEnd,
    billing_cycle_anchor: trialEnd,
    items: { ...before.items, data },
  };
}

async function changeItems(ledger: Ledger, before: SubscriptionDoc, asked: Asked, at: number): Promise<void> {
  const behaviour = orDefault(asked.proration_behavior);
  const change = await planChange(ledger, before, asked.items ?? [], asked.proration_date ?? at, behaviour);
  for (const item of change.prorations) await ledger.save('invoiceitem', item);
  const after = await changeSubscription(
    ledger,
    before.id,
    {
      items: { ...before.items, data: change.items },
      ...(change.startsAnew && { billing_cycle_anchor: at }),
    },
    at,
  );
  const attempt = { at, present: false, counted: true };
  const asks = {
    subscription: after,
    reason: 'subscription_update',
    at,
    period: { start: at, end: at },
  } as const;
  if (change.startsAnew) {
    await billNow(ledger, { ...asks, lines: await periodLines(ledger, after, false) }, attempt);
  } else if (behaviour === 'always_invoice' && change.prorations.length > 0) {
    await settle(ledger, await issueInvoice(ledger, { ...asks, lines: [] }), attempt);
  }
}

const update = call('POST', '/v1/subscriptions/:id', schema, async (ledger, asked, id) => {
  const before = await ledger.need('subscription', id);
  const at = await ledger.time(before.test_clock);
  if (before.status === 'canceled' || before.status === 'incomplete_expired') {
    throw badRequest('A canceled subscription can only update its cancellation_details and metadata.');
  }
  if (asked.default_payment_method) await ledger.need('payment_method', asked.default_payment_method);
  let change = plainChange(before, asked, at);
  if (asked.discounts !== undefined) {
    const given = { customer: before.customer, subscription: id, at };
    change = { ...change, discounts: await changedDiscounts(ledger, asked.discounts, given) };
  }
  if (typeof asked.trial_end === 'number') {
    if (asked.trial_end <= at) throw badRequest('The trial end must lie ahead.', { param: 'trial_end' });
    change = { ...change, ...trialChange(before, asked.trial_end, at) };
  }
  const changed = await changeSubscription(ledger, id, change, at);
  if (asked.items) await changeItems(ledger, changed, asked, at);
  if (asked.trial_end === 'now' && changed.status === 'trialing') {
    await ledger.save('subscription', { ...changed, trial_end: at, billing_cycle_anchor: at });
    await renew(ledger, await ledger.need('subscription', id), at);
  }
  return ledger.need('subscription', id);
});

export const subscriptionUpdateCalls: Call[] = [update];
