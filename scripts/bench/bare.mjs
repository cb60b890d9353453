import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import pg from 'pg';

/**
 * What the machine gives without a product: `node:http` and `pg` run the very statements that a page runs, at once, and
 * answer as many bytes. A page without statements is answered empty, with the product's own headers.
 */
const pages = JSON.parse(readFileSync(process.env['BENCH_PAGES'], 'utf8'));
const pool = new pg.Pool({ connectionString: process.env['DATABASE_URL'], max: 10 });

const server = createServer(async (request, response) => {
  const page = pages[request.url];
  await Promise.all(page.statements.map((statement) => pool.query(statement)));
  response.writeHead(200, page.headers).end(page.body);
});
server.listen(Number(process.env['PORT']), '127.0.0.1', () => process.send('ready'));
process.on('SIGTERM', () => process.exit(0));
