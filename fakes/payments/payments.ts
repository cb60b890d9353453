import type { DocStore } from '../core/doc-store.ts';
import type { Handler } from '../core/doors.ts';
import { page, stylesheet } from '../core/pages.ts';
import { answerApi } from './api.ts';
import { ApiError, type Desk } from './kinds.ts';
import { checkoutScreen, indexScreen, invoiceScreen, portalScreen } from './screens.ts';
import { createWebhooks, type Webhooks } from './webhooks.ts';

export const API_VERSION = '2026-10-28.endive';

export interface PaymentsOptions {
  store: DocStore;
  /** Where its own pages are. */
  origin: string;
  webhookSecret: string;
  /** Where events go; null keeps them in the store alone. */
  webhookUrl: string | null;
  /** Real time in seconds. */
  now: () => number;
  newId: (prefix: string) => string;
}

/** The payment stand-in: API, hosted pages and signed webhooks behind one handler. */
export function createPayments(options: PaymentsOptions): {
  handler: Handler;
  webhooks: Webhooks;
  desk: Desk;
} {
  const { webhookUrl } = options;
  const webhooks = createWebhooks({
    store: options.store,
    secret: options.webhookSecret,
    newId: options.newId,
    now: options.now,
    apiVersion: API_VERSION,
    deliver:
      webhookUrl === null
        ? null
        : async (payload, signature) => {
            const headers = { 'content-type': 'application/json', 'stripe-signature': signature };
            const reply = await fetch(webhookUrl, {
              method: 'POST',
              headers,
              body: payload,
              signal: AbortSignal.timeout(10_000),
            });
            return reply.ok;
          },
  });
  const desk: Desk = {
    store: options.store,
    now: options.now,
    newId: options.newId,
    origin: options.origin,
    emit: webhooks.emit,
  };

  async function screen(request: Request, pathname: string): Promise<Response> {
    const [, area = '', id = '', rest = ''] = pathname.split('/');
    if (pathname === '/') return indexScreen(desk);
    if (pathname === '/style.css') return stylesheet();
    if (area === 'pay' && id) return checkoutScreen(desk, request, id, rest === 'authenticate');
    if (area === 'portal' && id) return portalScreen(desk, request, id);
    if (area === 'invoices' && id) return invoiceScreen(desk, id);
    if (pathname === '/_fake/chaos' && request.method === 'POST') {
      Object.assign(webhooks.chaos, await request.json());
      return Response.json(webhooks.chaos);
    }
    return page('There is nothing here', 'Payment stand-in', '<p><a href="/">To the list</a></p>', 404);
  }

  // One request at a time: the stand-in keeps no locks.
  let turn: Promise<unknown> = Promise.resolve();
  const inTurn = <T>(work: () => Promise<T>): Promise<T> => {
    const mine = turn.then(work, work);
    turn = mine.catch(() => undefined);
    return mine;
  };

  return {
    webhooks,
    desk,
    handler: (request) =>
      inTurn(async () => {
        const { pathname } = new URL(request.url);
        if (pathname.startsWith('/v1/')) return answerApi(desk, request);
        return screen(request, pathname).catch((error: unknown) => {
          if (error instanceof ApiError)
            return page('There is nothing here', 'Payment stand-in', `<p>${error.message}</p>`, error.status);
          throw error;
        });
      }),
  };
}
