import { createApp } from '#server/app';
import { migrateDatabase } from '#server/db/migrate';
import { fillDemo } from '#server/demo/fill';
import { readEnv } from '#server/env';

/** Brings the schema up to date and, in the demo, fills an empty practice. Run before the web process. */
async function main(): Promise<void> {
  const env = readEnv();
  await migrateDatabase(env.databaseUrl);
  if (!env.demo) return void console.log('up to date');
  const app = await createApp({ ...env, logLevel: 'warn' }, { worker: false });
  try {
    console.log(await fillDemo(app));
  } finally {
    await app.close();
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.stack : error);
  process.exit(1);
});
