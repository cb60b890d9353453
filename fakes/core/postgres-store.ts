import pg from 'pg';
import { createLock, type Doc, type DocStore, type Where } from './doc-store.ts';

/** Written often, long, and read by id or in order only: an index of what they say would cost more than it gives. */
const NEVER_SEARCHED = [
  'payments.event',
  'payments.charge',
  'payments.payment_intent',
  'payments.remembered',
  'mail.letter',
];

const TABLE = `
  create table if not exists docs (
    kind text not null,
    id text not null,
    seq bigint generated always as identity,
    body jsonb not null,
    primary key (kind, id)
  );
  create index if not exists docs_order on docs (kind, seq desc);
  create index if not exists docs_search on docs using gin (body jsonb_path_ops) with (fastupdate = off)
    where kind <> all ('{${NEVER_SEARCHED.join(',')}}');
`;

/** PostgreSQL keeps no NUL in text; nothing that the stand-ins keep needs one. */
const toJson = (doc: unknown) =>
  JSON.stringify(doc, (_name, value: unknown) =>
    typeof value === 'string' ? value.replaceAll('\0', '') : value,
  );

type Queryable = Pick<pg.Pool, 'query'>;

function storeOn(db: Queryable, transaction: DocStore['transaction'], close: () => Promise<void>): DocStore {
  return {
    get: async <T extends Doc>(kind: string, id: string) => {
      const { rows } = await db.query<{ body: T }>('select body from docs where kind = $1 and id = $2', [
        kind,
        id,
      ]);
      return rows[0]?.body ?? null;
    },
    put: async (kind, doc) => {
      await db.query(
        `insert into docs (kind, id, body) values ($1, $2, $3)
         on conflict (kind, id) do update set body = excluded.body`,
        [kind, doc.id, toJson(doc)],
      );
    },
    putAll: async (kind, docs) => {
      await db.query(
        `insert into docs (kind, id, body)
         select $1, doc ->> 'id', doc from jsonb_array_elements($2) with ordinality as given (doc, place) order by place
         on conflict (kind, id) do update set body = excluded.body`,
        [kind, toJson(docs)],
      );
    },
    list: async <T extends Doc>(kind: string, where: Where = {}, limit?: number) => {
      const { rows } = await db.query<{ body: T }>(
        'select body from docs where kind = $1 and body @> $2 order by seq desc limit $3',
        [kind, toJson(where), limit ?? null],
      );
      return rows.map((row) => row.body);
    },
    delete: async (kind, id) => {
      const { rowCount } = await db.query('delete from docs where kind = $1 and id = $2', [kind, id]);
      return rowCount === 1;
    },
    transaction,
    close,
  };
}

/** Makes the database if the server does not have it yet. */
async function ensureDatabase(url: string): Promise<void> {
  const name = decodeURIComponent(new URL(url).pathname.slice(1));
  const maintenance = new URL(url);
  maintenance.pathname = '/postgres';
  const client = new pg.Client({ connectionString: maintenance.href });
  await client.connect();
  try {
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [name]);
    if (rowCount === 0) await client.query(`create database ${client.escapeIdentifier(name)}`);
  } finally {
    await client.end();
  }
}

/**
 * Opens the stand-ins' own database, making it and its one table when missing.
 * @param url of the database of the stand-ins, never of the product's
 * @param onError told when an idle connection is lost; the pool opens another by itself
 */
export async function openPostgresStore(url: string, onError: (error: Error) => void): Promise<DocStore> {
  await ensureDatabase(url);
  const pool = new pg.Pool({ connectionString: url, max: 5 });
  pool.on('error', onError);
  await pool.query(TABLE);
  const locked = createLock();
  const transaction: DocStore['transaction'] = (run) =>
    locked(async () => {
      const client = await pool.connect();
      try {
        await client.query('begin');
        const tx = storeOn(
          client,
          (inner) => inner(tx),
          async () => undefined,
        );
        const result = await run(tx);
        await client.query('commit');
        return result;
      } catch (error) {
        await client.query('rollback').catch(onError);
        throw error;
      } finally {
        client.release();
      }
    });
  return storeOn(pool, transaction, () => pool.end());
}
