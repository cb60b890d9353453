import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setupServer } from 'msw/node';
import { http, passthrough } from 'msw';
import { afterAll, beforeAll } from 'vitest';
import { mswHandlers } from '#fakes/core/msw';
import { createMemoryStore } from '#fakes/core/memory-store';
import { createObjects } from '#fakes/objects/index';
import { createPayments } from '#fakes/payments/index';
import { createApp, type App } from '#server/app';
import type { Clock } from '#server/clock';
import type { OutgoingMail } from '#server/email/mailer';
import { readEnv } from '#server/env';
import { createLog } from '#server/log';
import { useDatabase } from './database.ts';

const PAYMENTS = 'http://127.0.0.1:4323';
const OBJECTS = 'http://127.0.0.1:4327';
const STORE_KEYS = { accessKey: 'tests', secretKey: 'of the tests' };
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
 * A real App on a database of this file's own, with a standing clock, recorded mail and the stand-ins for payments and pictures behind msw.
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
  const folder = mkdtempSync(join(tmpdir(), 'newel-objects-'));
  // The SDK signs with real time, whatever the practice's clock says.
  const objects = createObjects({
    store: createMemoryStore(),
    folder,
    keys: STORE_KEYS,
    now: () => new Date(),
  });
  const server = setupServer(
    ...mswHandlers(payments.handler, PAYMENTS),
    ...mswHandlers(objects, OBJECTS),
    http.all('http://127.0.0.1:0/*', () => passthrough()),
  );
  let app: App | undefined;
  beforeAll(async () => {
    server.listen({ onUnhandledRequest: 'error' });
    const env = readEnv({
      DATABASE_URL: database.url(),
      STRIPE_API_URL: PAYMENTS,
      STRIPE_WEBHOOK_SECRET: WEBHOOK_SECRET,
      S3_ENDPOINT: OBJECTS,
      S3_ACCESS_KEY: STORE_KEYS.accessKey,
      S3_SECRET_KEY: STORE_KEYS.secretKey,
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
    rmSync(folder, { recursive: true, force: true });
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
