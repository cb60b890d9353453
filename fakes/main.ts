import { randomInt, randomUUID } from 'node:crypto';
import { z } from 'zod';
import { openPostgresStore } from './core/postgres-store.ts';
import { serveHttp } from './core/serve-http.ts';
import { createInbox } from './mail/index.ts';
import { serveSmtp } from './mail/smtp.ts';
import { createObjects } from './objects/index.ts';
import { whenParentDies } from './parent.ts';
import { createPayments } from './payments/index.ts';

const port = z.coerce.number().int().min(1).max(65_535);

const shape = z.object({
  FAKES_DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }),
  FAKES_PAYMENTS_PORT: port,
  FAKES_SMTP_PORT: port,
  FAKES_INBOX_PORT: port,
  FAKES_OBJECTS_PORT: port,
  FAKES_OBJECTS_FOLDER: z.string().min(1),
  /** The product's own address: events go to its webhook. */
  PUBLIC_ORIGIN: z.url({ protocol: /^https?$/ }),
  STRIPE_WEBHOOK_SECRET: z.string().min(8),
  S3_ACCESS_KEY: z.string().min(3),
  S3_SECRET_KEY: z.string().min(3),
});

/** Every problem is named by its variable, never with its value. */
function readSettings(): z.infer<typeof shape> {
  const parsed = shape.safeParse(process.env);
  if (parsed.success) return parsed.data;
  const problems = parsed.error.issues.map(({ path, message }) => `  - ${path.join('.')}: ${message}`);
  throw new Error(`The stand-ins cannot start:\n${problems.join('\n')}`);
}

const STEPS = 2 ** 47;
const random = () => randomInt(STEPS) / STEPS;
const now = () => new Date();
const warn = (error: unknown) =>
  console.error(error instanceof Error ? (error.stack ?? error.message) : error);

/** Starts the three stand-ins on loopback; returns what stops them all. */
async function start(): Promise<() => Promise<void>> {
  const settings = readSettings();
  const store = await openPostgresStore(settings.FAKES_DATABASE_URL, warn);
  const payments = createPayments({
    store,
    webhookUrl: `${settings.PUBLIC_ORIGIN}/api/webhooks/stripe`,
    webhookSecret: settings.STRIPE_WEBHOOK_SECRET,
    origin: `http://127.0.0.1:${settings.FAKES_PAYMENTS_PORT}`,
    now,
    random,
  });
  const objects = createObjects({
    store,
    folder: settings.FAKES_OBJECTS_FOLDER,
    keys: { accessKey: settings.S3_ACCESS_KEY, secretKey: settings.S3_SECRET_KEY },
    now,
  });
  const servers = await Promise.all([
    serveHttp(payments.handler, settings.FAKES_PAYMENTS_PORT, warn),
    serveHttp(createInbox(store), settings.FAKES_INBOX_PORT, warn),
    serveHttp(objects, settings.FAKES_OBJECTS_PORT, warn),
    serveSmtp({ store, port: settings.FAKES_SMTP_PORT, now, id: randomUUID }),
  ]);
  payments.start();
  return async () => {
    await Promise.all(servers.map((server) => server.close()));
    await payments.close();
    await store.close();
  };
}

try {
  const stop = await start();
  const leave = () => void stop().finally(() => process.exit(0));
  process.once('SIGTERM', leave);
  process.once('SIGINT', leave);
  whenParentDies(leave);
  console.log('fakes ready');
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
}
