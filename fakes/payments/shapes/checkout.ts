import { listOf } from '../call.ts';
import type { CheckoutDoc, PriceDoc } from '../docs.ts';

interface CheckoutParts {
  id: string;
  at: number;
  expiresAt: number;
  url: string;
  customer: string | null;
  customerEmail: string | null;
  clientReference: string | null;
  metadata: Record<string, string>;
  successUrl: string;
  cancelUrl: string | null;
  lines: { id: string; price: PriceDoc; name: string; quantity: number }[];
  /** What leaves the card today. */
  dueMinor: number;
  discountMinor: number;
}

const priceOf = (line: CheckoutParts['lines'][number]) => line.price.unit_amount * line.quantity;

export function checkoutShape(parts: CheckoutParts): CheckoutDoc {
  return {
    id: parts.id,
    object: 'checkout.session',
    adaptive_pricing: null,
    after_expiration: null,
    allow_promotion_codes: null,
    allowed_payment_method_types: null,
    amount_subtotal: parts.dueMinor + parts.discountMinor,
    amount_total: parts.dueMinor,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    billing_address_collection: null,
    cancel_url: parts.cancelUrl,
    client_reference_id: parts.clientReference,
    client_secret: null,
    collected_information: null,
    consent: null,
    consent_collection: null,
    created: parts.at,
    currency: parts.lines[0]?.price.currency ?? null,
    currency_conversion: null,
    custom_fields: [],
    custom_text: {
      after_submit: null,
      shipping_address: null,
      submit: null,
      terms_of_service_acceptance: null,
    },
    customer: parts.customer,
    customer_account: null,
    customer_creation: parts.customer ? null : 'always',
    customer_details: null,
    customer_email: parts.customerEmail,
    discounts: [],
    expires_at: parts.expiresAt,
    integration_identifier: null,
    invoice: null,
    invoice_creation: null,
    line_items: listOf(
      `/v1/checkout/sessions/${parts.id}/line_items`,
      parts.lines.map((line) => ({
        id: line.id,
        object: 'item',
        adjustable_quantity: null,
        amount_discount: 0,
        amount_subtotal: priceOf(line),
        amount_tax: 0,
        amount_total: priceOf(line),
        currency: line.price.currency,
        description: line.name,
        metadata: {},
        price: line.price,
        quantity: line.quantity,
      })),
    ),
    livemode: false,
    locale: null,
    managed_payments: null,
    metadata: parts.metadata,
    mode: 'subscription',
    origin_context: null,
    payment_intent: null,
    payment_link: null,
    payment_method_collection: 'always',
    payment_method_configuration_details: null,
    payment_method_options: null,
    payment_method_types: ['card'],
    payment_status: 'unpaid',
    permissions: null,
    recovered_from: null,
    saved_payment_method_options: null,
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    status: 'open',
    submit_type: null,
    subscription: null,
    success_url: parts.successUrl,
    total_details: { amount_discount: parts.discountMinor, amount_shipping: 0, amount_tax: 0 },
    ui_mode: 'hosted_page',
    url: parts.url,
    wallet_options: null,
  };
}
