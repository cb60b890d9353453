import type { DocStore } from '../core/doc-store.ts';
import { json } from '../core/html.ts';
import { createRouter, route, type Handler } from '../core/router.ts';
import { styleRoute } from '../core/style.ts';
import { apiRoutes, unknownCall } from './answer.ts';
import { passTime } from './billing/time.ts';
import { openPostOffice, overHttp, type Deliver } from './deliveries.ts';
import { openLedger, type Ledger, type World } from './ledger.ts';
import { cardRoutes } from './pages/authenticate.ts';
import { checkoutRoutes } from './pages/checkout.ts';
import { developerRoutes } from './pages/developers.ts';
import { invoiceRoutes } from './pages/invoice.ts';
import { notFoundPage } from './pages/layout.ts';
import { portalRoutes } from './pages/portal.ts';

/** The events that the product's endpoint has asked for; the others stand in the list of events only. */
const POSTED = /^(checkout\.session|customer|invoice|refund|test_helpers\.test_clock)\.|^charge\.refunded$/;

const TICK_MS = 30_000;

interface PaymentsParts {
  store: DocStore;
  /** Where events go. */
  webhookUrl: string;
  /** The secret they are signed with, `whsec_…`. */
  webhookSecret: string;
  /** Where this stand-in is reached, for the addresses of its own pages. */
  origin: string;
  /** Real time. Test clocks stand beside it, each with its own frozen time. */
  now: () => Date;
  /** From 0 up to, not including, 1. */
  random: () => number;
  deliver?: Deliver;
}

interface Payments {
  handler: Handler;
  /** Resumes deliveries that waited, and lets real time pass for customers without a test clock. */
  start(): void;
  /** Lets real time pass now: renewals, retries, ended trials of customers without a test clock. */
  tick(): Promise<void>;
  /** Resolves when every delivery that is due has been tried. */
  idle(): Promise<void>;
  close(): Promise<void>;
}

/** What the pages work with: a look at the books, or a change of them. */
export interface Desk {
  read: Ledger;
  /** In one transaction; wakes the post office when it is through. */
  change<T>(run: (ledger: Ledger) => Promise<T>): Promise<T>;
  store: DocStore;
  resend(id: string): Promise<void>;
}

/** The payment provider's stand-in: its API, its hosted pages, its webhooks. No real money moves. */
export function createPayments(parts: PaymentsParts): Payments {
  const { store, webhookUrl: url, webhookSecret: secret, now, random, deliver = overHttp } = parts;
  const world: World = { origin: parts.origin, now, random };
  const posted = (type: string) => POSTED.test(type);
  const office = openPostOffice({ store, url, secret, now, random, deliver });
  let timer: NodeJS.Timeout | undefined;

  const desk: Desk = {
    read: openLedger(store, world, posted),
    change: async (run) => {
      const result = await store.transaction(async (tx) => {
        const ledger = openLedger(tx, world, posted);
        const made = await run(ledger);
        await ledger.flush();
        return made;
      });
      office.wake();
      return result;
    },
    store,
    resend: office.resend,
  };

  const tick = () =>
    desk.change(async (ledger) => {
      const until = await ledger.time(null);
      const since = (await store.get<{ id: string; at: number }>('payments.tick', 'real'))?.at ?? until;
      await passTime(ledger, null, { since, until });
      await store.put('payments.tick', { id: 'real', at: until } as { id: string });
    });

  const router = createRouter(
    [
      ...apiRoutes({ store, world, posted }),
      styleRoute,
      ...checkoutRoutes(desk),
      ...cardRoutes(desk),
      ...portalRoutes(desk),
      ...invoiceRoutes(desk),
      ...developerRoutes(desk),
      route('GET', '/_fake/health', async () => json({ ok: true })),
    ],
    async ({ method, url: address }) => {
      const { pathname } = new URL(address);
      return pathname.startsWith('/v1/') ? unknownCall(method, pathname) : notFoundPage();
    },
  );

  return {
    handler: async (request) => {
      const reply = await router(request);
      if (request.method !== 'GET') office.wake();
      return reply;
    },
    start: () => {
      office.wake();
      timer = setInterval(() => void tick().catch(console.error), TICK_MS);
      timer.unref();
    },
    tick,
    idle: office.idle,
    close: async () => {
      clearInterval(timer);
      await office.close();
    },
  };
}
