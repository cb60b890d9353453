import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';

const LOCK = 7_301_150;

/**
 * Brings the schema up to date, one process at a time: the second waits for the first and then finds nothing to do.
 * @param folder the generated SQL and its journal
 */
export async function migrateDatabase(databaseUrl: string, folder = 'drizzle'): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [LOCK]);
    await migrate(drizzle(client), { migrationsFolder: folder });
    await client.query('select pg_advisory_unlock($1)', [LOCK]);
  } finally {
    await client.end();
  }
}
