import { createHash, randomBytes } from 'node:crypto';
import pg from 'pg';
import { CROWDED_COACH } from './many-members.mjs';
import { median } from './load.mjs';

const COOKIE = 'newel-session';
const WARM = 4;
const TIMES = 15;

/** Signs somebody in by a row of their own; gives the cookie. */
async function signIn(client, userId) {
  const token = randomBytes(24).toString('base64url');
  const hash = createHash('sha256').update(token).digest('base64url');
  await client.query(
    `insert into sessions (session_token, user_id, expires, seen_at) values ($1, $2, now() + interval '90 days', now())`,
    [hash, userId],
  );
  return `${COOKIE}=${token}`;
}

/** The hot pages in one database, each with the cookie of who opens it: the same member and coach in both sizes. */
export async function hotPages(databaseUrl) {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    const { rows } = await client.query(
      `select u.id, m.coach_id from users u join members m on m.user_id = u.id where u.name = 'Edda Rooke'`,
    );
    const { id, coach_id: coachId } = rows[0];
    const [member, coach] = [await signIn(client, id), await signIn(client, coachId)];
    const crowded = await client.query('select 1 from users where id = $1', [CROWDED_COACH]);
    const pages = [
      { name: 'member home', path: '/week', cookie: member },
      { name: 'marks', path: '/marks', cookie: member },
      { name: 'desk queue', path: '/desk', cookie: coach },
      { name: 'desk, a member', path: `/desk/${id}`, cookie: coach },
    ];
    if (crowded.rowCount === 0) return pages;
    const crowd = {
      name: 'desk queue of 1,000',
      path: '/desk',
      crowded: true,
      cookie: await signIn(client, CROWDED_COACH),
    };
    return [...pages, crowd];
  } finally {
    await client.end();
  }
}

/** Opens a page again and again on a watched web process: median and range of the milliseconds, and the statements. */
export async function watchPage(child, origin, { name, path, cookie }) {
  const seen = [];
  let body = '';
  for (let count = 0; count < WARM + TIMES; count += 1) {
    const told = new Promise((done) => child.once('message', done));
    const reply = await fetch(origin + path, { headers: { cookie }, redirect: 'manual' });
    body = await reply.text();
    const one = await told;
    if (one.status !== 200) throw new Error(`${name} answered ${one.status}`);
    if (count >= WARM) seen.push(one);
  }
  const ms = seen.map((one) => one.ms);
  return {
    name,
    ms: median(ms),
    least: Math.min(...ms),
    most: Math.max(...ms),
    statements: seen.at(-1).statements,
    body,
  };
}

/** The same text twice in one page is a loop. */
export const repeated = (statements) => statements.length - new Set(statements.map(({ text }) => text)).size;
