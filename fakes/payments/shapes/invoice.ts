import { listOf } from '../call.ts';
import type { CustomerDoc, InvoiceDoc, LineDoc, PriceDoc, SubscriptionDoc } from '../docs.ts';

interface LineParts {
  description: string;
  amountMinor: number;
  price: PriceDoc;
  quantity: number;
  period: { start: number; end: number };
  subscription: string;
  subscriptionItem: string;
  /** The pending item it comes from, for a proration. */
  invoiceItem: string | null;
}

export function lineShape(id: string, parts: LineParts): LineDoc {
  return {
    id,
    object: 'line_item',
    amount: parts.amountMinor,
    currency: parts.price.currency,
    description: parts.description,
    discount_amounts: [],
    discountable: parts.invoiceItem === null,
    discounts: [],
    invoice: null,
    livemode: false,
    metadata: {},
    parent: {
      invoice_item_details: null,
      subscription_item_details: {
        invoice_item: parts.invoiceItem,
        proration: parts.invoiceItem !== null,
        proration_details: parts.invoiceItem === null ? null : { credited_items: null },
        subscription: parts.subscription,
        subscription_item: parts.subscriptionItem,
      },
      type: 'subscription_item_details',
    },
    period: parts.period,
    pretax_credit_amounts: [],
    pricing: {
      price_details: { price: parts.price.id, product: parts.price.product },
      type: 'price_details',
      unit_amount_decimal: String(parts.price.unit_amount),
    },
    quantity: parts.quantity,
    quantity_decimal: String(parts.quantity),
    subscription: parts.subscription,
    subtotal: parts.amountMinor,
    taxes: [],
  };
}

interface InvoiceParts {
  id: string;
  at: number;
  customer: CustomerDoc;
  subscription: SubscriptionDoc;
  reason: InvoiceDoc['billing_reason'];
  lines: LineDoc[];
  discountAmounts: { amount: number; discount: string }[];
  subtotal: number;
  total: number;
  startingBalance: number;
  endingBalance: number;
  amountDue: number;
  period: { start: number; end: number };
}

/** A draft; finalising gives it its number. */
export function invoiceShape(parts: InvoiceParts): InvoiceDoc {
  const { customer, subscription } = parts;
  return {
    id: parts.id,
    object: 'invoice',
    account_country: 'IE',
    account_name: 'Newel',
    account_tax_ids: null,
    amount_due: parts.amountDue,
    amount_overpaid: 0,
    amount_paid: 0,
    amount_remaining: parts.amountDue,
    amount_shipping: 0,
    application: null,
    attempt_count: 0,
    attempted: false,
    auto_advance: true,
    automatic_tax: { disabled_reason: null, enabled: false, liability: null, provider: null, status: null },
    automatically_finalizes_at: null,
    billing_reason: parts.reason,
    collection_method: 'charge_automatically',
    created: parts.at,
    currency: subscription.currency,
    custom_fields: null,
    customer: customer.id,
    customer_account: null,
    customer_address: null,
    customer_email: customer.email,
    customer_name: customer.name ?? null,
    customer_phone: customer.phone ?? null,
    customer_shipping: null,
    customer_tax_exempt: 'none',
    customer_tax_ids: [],
    default_payment_method: null,
    default_source: null,
    default_tax_rates: [],
    description: null,
    discounts: subscription.discounts.map(({ id }) => id),
    due_date: null,
    effective_at: null,
    ending_balance: parts.endingBalance,
    footer: null,
    from_invoice: null,
    hosted_invoice_url: null,
    invoice_pdf: null,
    issuer: { type: 'self' },
    last_finalization_error: null,
    latest_revision: null,
    lines: listOf(`/v1/invoices/${parts.id}/lines`, parts.lines),
    livemode: false,
    metadata: {},
    next_payment_attempt: null,
    number: null,
    on_behalf_of: null,
    parent: {
      quote_details: null,
      subscription_details: { metadata: subscription.metadata, subscription: subscription.id },
      type: 'subscription_details',
    },
    payment_settings: { default_mandate: null, payment_method_options: null, payment_method_types: null },
    payments: listOf(`/v1/invoice_payments?invoice=${parts.id}`, []),
    period_end: parts.period.end,
    period_start: parts.period.start,
    post_payment_credit_notes_amount: 0,
    pre_payment_credit_notes_amount: 0,
    receipt_number: null,
    rendering: null,
    shipping_cost: null,
    shipping_details: null,
    starting_balance: parts.startingBalance,
    statement_descriptor: null,
    status: 'draft',
    status_transitions: {
      finalized_at: null,
      marked_uncollectible_at: null,
      paid_at: null,
      voided_at: null,
    },
    subtotal: parts.subtotal,
    subtotal_excluding_tax: parts.subtotal,
    test_clock: customer.test_clock,
    total: parts.total,
    total_discount_amounts: parts.discountAmounts,
    total_excluding_tax: parts.total,
    total_pretax_credit_amounts: [],
    total_taxes: [],
    webhooks_delivered_at: parts.at,
  };
}
