import { createApp } from '#server/app';
import { readEnv } from '#server/env';
import { startWorker } from '#server/jobs/worker';

/** The worker as a process of its own, for production: the web process then runs with WORKER=off. */
async function main(): Promise<void> {
  const app = await createApp(readEnv(), { worker: true });
  await startWorker(app);
  app.log.info('worker at work');
  const stop = () => void app.close().then(() => process.exit(0));
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.stack : 'unknown fault'}\n`);
  process.exit(1);
});
