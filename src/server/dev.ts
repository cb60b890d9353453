import { createApp, type App } from '#server/app';
import { readEnv } from '#server/env';
import { startWorker } from '#server/jobs/worker';

const kept = globalThis as typeof globalThis & { newelDevApp?: Promise<App> };

/** The one App of an `astro dev` process, worker included; kept on the global so that a reload does not open another. */
export function devApp(): Promise<App> {
  kept.newelDevApp ??= (async () => {
    const app = await createApp(readEnv(), { worker: true });
    await startWorker(app);
    return app;
  })();
  return kept.newelDevApp;
}
