import type { ItemDoc, PriceDoc, SubscriptionDoc } from '../docs.ts';
import { listOf } from '../call.ts';

/** The older object that still hangs beside every price. */
const planOf = (price: PriceDoc) => ({
  id: price.id,
  object: 'plan',
  active: price.active,
  amount: price.unit_amount,
  amount_decimal: price.unit_amount_decimal,
  billing_scheme: price.billing_scheme,
  created: price.created,
  currency: price.currency,
  interval: price.recurring?.interval ?? 'month',
  interval_count: price.recurring?.interval_count ?? 1,
  livemode: false,
  metadata: price.metadata,
  meter: null,
  nickname: price.nickname,
  product: price.product,
  tiers_mode: null,
  transform_usage: null,
  trial_period_days: null,
  usage_type: 'licensed',
});

interface ItemParts {
  id: string;
  at: number;
  subscription: string;
  price: PriceDoc;
  quantity: number;
  periodStart: number;
  periodEnd: number;
}

export function itemShape(parts: ItemParts): ItemDoc {
  return {
    id: parts.id,
    object: 'subscription_item',
    billing_thresholds: null,
    created: parts.at,
    current_period_end: parts.periodEnd,
    current_period_start: parts.periodStart,
    current_trial: null,
    discounts: [],
    metadata: {},
    plan: planOf(parts.price),
    price: parts.price,
    quantity: parts.quantity,
    subscription: parts.subscription,
    tax_rates: [],
  };
}

export interface SubscriptionParts {
  id: string;
  at: number;
  customer: string;
  testClock: string | null;
  items: ItemDoc[];
  currency: string;
  anchor: number;
  trialEnd: number | null;
  metadata: Record<string, string>;
  description: string | null;
  paymentMethod: string | null;
  missingCard: 'cancel' | 'pause' | 'create_invoice';
}

/** A new subscription; its state is set by what happens to its first invoice. */
export function subscriptionShape(parts: SubscriptionParts): SubscriptionDoc {
  return {
    id: parts.id,
    object: 'subscription',
    application: null,
    application_fee_percent: null,
    automatic_tax: { disabled_reason: null, enabled: false, liability: null },
    billing_cycle_anchor: parts.anchor,
    billing_cycle_anchor_config: null,
    billing_mode: { flexible: { proration_discounts: 'included' }, type: 'flexible' },
    billing_schedules: [],
    billing_thresholds: null,
    cancel_at: null,
    cancel_at_period_end: false,
    canceled_at: null,
    cancellation_details: { comment: null, feedback: null, feedback_option: null, reason: null },
    collection_method: 'charge_automatically',
    created: parts.at,
    currency: parts.currency,
    customer: parts.customer,
    customer_account: null,
    days_until_due: null,
    default_payment_method: parts.paymentMethod,
    default_source: null,
    default_tax_rates: [],
    description: parts.description,
    discounts: [],
    ended_at: null,
    invoice_settings: {
      account_tax_ids: null,
      custom_fields: null,
      description: null,
      footer: null,
      issuer: { type: 'self' },
    },
    items: listOf(`/v1/subscription_items?subscription=${parts.id}`, parts.items),
    latest_invoice: null,
    livemode: false,
    managed_payments: null,
    metadata: parts.metadata,
    next_pending_invoice_item_invoice: null,
    on_behalf_of: null,
    pause_collection: null,
    payment_settings: {
      payment_method_options: null,
      payment_method_types: null,
      save_default_payment_method: 'off',
    },
    pending_invoice_item_interval: null,
    pending_setup_intent: null,
    pending_update: null,
    schedule: null,
    start_date: parts.at,
    status: parts.trialEnd === null ? 'incomplete' : 'trialing',
    test_clock: parts.testClock,
    transfer_data: null,
    trial_end: parts.trialEnd,
    trial_settings: {
      end_behavior: { billing_cycle_anchor: null, missing_payment_method: parts.missingCard },
    },
    trial_start: parts.trialEnd === null ? null : parts.at,
  };
}
