import type { DocStore, Where } from '../core/doc-store.ts';
import type { DeliveryDoc, Docs, EventDoc, Kind } from './docs.ts';
import { missing } from './fault.ts';

/** The version of the API whose shapes we answer in; the product pins the same one. */
export const API_VERSION = '2026-10-28.endive';

/** What only the first reader of an object asks for: shown when expanded, never in events. */
const ON_DEMAND: Record<string, string[]> = { 'checkout.session': ['line_items'], invoice: ['payments'] };

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789';

export interface World {
  /** Where the stand-in's own pages are. */
  origin: string;
  now: () => Date;
  /** From 0 up to, not including, 1. */
  random: () => number;
}

/** One request's view of the books: reads and writes within its transaction. */
export interface Ledger extends World {
  id(prefix: string): string;
  find<K extends Kind>(kind: K, id: string): Promise<Docs[K] | null>;
  /** @throws Fault 404 */
  need<K extends Kind>(kind: K, id: string, param?: string): Promise<Docs[K]>;
  save<K extends Kind>(kind: K, doc: Docs[K]): Promise<void>;
  /** Newest first. */
  all<K extends Kind>(kind: K, where?: Where, limit?: number): Promise<Docs[K][]>;
  remove(kind: Kind, id: string): Promise<boolean>;
  /** Seconds since 1970: of a test clock if there is one, else real. */
  time(clock: string | null): Promise<number>;
  /** Notes an event, and puts it in the post if the product has asked for such ones. Kept by `flush`. */
  emit(type: string, object: object, at: number, previous?: object): void;
  /** Writes the noted events; the last act of every transaction. */
  flush(): Promise<void>;
}

/** A copy without the parts that must be asked for. */
export function withoutOnDemand<T extends object>(object: T): T {
  const hidden = ON_DEMAND[String(Reflect.get(object, 'object'))] ?? [];
  return Object.fromEntries(Object.entries(object).filter(([name]) => !hidden.includes(name))) as T;
}

export function makeId(prefix: string, random: () => number): string {
  const letters = Array.from({ length: 24 }, () => LETTERS[Math.floor(random() * LETTERS.length)]);
  return `${prefix}_${letters.join('')}`;
}

/**
 * @param posted says which events the product's endpoint has asked for
 * @param key the idempotency key of the request, shown in its events
 */
export function openLedger(
  store: DocStore,
  world: World,
  posted: (type: string) => boolean,
  key: string | null = null,
): Ledger {
  const events: EventDoc[] = [];
  const deliveries: DeliveryDoc[] = [];
  const ledger: Ledger = {
    ...world,
    id: (prefix) => makeId(prefix, world.random),
    find: (kind, id) => store.get(`payments.${kind}`, id),
    need: async (kind, id, param) => {
      const doc = await ledger.find(kind, id);
      if (!doc) throw missing(kind, id, param);
      return doc;
    },
    save: (kind, doc) => store.put(`payments.${kind}`, doc),
    all: (kind, where, limit) => store.list(`payments.${kind}`, where, limit),
    remove: (kind, id) => store.delete(`payments.${kind}`, id),
    time: async (clock) =>
      clock
        ? (await ledger.need('test_helpers.test_clock', clock)).frozen_time
        : Math.floor(world.now().getTime() / 1000),
    emit: (type, object, at, previous) => {
      const goesOut = posted(type);
      const event: EventDoc = {
        id: ledger.id('evt'),
        object: 'event',
        api_version: API_VERSION,
        created: at,
        data: { object: withoutOnDemand(object), ...(previous && { previous_attributes: previous }) },
        livemode: false,
        pending_webhooks: goesOut ? 1 : 0,
        request: { id: key ? ledger.id('req') : null, idempotency_key: key },
        type,
      };
      events.push(event);
      if (!goesOut) return;
      deliveries.push({
        id: ledger.id('dlv'),
        event: event.id,
        type,
        state: 'pending',
        nextAtMs: world.now().getTime(),
        attempts: [],
      });
    },
    flush: async () => {
      await store.putAll('payments.event', events.splice(0));
      await store.putAll('payments.delivery', deliveries.splice(0));
    },
  };
  return ledger;
}
