import { createHmac } from 'node:crypto';
import type { DocStore } from '../core/doc-store.ts';
import type { ChaosDoc, DeliveryDoc, EventDoc } from './docs.ts';

/** Sends one signed event to the product and says how it answered. */
export type Deliver = (
  url: string,
  body: string,
  headers: Record<string, string>,
) => Promise<{ status: number }>;

interface DeliveryParts {
  store: DocStore;
  url: string;
  secret: string;
  now: () => Date;
  random: () => number;
  deliver: Deliver;
}

/** Waits before the second, third … try. After the last the delivery counts as failed. */
const BACK_OFF_SECONDS = [1, 2, 4, 8, 15, 30, 60, 300, 900] as const;

const AT_ONCE = 4;

export const overHttp: Deliver = async (url, body, headers) => {
  const reply = await fetch(url, { method: 'POST', body, headers, signal: AbortSignal.timeout(8_000) });
  await reply.arrayBuffer();
  return { status: reply.status };
};

/** `t=…,v1=…`: HMAC-SHA-256 over the second and the body, as the SDK's `constructEvent` checks it. */
function signatureHeader(body: string, secret: string, at: Date): string {
  const second = Math.floor(at.getTime() / 1000);
  const signature = createHmac('sha256', secret).update(`${second}.${body}`).digest('hex');
  return `t=${second},v1=${signature}`;
}

export const CALM: ChaosDoc = { id: 'chaos', shuffle: false, duplicate: false, drop: 0 };

export const readChaos = async (store: DocStore): Promise<ChaosDoc> =>
  (await store.get<ChaosDoc>('payments.setting', 'chaos')) ?? CALM;

function shuffled<T>(list: T[], random: () => number): T[] {
  return list
    .map((one) => ({ one, place: random() }))
    .sort((a, b) => a.place - b.place)
    .map(({ one }) => one);
}

interface PostOffice {
  /** Sends what is due; called after every change. Returns at once. */
  wake(): void;
  /** Resolves when everything that is due has been tried. */
  idle(): Promise<void>;
  /** Puts a delivery back at the head of the queue. */
  resend(id: string): Promise<void>;
  close(): Promise<void>;
}

/** Carries events to the product: signed, at least once, tried again with growing waits, kept in the store. */
export function openPostOffice({ store, url, secret, now, random, deliver }: DeliveryParts): PostOffice {
  let running: Promise<void> | null = null;
  let again = false;
  let closed = false;
  let timer: NodeJS.Timeout | undefined;

  async function send(delivery: DeliveryDoc): Promise<string> {
    const event = await store.get<EventDoc>('payments.event', delivery.event);
    const body = JSON.stringify(event, null, 2);
    const headers = {
      'content-type': 'application/json; charset=utf-8',
      'stripe-signature': signatureHeader(body, secret, now()),
    };
    try {
      return String((await deliver(url, body, headers)).status);
    } catch (error) {
      return error instanceof Error ? error.message : 'no answer';
    }
  }

  async function carry(delivery: DeliveryDoc, chaos: ChaosDoc): Promise<void> {
    if (chaos.drop > 0 && random() < chaos.drop) {
      await store.put('payments.delivery', { ...delivery, state: 'dropped' } as DeliveryDoc);
      return;
    }
    const outcome = await send(delivery);
    if (chaos.duplicate) await send(delivery);
    const arrived = /^2\d\d$/.test(outcome);
    const wait = BACK_OFF_SECONDS[delivery.attempts.length];
    const tried: DeliveryDoc = {
      ...delivery,
      state: arrived ? 'delivered' : wait === undefined ? 'failed' : 'pending',
      nextAtMs: now().getTime() + (wait ?? 0) * 1000,
      attempts: [...delivery.attempts, { atMs: now().getTime(), outcome }],
    };
    await store.transaction((tx) => tx.put('payments.delivery', tried));
  }

  async function round(): Promise<void> {
    const pending = await store.list<DeliveryDoc>('payments.delivery', { state: 'pending' });
    const due = pending.reverse().filter(({ nextAtMs }) => nextAtMs <= now().getTime());
    const chaos = await readChaos(store);
    const queue = chaos.shuffle ? shuffled(due, random) : due;
    // One line keeps the order; a shuffled post office may well work at several counters.
    const counters = chaos.shuffle ? AT_ONCE : 1;
    const work = async () => {
      for (let next = queue.shift(); next && !closed; next = queue.shift()) await carry(next, chaos);
    };
    await Promise.all(Array.from({ length: counters }, work));
  }

  async function sleepUntilDue(): Promise<void> {
    const pending = await store.list<DeliveryDoc>('payments.delivery', { state: 'pending' });
    if (pending.length === 0 || closed) return;
    const next = Math.min(...pending.map(({ nextAtMs }) => nextAtMs));
    clearTimeout(timer);
    timer = setTimeout(wake, Math.max(50, next - now().getTime()));
    timer.unref();
  }

  async function run(): Promise<void> {
    do {
      again = false;
      await round();
    } while (again && !closed);
    await sleepUntilDue();
  }

  function wake(): void {
    again = true;
    if (closed || running) return;
    running = run()
      // The store went away under us; the next change or start tries again.
      .catch(() => undefined)
      .finally(() => {
        running = null;
        if (again) wake();
      });
  }

  return {
    wake,
    idle: async () => {
      wake();
      while (running) await running;
    },
    resend: async (id) => {
      const delivery = await store.get<DeliveryDoc>('payments.delivery', id);
      if (!delivery) return;
      const fresh: DeliveryDoc = { ...delivery, state: 'pending', nextAtMs: now().getTime() };
      await store.put('payments.delivery', { ...fresh, attempts: [] } as DeliveryDoc);
      wake();
    },
    close: async () => {
      closed = true;
      clearTimeout(timer);
      await running;
    },
  };
}
