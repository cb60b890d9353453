import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, beforeAll, inject } from 'vitest';

/** A database of this test file's own, cloned from the migrated template, and dropped with it. */
export function useDatabase(): { url: () => string } {
  const name = `t_${randomUUID().replaceAll('-', '').slice(0, 16)}`;
  const cluster = inject('cluster');
  const admin = async (statement: string) => {
    const client = new pg.Client({ connectionString: `${cluster}/postgres` });
    await client.connect();
    try {
      await client.query(statement);
    } finally {
      await client.end();
    }
  };
  beforeAll(() => admin(`create database ${name} template newel_template strategy file_copy`));
  afterAll(() => admin(`drop database if exists ${name} with (force)`));
  return { url: () => `${cluster}/${name}` };
}
