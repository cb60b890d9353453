import pg from 'pg';
import type { TestProject } from 'vitest/node';
import { migrateDatabase } from '../../src/server/db/migrate.ts';

declare module 'vitest' {
  export interface ProvidedContext {
    /** The cluster's address without a database name. */
    cluster: string;
  }
}

const TEMPLATE = 'newel_template';

const sql = async (address: string, ...statements: string[]) => {
  const client = new pg.Client({ connectionString: address });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
};

/**
 * Before the integration tests: a cluster of their own (the test script's, or one started here), with the schema migrated
 * once into a template that each file clones.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env['TEST_CLUSTER'];
  const { startTestCluster } = await import('../../scripts/lib/test-cluster.mjs');
  const own = given ? null : await startTestCluster();
  const cluster: string = given ?? own?.address ?? '';
  await sql(
    `${cluster}/postgres`,
    `drop database if exists ${TEMPLATE} with (force)`,
    `create database ${TEMPLATE}`,
  );
  await migrateDatabase(`${cluster}/${TEMPLATE}`);
  project.provide('cluster', cluster);
  return async () => {
    own?.stop();
  };
}
