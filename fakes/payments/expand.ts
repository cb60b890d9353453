import type { Kind } from './docs.ts';
import { badRequest } from './fault.ts';
import { withoutOnDemand, type Ledger } from './ledger.ts';

const KIND_OF: Record<string, Kind> = {
  cus: 'customer',
  prod: 'product',
  price: 'price',
  pm: 'payment_method',
  sub: 'subscription',
  in: 'invoice',
  pi: 'payment_intent',
  ch: 'charge',
  re: 'refund',
  cs: 'checkout.session',
  clock: 'test_helpers.test_clock',
};

const MAX_DEPTH = 4;

async function fetchExpanded(ledger: Ledger, name: string, id: string): Promise<object | null> {
  const kind = name === 'coupon' ? 'coupon' : KIND_OF[id.slice(0, id.indexOf('_'))];
  const found = kind ? await ledger.find(kind, id) : null;
  return found && withoutOnDemand(found);
}

async function expandPath(ledger: Ledger, full: object, shown: object, path: string[]): Promise<void> {
  const [name = '', ...rest] = path;
  let value: unknown = Reflect.get(shown, name) ?? Reflect.get(full, name);
  if (value === undefined) {
    throw badRequest(`This property cannot be expanded (${name}).`, { param: 'expand' });
  }
  if (typeof value === 'string') value = await fetchExpanded(ledger, name, value);
  if (value === null) return;
  if (typeof value !== 'object') {
    throw badRequest(`This property cannot be expanded (${name}).`, { param: 'expand' });
  }
  Reflect.set(shown, name, value);
  if (rest.length === 0) return;
  for (const one of [value].flat()) {
    const id: unknown = Reflect.get(one, 'id');
    const kind = KIND_OF[String(id).split('_')[0] ?? ''];
    const whole = kind && typeof id === 'string' ? await ledger.find(kind, id) : null;
    await expandPath(ledger, whole ?? one, one, rest);
  }
}

/**
 * The reply for an object: without what must be asked for, with what `expand` asks for in place of ids.
 * @throws Fault 400 for a path that leads nowhere
 */
export async function present(ledger: Ledger, object: object, expand: string[] = []): Promise<object> {
  const data: unknown = Reflect.get(object, 'data');
  const shown = Array.isArray(data)
    ? { ...object, data: data.map((one: object) => withoutOnDemand(one)) }
    : withoutOnDemand(object);
  for (const path of expand) {
    const parts = path.split('.');
    if (parts.length > MAX_DEPTH + (parts[0] === 'data' ? 1 : 0)) {
      throw badRequest(`You cannot expand more than ${MAX_DEPTH} levels of a property.`, { param: 'expand' });
    }
    await expandPath(ledger, object, shown, parts);
  }
  return shown;
}
