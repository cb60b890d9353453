import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import type { Log } from '#server/log';
import * as schema from './schema/index.ts';

export type Database = NodePgDatabase<typeof schema>;
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

/** Either the pool's database or an open transaction; what a query function takes. */
export type Queryable = Database | Transaction;

/**
 * Opens the pool. Its error listener keeps the process alive when the database restarts: the next query connects anew.
 */
export function openPool(databaseUrl: string, max: number, log: Log): pg.Pool {
  const pool = new pg.Pool({ connectionString: databaseUrl, max, connectionTimeoutMillis: 3_000 });
  pool.on('error', (error) => log.warn({ fault: error.message }, 'database connection lost'));
  return pool;
}

export const openDatabase = (client: pg.Pool | pg.PoolClient): Database =>
  drizzle(client, { schema, casing: 'snake_case' });
