import type { Doc, DocStore } from '../core/doc-store.ts';

/** What an id begins with tells what it names. */
const PREFIXES: Record<string, string> = {
  cus_: 'customer',
  prod_: 'product',
  price_: 'price',
  cs_: 'checkout.session',
  sub_: 'subscription',
  in_: 'invoice',
  pm_: 'payment_method',
  evt_: 'event',
  clock_: 'test_helpers.test_clock',
  re_: 'refund',
  bps_: 'billing_portal.session',
};

export const kindOf = (id: string): string | undefined =>
  Object.entries(PREFIXES).find(([prefix]) => id.startsWith(prefix))?.[1];

/** What the parts of the stand-in share. Time and chance come from outside. */
export interface Desk {
  store: DocStore;
  /** Real time in seconds. */
  now: () => number;
  /** A new id with this beginning. */
  newId: (prefix: string) => string;
  origin: string;
  emit: (type: string, object: Doc) => Promise<void>;
}

/** An error in the provider's shape; the SDK turns it into its own classes. */
export class ApiError extends Error {
  constructor(
    readonly status: number,
    message: string,
    readonly body: { type?: string; code?: string; param?: string; decline_code?: string } = {},
  ) {
    super(message);
  }
}

export const missing = (kind: string, id: string) =>
  new ApiError(404, `No such ${kind}: '${id}'`, { code: 'resource_missing', param: 'id' });

export async function need<T extends Doc>(desk: Desk, kind: string, id: unknown): Promise<T> {
  const found = typeof id === 'string' ? await desk.store.get<T>(kind, id) : null;
  if (!found) throw missing(kind, String(id));
  return found;
}

/** Fields of ours begin with an underscore and never leave. */
export function shown(body: Doc): Doc {
  return Object.fromEntries(Object.entries(body).filter(([name]) => !name.startsWith('_')));
}

/** Puts objects in the place of their ids, along dotted paths, as `expand` asks. */
export async function expand(desk: Desk, body: Doc, paths: readonly string[]): Promise<Doc> {
  for (const path of paths) {
    const [head = '', ...rest] = path.split('.');
    const value = body[head];
    const kind = typeof value === 'string' ? kindOf(value) : undefined;
    const inner =
      kind && typeof value === 'string'
        ? shown((await desk.store.get(kind, value)) ?? {})
        : (value as Doc | Doc[] | undefined);
    if (inner === undefined || inner === null) continue;
    const deeper = rest.length > 0 ? [rest.join('.')] : [];
    body = {
      ...body,
      [head]: Array.isArray(inner)
        ? await Promise.all(inner.map((one) => expand(desk, one, deeper)))
        : await expand(desk, inner, deeper),
    };
  }
  return body;
}

/** The time a customer lives in: their test clock's, or real time. */
export async function timeOf(desk: Desk, customerId: string): Promise<number> {
  const customer = await desk.store.get<{ test_clock?: string | null }>('customer', customerId);
  if (!customer?.test_clock) return desk.now();
  const clock = await desk.store.get<{ frozen_time: number }>('test_helpers.test_clock', customer.test_clock);
  return clock?.frozen_time ?? desk.now();
}
