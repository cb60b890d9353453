import { createHmac } from 'node:crypto';
import type { Doc, DocStore } from '../core/doc-store.ts';
import { shown, type Desk } from './kinds.ts';

export interface Chaos {
  /** Deliver in another order. */
  shuffle: boolean;
  /** Deliver each event twice. */
  duplicate: boolean;
  /** Drop the first delivery of each event; the retry brings it. */
  drop: boolean;
}

interface Delivery extends Doc {
  id: string;
  state: 'waiting' | 'delivered' | 'given up';
  tries: number;
}

const WAIT_MS = [0, 500, 1_000, 2_000, 4_000, 8_000, 16_000, 32_000];

/** The signature header in the provider's scheme: time and HMAC-SHA-256 of `time.payload`. */
export function sign(payload: string, secret: string, at: number): string {
  const hmac = createHmac('sha256', secret).update(`${at}.${payload}`).digest('hex');
  return `t=${at},v1=${hmac}`;
}

export interface Webhooks {
  emit: Desk['emit'];
  /** Tells again what was not delivered when the process ended. */
  resume(): Promise<void>;
  chaos: Chaos;
}

/** Records every event and delivers it, signed, until the receiver answers 2xx; waits longer after each failure. */
export function createWebhooks(options: {
  store: DocStore;
  secret: string;
  newId: (prefix: string) => string;
  now: () => number;
  apiVersion: string;
  /** Sends one delivery; null in tests that look at the events alone. */
  deliver: ((payload: string, signature: string) => Promise<boolean>) | null;
}): Webhooks {
  const { store, secret, now } = options;
  const chaos: Chaos = { shuffle: false, duplicate: false, drop: false };

  async function attempt(eventId: string): Promise<void> {
    const event = await store.get('event', eventId);
    const delivery = await store.get<Delivery>('delivery', eventId);
    if (!event || !delivery || !options.deliver || delivery.state !== 'waiting') return;
    const payload = JSON.stringify(event);
    const dropped = chaos.drop && delivery.tries === 0;
    const done =
      !dropped && (await options.deliver(payload, sign(payload, secret, now())).catch(() => false));
    const tries = delivery.tries + 1;
    const state = done ? 'delivered' : tries >= WAIT_MS.length ? 'given up' : 'waiting';
    await store.put('delivery', eventId, { ...delivery, tries, state });
    if (done && chaos.duplicate)
      await options.deliver(payload, sign(payload, secret, now())).catch(() => false);
    if (state === 'waiting') setTimeout(() => void attempt(eventId), WAIT_MS[tries] ?? 0).unref();
  }

  return {
    chaos,
    async emit(type, object) {
      const id = options.newId('evt_');
      const event = {
        id,
        object: 'event',
        api_version: options.apiVersion,
        created: now(),
        type,
        livemode: false,
        pending_webhooks: 1,
        request: null,
        data: { object: shown(object) },
      };
      await store.put('event', id, event);
      await store.put('delivery', id, { id, type, state: 'waiting', tries: 0 });
      // A later tick, so that the caller's own reply leaves first; shuffled ones wait an uneven while.
      const wait = chaos.shuffle ? (id.charCodeAt(id.length - 1) % 7) * 60 : 5;
      if (options.deliver) setTimeout(() => void attempt(id), wait).unref();
    },
    async resume() {
      const waiting = (await store.list<Delivery>('delivery')).filter(({ state }) => state === 'waiting');
      for (const { id } of waiting.reverse()) await attempt(id);
    },
  };
}
