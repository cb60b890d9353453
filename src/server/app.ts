import { S3Client } from '@aws-sdk/client-s3';
import { eq } from 'drizzle-orm';
import type pg from 'pg';
import type PgBoss from 'pg-boss';
import type Stripe from 'stripe';
import { openStripe } from '#server/billing/stripe';
import { MovingClock, systemClock, type Clock } from '#server/clock';
import { openDatabase, openPool, type Database, type Transaction } from '#server/db/client';
import { practice } from '#server/db/schema/index';
import { openMailer, type Mailer } from '#server/email/mailer';
import type { Env } from '#server/env';
import { enqueueOn, startBoss, type Enqueue } from '#server/jobs/boss';
import { createLog, type Log } from '#server/log';
import { createLimits, type Limits } from '#server/limits';
import { secureRandom, type Random } from '#server/random';

/** Everything a service needs from outside, made once at start and handed forward. */
export interface App {
  env: Env;
  log: Log;
  pool: pg.Pool;
  db: Database;
  clock: Clock;
  random: Random;
  boss: PgBoss;
  enqueue: Enqueue;
  stripe: Stripe;
  mailer: Mailer;
  objects: S3Client;
  limits: Limits;
  /** Runs `work` in one transaction; jobs enqueued through its second argument commit with it. */
  transaction<T>(work: (tx: Transaction, enqueue: Enqueue) => Promise<T>): Promise<T>;
  close(): Promise<void>;
}

/** The demo's clock stands where the practice left it; production's is the system's. */
async function openClock(env: Env, db: Database): Promise<Clock> {
  if (!env.demo) return systemClock;
  const [row] = await db
    .select({ seconds: practice.clockOffsetSeconds })
    .from(practice)
    .where(eq(practice.id, 1));
  return new MovingClock((row?.seconds ?? 0) * 1000);
}

/** What a test may put in the place of the real thing. */
export type AppParts = Partial<Pick<App, 'clock' | 'random' | 'log' | 'stripe' | 'mailer'>>;

/** Opens every connection the process needs. `worker` says whether this process also runs the jobs. */
export async function createApp(
  env: Env,
  { worker }: { worker: boolean },
  parts: AppParts = {},
): Promise<App> {
  const log = parts.log ?? createLog(env.logLevel);
  const pool = openPool(env.databaseUrl, env.databasePool, log);
  const db = openDatabase(pool);
  const clock = parts.clock ?? (await openClock(env, db));
  const boss = await startBoss(pool, worker, log);
  const app: App = {
    env,
    log,
    pool,
    db,
    clock,
    random: parts.random ?? secureRandom,
    boss,
    enqueue: enqueueOn(boss, pool),
    stripe: parts.stripe ?? openStripe(env),
    mailer: parts.mailer ?? openMailer(env),
    objects: new S3Client({
      endpoint: env.s3.endpoint,
      region: env.s3.region,
      forcePathStyle: true,
      credentials: { accessKeyId: env.s3.accessKey, secretAccessKey: env.s3.secretKey },
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
    }),
    limits: createLimits(),
    async transaction(work) {
      const client = await pool.connect();
      try {
        return await openDatabase(client).transaction((tx) => work(tx, enqueueOn(boss, client)));
      } finally {
        client.release();
      }
    },
    async close() {
      await boss.stop({ graceful: true, wait: true, timeout: 5_000 });
      app.mailer.close();
      app.objects.destroy();
      await pool.end();
    },
  };
  return app;
}
