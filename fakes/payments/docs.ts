import type Stripe from 'stripe';

/** Fields that the SDK types as id or expanded object; what we keep is the id. */
type Kept<T, Ids extends keyof T> = Omit<T, Ids> & { [K in Ids]: Extract<T[K], string | null> };

/** The SDK reads decimals from text; on the wire and in our store they are text. */
type Decimals<T, Names extends keyof T> = Omit<T, Names> & { [K in Names]: string | null };

export type CustomerDoc = Kept<
  Omit<Stripe.Customer, 'invoice_settings' | 'metadata'> & {
    metadata: Record<string, string>;
    invoice_prefix: string;
    next_invoice_sequence: number;
    invoice_settings: Kept<Stripe.Customer.InvoiceSettings, 'default_payment_method'>;
  },
  'default_source'
> & { test_clock: string | null };

export type ProductDoc = Stripe.Product;
export type PriceDoc = Kept<Decimals<Stripe.Price, 'unit_amount_decimal'>, 'product'> & {
  unit_amount: number;
};
export type CouponDoc = Stripe.Coupon;
export type PaymentMethodDoc = Kept<Stripe.PaymentMethod, 'customer'> & { card: Stripe.PaymentMethod.Card };

/** A coupon given to a subscription; the coupon itself is kept by id. */
export type DiscountDoc = Omit<Stripe.Discount, 'source'> & { source: { type: 'coupon'; coupon: string } };

export type ItemDoc = Omit<Stripe.SubscriptionItem, 'price' | 'plan' | 'quantity'> & {
  price: PriceDoc;
  plan: object;
  quantity: number;
};

export interface ListOf<T> {
  object: 'list';
  data: T[];
  has_more: boolean;
  url: string;
}

export type SubscriptionDoc = Kept<
  Omit<Stripe.Subscription, 'items' | 'discounts'>,
  'customer' | 'default_payment_method' | 'latest_invoice' | 'test_clock'
> & { items: ListOf<ItemDoc>; discounts: DiscountDoc[] };

export type LineDoc = Omit<Decimals<Stripe.InvoiceLineItem, 'quantity_decimal'>, 'pricing' | 'quantity'> & {
  quantity: number;
  pricing: {
    type: 'price_details';
    price_details: { price: string; product: string };
    unit_amount_decimal: string;
  };
};

export type InvoiceDoc = Kept<
  Omit<Stripe.Invoice, 'lines' | 'customer' | 'payments' | 'parent'>,
  'test_clock'
> & {
  customer: string;
  lines: ListOf<LineDoc>;
  payments: ListOf<Stripe.InvoicePayment>;
  parent: {
    type: 'subscription_details';
    quote_details: null;
    subscription_details: { subscription: string; metadata: Record<string, string> };
  };
};

/** A proration that waits for the next invoice. */
export type InvoiceItemDoc = Kept<
  Omit<Decimals<Stripe.InvoiceItem, 'quantity_decimal'>, 'pricing' | 'parent'>,
  'customer' | 'invoice' | 'test_clock'
> & {
  pricing: LineDoc['pricing'];
  parent: {
    type: 'subscription_details';
    subscription_details: { subscription: string; subscription_item: string };
  };
};

export type PaymentIntentDoc = Kept<Stripe.PaymentIntent, 'customer' | 'latest_charge' | 'payment_method'>;
export type ChargeDoc = Kept<Stripe.Charge, 'customer' | 'payment_intent'>;
export type RefundDoc = Stripe.Refund;

export type CheckoutDoc = Kept<
  Omit<Stripe.Checkout.Session, 'line_items'>,
  'customer' | 'subscription' | 'invoice'
> & {
  line_items: ListOf<Omit<Stripe.LineItem, 'price'> & { price: PriceDoc }>;
  url: string | null;
};

/** What a checkout session will make, kept beside it because the session itself does not show it. */
interface CheckoutPlan {
  id: string;
  trial_end_days: number | null;
  trial_end: number | null;
  metadata: Record<string, string>;
  description: string | null;
  missing_card: 'cancel' | 'pause' | 'create_invoice';
  coupons: string[];
}

export type PortalDoc = Stripe.BillingPortal.Session;
export type ClockDoc = Stripe.TestHelpers.TestClock;

export interface EventDoc {
  id: string;
  object: 'event';
  api_version: string;
  created: number;
  data: { object: object; previous_attributes?: object };
  livemode: false;
  pending_webhooks: number;
  request: { id: string | null; idempotency_key: string | null };
  type: string;
}

/** One event on its way to the product. Times in milliseconds of real time. */
export interface DeliveryDoc {
  id: string;
  event: string;
  type: string;
  state: 'pending' | 'delivered' | 'failed' | 'dropped';
  nextAtMs: number;
  attempts: { atMs: number; outcome: string }[];
}

/** A card that was typed and waits for its owner's approval. */
export interface ApprovalDoc {
  id: string;
  number: string;
  email: string | null;
}

/** The reply once given to an idempotency key. */
export interface RememberedDoc {
  id: string;
  digest: string;
  status: number;
  body: string;
  atMs: number;
}

/** `POST /_fake/chaos`: how badly the post office works. */
export interface ChaosDoc {
  id: 'chaos';
  shuffle: boolean;
  duplicate: boolean;
  /** Share of deliveries that never arrive, 0 to 1. */
  drop: number;
}

/** What is left of a customer who was deleted. */
interface DeletedCustomerDoc {
  id: string;
  object: 'customer';
  deleted: true;
}

export interface Docs {
  customer: CustomerDoc;
  deleted_customer: DeletedCustomerDoc;
  product: ProductDoc;
  price: PriceDoc;
  coupon: CouponDoc;
  payment_method: PaymentMethodDoc;
  subscription: SubscriptionDoc;
  invoice: InvoiceDoc;
  invoiceitem: InvoiceItemDoc;
  payment_intent: PaymentIntentDoc;
  charge: ChargeDoc;
  refund: RefundDoc;
  'checkout.session': CheckoutDoc;
  checkout_plan: CheckoutPlan;
  'billing_portal.session': PortalDoc;
  'test_helpers.test_clock': ClockDoc;
  event: EventDoc;
  delivery: DeliveryDoc;
  approval: ApprovalDoc;
  remembered: RememberedDoc;
  setting: ChaosDoc;
}

export type Kind = keyof Docs;
