import { setupServer } from 'msw/node';
import { http, passthrough } from 'msw';
import { afterAll, beforeAll } from 'vitest';
import { mswHandlers } from '#fakes/core/msw';
import { createMemoryStore } from '#fakes/core/memory-store';
import { createPayments } from '#fakes/payments/index';
import { createApp, type App } from '#server/app';
import type { Clock } from '#server/clock';
import type { OutgoingMail } from '#server/email/mailer';
import { readEnv } from '#server/env';
import { createLog } from '#server/log';
import { useDatabase } from './database.ts';

const PAYMENTS = 'http://127.0.0.1:4323';
export const WEBHOOK_SECRET = 'whsec_integration';

/** A clock that stands until it is moved. */
export class TestClock implements Clock {
  constructor(private at: Date) {}
  now = () => new Date(this.at);
  moveDays(days: number): void {
    this.at = new Date(this.at.getTime() + days * 86_400_000);
  }
}

/**
 * A real App on a database of this file's own, with a standing clock, recorded mail and the payment stand-in behind msw.
 * Any other outgoing request fails the test.
 */
export function useApp(start = '2026-11-10T09:00:00Z') {
  const database = useDatabase();
  const clock = new TestClock(new Date(start));
  const mails: OutgoingMail[] = [];
  let seed = 1;
  const payments = createPayments({
    store: createMemoryStore(),
    webhookUrl: 'http://localhost:4321/api/webhooks/stripe',
    webhookSecret: WEBHOOK_SECRET,
    origin: PAYMENTS,
    now: () => clock.now(),
    random: () => (seed = (seed * 16_807) % 2_147_483_647) / 2_147_483_647,
    deliver: () => Promise.resolve({ status: 200 }),
  });
  const server = setupServer(
    ...mswHandlers(payments.handler, PAYMENTS),
    http.all('http://127.0.0.1:0/*', () => passthrough()),
  );
  let app: App | undefined;
  beforeAll(async () => {
    server.listen({ onUnhandledRequest: 'error' });
    const env = readEnv({
      DATABASE_URL: database.url(),
      STRIPE_API_URL: PAYMENTS,
      STRIPE_WEBHOOK_SECRET: WEBHOOK_SECRET,
      LOG_LEVEL: 'silent',
    });
    const mailer = {
      send: (mail: OutgoingMail) => Promise.resolve(void mails.push(mail)),
      close: () => undefined,
    };
    app = await createApp(env, { worker: false }, { clock, mailer, log: createLog('silent') });
  });
  afterAll(async () => {
    await app?.close();
    await payments.close();
    server.close();
  });
  return {
    clock,
    mails,
    payments,
    get app(): App {
      if (!app) throw new Error('the app is opened before each file');
      return app;
    },
  };
}
