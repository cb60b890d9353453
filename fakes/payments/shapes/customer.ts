import type { CustomerDoc } from '../docs.ts';

interface CustomerParts {
  id: string;
  at: number;
  invoicePrefix: string;
  email?: string | null | undefined;
  name?: string | null | undefined;
  phone?: string | null | undefined;
  description?: string | null | undefined;
  metadata?: Record<string, string>;
  testClock?: string | null | undefined;
}

export function customerShape(parts: CustomerParts): CustomerDoc {
  return {
    id: parts.id,
    object: 'customer',
    address: null,
    balance: 0,
    created: parts.at,
    currency: null,
    customer_account: null,
    default_source: null,
    delinquent: false,
    description: parts.description ?? null,
    email: parts.email ?? null,
    invoice_prefix: parts.invoicePrefix,
    invoice_settings: {
      custom_fields: null,
      default_payment_method: null,
      footer: null,
      rendering_options: null,
    },
    livemode: false,
    metadata: parts.metadata ?? {},
    name: parts.name ?? null,
    next_invoice_sequence: 1,
    phone: parts.phone ?? null,
    preferred_locales: [],
    shipping: null,
    tax_exempt: 'none',
    test_clock: parts.testClock ?? null,
  };
}
