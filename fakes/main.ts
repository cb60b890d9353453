import { randomBytes } from 'node:crypto';
import { postgresStore } from './core/doc-store.ts';
import { serve } from './core/doors.ts';
import { createSmtp, inboxHandler } from './mail/inbox.ts';
import { createObjects } from './objects/objects.ts';
import { createPayments } from './payments/payments.ts';

function need(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is missing`);
  return value;
}

const newId = (prefix: string) => prefix + randomBytes(12).toString('hex');

/** Starts all three stand-ins; says `fakes ready`; ends with its parent. */
async function main(): Promise<void> {
  const store = await postgresStore(need('FAKES_DATABASE_URL'));
  const paymentsPort = Number(need('FAKES_PAYMENTS_PORT'));
  const payments = createPayments({
    store,
    origin: `http://127.0.0.1:${paymentsPort}`,
    webhookSecret: need('STRIPE_WEBHOOK_SECRET'),
    webhookUrl: `${need('PUBLIC_ORIGIN')}/api/webhooks/stripe`,
    now: () => Math.floor(Date.now() / 1000),
    newId,
  });
  const objects = createObjects({
    store,
    folder: need('FAKES_OBJECTS_FOLDER'),
    keys: { accessKey: need('S3_ACCESS_KEY'), secretKey: need('S3_SECRET_KEY') },
    now: Date.now,
    newId,
  });
  const smtp = createSmtp(store, newId, () => new Date());
  const servers = await Promise.all([
    serve(payments.handler, paymentsPort),
    serve(inboxHandler(store), Number(need('FAKES_INBOX_PORT'))),
    serve(objects, Number(need('FAKES_OBJECTS_PORT'))),
  ]);
  await new Promise<void>((done) => smtp.listen(Number(need('FAKES_SMTP_PORT')), '127.0.0.1', () => done()));
  console.log('fakes ready');
  void payments.webhooks.resume();

  const stop = () => {
    for (const server of servers) {
      server.close();
      server.closeAllConnections();
    }
    smtp.close(() => undefined);
    void store.close().then(() => process.exit(0));
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
  process.once('disconnect', stop);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
