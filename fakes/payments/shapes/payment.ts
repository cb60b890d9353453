import type { ChargeDoc, InvoiceDoc, PaymentIntentDoc, PaymentMethodDoc } from '../docs.ts';
import type { Fault } from '../fault.ts';

interface PaymentParts {
  id: string;
  at: number;
  invoice: InvoiceDoc;
  method: PaymentMethodDoc | null;
  charge: string | null;
  fault: Fault | null;
}

export function paymentIntentShape({
  id,
  at,
  invoice,
  method,
  charge,
  fault,
}: PaymentParts): PaymentIntentDoc {
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: null,
    amount: invoice.amount_remaining,
    amount_capturable: 0,
    amount_received: fault ? 0 : invoice.amount_remaining,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: null,
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic',
    client_secret: null,
    confirmation_method: 'automatic',
    created: at,
    currency: invoice.currency,
    customer: invoice.customer,
    customer_account: null,
    description: null,
    excluded_payment_method_types: null,
    last_payment_error: fault && {
      type: 'card_error',
      message: fault.message,
      ...(fault.more.code && { code: fault.more.code }),
      ...(fault.more.decline_code && { decline_code: fault.more.decline_code }),
    },
    latest_charge: charge,
    livemode: false,
    managed_payments: null,
    metadata: {},
    next_action: null,
    on_behalf_of: null,
    payment_method: fault ? null : (method?.id ?? null),
    payment_method_configuration_details: null,
    payment_method_options: null,
    payment_method_types: ['card'],
    payment_record: null,
    processing: null,
    receipt_email: null,
    review: null,
    setup_future_usage: 'off_session',
    shipping: null,
    source: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: fault ? 'requires_payment_method' : 'succeeded',
    transfer_group: null,
  };
}

interface ChargeParts {
  id: string;
  at: number;
  intent: string;
  invoice: InvoiceDoc;
  method: PaymentMethodDoc;
  fault: Fault | null;
}

export function chargeShape({ id, at, intent, invoice, method, fault }: ChargeParts): ChargeDoc {
  return {
    id,
    object: 'charge',
    amount: invoice.amount_remaining,
    amount_captured: fault ? 0 : invoice.amount_remaining,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: null,
    billing_details: method.billing_details,
    calculated_statement_descriptor: 'NEWEL',
    captured: !fault,
    created: at,
    currency: invoice.currency,
    customer: invoice.customer,
    description: null,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: fault?.more.code ?? null,
    failure_message: fault?.message ?? null,
    fraud_details: {},
    livemode: false,
    metadata: {},
    on_behalf_of: null,
    outcome: {
      advice_code: null,
      network_advice_code: null,
      network_decline_code: null,
      network_status: fault ? 'declined_by_network' : 'approved_by_network',
      reason: fault?.more.decline_code ?? null,
      seller_message: fault ? 'The bank returned a decline.' : 'Payment complete.',
      type: fault ? 'issuer_declined' : 'authorized',
    },
    paid: !fault,
    payment_intent: intent,
    payment_method: method.id,
    payment_method_details: null,
    receipt_email: null,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: fault ? 'failed' : 'succeeded',
    transfer_data: null,
    transfer_group: null,
  };
}
