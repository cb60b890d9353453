import type pg from 'pg';
import PgBoss from 'pg-boss';
import type { Log } from '#server/log';
import { QUEUES, type JobPayloads, type QueueName } from './queues.ts';

/** Puts a job on a queue, inside the transaction it belongs to. */
export type Enqueue = <Q extends QueueName>(queue: Q, payload: JobPayloads[Q]) => Promise<void>;

const executor = (client: pg.Pool | pg.PoolClient): PgBoss.Db => ({
  executeSql: (text, values) => client.query(text, values),
});

/** A pg-boss on our pool. Only the worker supervises; its tables are made at the first start. */
export async function startBoss(pool: pg.Pool, worker: boolean, log: Log): Promise<PgBoss> {
  const boss = new PgBoss({
    db: executor(pool),
    supervise: worker,
    schedule: worker,
    migrate: true,
    maintenanceIntervalSeconds: 10,
    archiveCompletedAfterSeconds: 300,
    deleteAfterHours: 24,
    retryBackoff: true,
    retryDelay: 5,
  });
  boss.on('error', (error) => log.warn({ fault: error.message }, 'job queue'));
  await boss.start();
  for (const [name, options] of Object.entries(QUEUES)) await boss.createQueue(name, { name, ...options });
  return boss;
}

/** Binds `enqueue` to one connection: with a transaction's client the job commits or vanishes with it. */
export const enqueueOn =
  (boss: PgBoss, client: pg.Pool | pg.PoolClient): Enqueue =>
  async (queue, payload) => {
    await boss.send(queue, payload, { db: executor(client) });
  };
