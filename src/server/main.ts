import { readFile } from 'node:fs/promises';
import { pathToFileURL } from 'node:url';
import { resolve } from 'node:path';
import { createApp } from '#server/app';
import { EnvError, readEnv, type Env } from '#server/env';
import { createFront, type AstroHandler } from '#server/front/server';
import { loadStaticFiles } from '#server/front/static-files';
import { startWorker } from '#server/jobs/worker';

const DIST = resolve(import.meta.dirname);

/** Where a form may end after its redirect: the provider's pages, or the stand-in's. */
const paymentPages = (env: Env) =>
  env.stripeApiUrl
    ? [new URL(env.stripeApiUrl).origin]
    : ['https://checkout.stripe.com', 'https://billing.stripe.com'];

async function main(): Promise<void> {
  const env = readEnv();
  const app = await createApp(env, { worker: env.inlineWorker });
  if (env.inlineWorker) await startWorker(app);
  const { handler } = (await import(pathToFileURL(`${DIST}/server/entry.mjs`).href)) as {
    handler: AstroHandler;
  };
  const hashes = JSON.parse(await readFile(`${DIST}/csp.json`, 'utf8')) as {
    scripts: string[];
    styles: string[];
  };
  const front = createFront({
    handler,
    files: await loadStaticFiles(`${DIST}/client`),
    policy: {
      scriptHashes: hashes.scripts,
      styleHashes: hashes.styles,
      formTargets: paymentPages(env),
      secure: env.secure,
    },
    publicOrigin: env.publicOrigin,
    trustedProxies: env.trustedProxies,
    log: app.log,
    checkReady: async () => void (await app.pool.query('select 1')),
    locals: { app },
  });
  await new Promise<void>((done) => front.server.listen(env.port, env.host, done));
  app.log.info({ port: env.port }, 'open');
  process.send?.('ready');

  let stopping = false;
  const stop = async () => {
    if (stopping) return;
    stopping = true;
    await front.drain(env.demo ? 0 : 1_000);
    await app.close();
    process.exit(0);
  };
  process.on('SIGTERM', () => void stop());
  process.on('SIGINT', () => void stop());
  process.on('disconnect', () => void stop());
}

main().catch((error: unknown) => {
  process.stderr.write(
    `${error instanceof EnvError ? error.message : error instanceof Error ? error.stack : 'unknown fault'}\n`,
  );
  process.exit(1);
});
