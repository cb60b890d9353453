import { readFileSync, writeFileSync } from 'node:fs';
import { availableParallelism, loadavg } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { format } from 'prettier';
import { shareOf } from './bench/load.mjs';
import { addManyMembers } from './bench/many-members.mjs';
import { hotPages, repeated, watchPage } from './bench/pages.mjs';
import { report } from './bench/report.mjs';
import { Children } from './lib/children.mjs';
import { choosePorts } from './lib/ports.mjs';
import { openPractice } from './lib/practice.mjs';
import { ROOT } from './lib/root.mjs';
import { explain, step } from './lib/steps.mjs';
import { TEST_FOLDER } from './lib/test-cluster.mjs';

/** `npm run bench`: see docs/bench.md for what it prints. On its own cluster and ports. */
const MANY = 5000;
const FOLDER = join(TEST_FOLDER, 'bench');
const PORTS = { site: 4721, database: 4722, payments: 4723, inbox: 4724, smtp: 4725, objects: 4727 };
const WATCH = ['--import', join(ROOT, 'scripts/bench/watch.mjs')];
const LETTERS_WITHIN_MS = 12_000;

const children = new Children();
let practice;
const stop = async () => {
  await children.stop();
  await practice?.stop();
};
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => void stop().then(() => process.exit(1)));

const practiceHere = (fresh) => openPractice({ folder: FOLDER, wanted: PORTS, fast: true, fresh });
const residentMb = ({ pid }) =>
  Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))[1]) / 1024;
const ask = async (databaseUrl, statement) => {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    return (await client.query(statement)).rows[0];
  } finally {
    await client.end();
  }
};

/** While nothing is connected: the demo practice once more, to be filled up. */
async function copyDatabase(cluster) {
  cluster.start(cluster.port);
  await ask(cluster.url('postgres'), 'create database newel_many template newel');
  cluster.stop();
}

/** A web process on one database, its worker elsewhere. */
async function startWeb(databaseUrl, port, before = []) {
  const env = {
    ...practice.product,
    DATABASE_URL: databaseUrl,
    PORT: String(port),
    WORKER: 'off',
    LOG_LEVEL: 'warn',
  };
  const child = await children.start('A web process', [...before, 'dist/main.mjs'], { env, mark: null });
  return { child, origin: `http://127.0.0.1:${port}` };
}

async function watchAll(databaseUrl, port) {
  const { child, origin } = await startWeb(databaseUrl, port, WATCH);
  const pages = [];
  for (const page of await hotPages(databaseUrl)) pages.push(await watchPage(child, origin, page));
  child.kill('SIGTERM');
  return { pages, members: (await ask(databaseUrl, 'select count(*)::int as n from members')).n };
}

/** Each hot page against the bare server, then the prerendered one; the web process's memory at the end. */
async function loadAll(databaseUrl, watched, { web: webPort, bare: barePort }) {
  const web = await startWeb(databaseUrl, webPort);
  const pages = (await hotPages(databaseUrl)).filter(({ crowded }) => !crowded);
  const cautions = await fetch(`${web.origin}/cautions`, { headers: { 'accept-encoding': 'br' } });
  const kept = [...cautions.headers].filter(
    ([name]) => !/^(content-(length|encoding)|connection|keep-alive|date|transfer-encoding)$/.test(name),
  );
  const replay = { '/cautions': { statements: [], headers: Object.fromEntries(kept), body: '' } };
  for (const [index, { path }] of pages.entries()) {
    const { statements, body } = watched[index];
    replay[path] = { statements, body, headers: { 'content-type': 'text/html; charset=utf-8' } };
  }
  const file = join(FOLDER, 'bare-pages.json');
  writeFileSync(file, JSON.stringify(replay));
  const env = { DATABASE_URL: databaseUrl, PORT: String(barePort), BENCH_PAGES: file };
  await children.start('The bare server', ['scripts/bench/bare.mjs'], { env, mark: null });
  const bare = `http://127.0.0.1:${barePort}`;
  const shares = [];
  for (const { name, path, cookie } of pages) {
    shares.push({ name, ...(await shareOf(web.origin + path, bare + path, { cookie })) });
  }
  const br = { 'accept-encoding': 'br' };
  const prerendered = await shareOf(`${web.origin}/cautions`, `${bare}/cautions`, br);
  return { shares, prerendered, web: residentMb(web.child) };
}

/** The worker's memory after it has looked through everybody and written whatever was due. */
async function loadWorker(databaseUrl) {
  const env = { ...practice.product, DATABASE_URL: databaseUrl };
  const child = await children.start('The worker', ['dist/worker.mjs'], { env, mark: 'worker at work' });
  await ask(databaseUrl, `insert into pgboss.job (name, data) values ('tick', '{}')`);
  const count = `select count(*) filter (where state = 'completed')::int as done,
    count(*) filter (where state < 'completed')::int as open from pgboss.job where name in ('mail', 'tick')`;
  const until = performance.now() + LETTERS_WITHIN_MS;
  let told = { done: 0, open: 1 };
  while (told.open > 0 && performance.now() < until) {
    await new Promise((done) => setTimeout(done, 500));
    told = await ask(databaseUrl, count);
  }
  return { worker: residentMb(child), letters: told.done };
}

try {
  const began = performance.now();
  const machine = { processors: availableParallelism(), busy: loadavg()[0] };
  practice = await practiceHere(true);
  await practice.stop();
  await step('A second database', () => copyDatabase(practice.cluster));
  const second = performance.now();
  practice = await practiceHere(false);
  const first = await fetch(`http://localhost:${practice.ports.site}/`);
  if (first.status !== 200) throw new Error(`the first page answered ${first.status}`);
  const start = (performance.now() - second) / 1000;
  const few = practice.cluster.url('newel');
  const many = practice.cluster.url('newel_many');
  const { ports } = await choosePorts({ few: 4731, many: 4732, web: 4733, bare: 4734 });
  await step(`${MANY} members`, async () => {
    await addManyMembers(many, MANY);
  });
  const [small, large] = await step('Pages', async () => [
    await watchAll(few, ports.few),
    await watchAll(many, ports.many),
  ]);
  const { web, ...loads } = await step('Loads', () => loadAll(many, large.pages, ports));
  const worker = await step('Worker', () => loadWorker(many));
  const seconds = (performance.now() - began) / 1000;
  const text = await format(
    report({
      machine,
      start,
      small,
      large,
      repeats: repeated,
      ...loads,
      memory: { web, ...worker },
      seconds,
    }),
    { parser: 'markdown' },
  );
  writeFileSync(join(ROOT, 'docs', 'bench.md'), text);
  console.log(`\n${text}`);
  await stop();
} catch (error) {
  explain(error);
  await stop();
  process.exit(1);
}
