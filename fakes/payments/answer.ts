import { createHash } from 'node:crypto';
import type { DocStore } from '../core/doc-store.ts';
import { json } from '../core/html.ts';
import { route, type Route } from '../core/router.ts';
import type { Call } from './call.ts';
import { CALLS } from './calls/all.ts';
import type { RememberedDoc } from './docs.ts';
import { present } from './expand.ts';
import { Fault } from './fault.ts';
import { makeId, openLedger, type World } from './ledger.ts';
import { parseForm } from './params.ts';

const KEY_MAX = 255;
const KEY_LIFE_MS = 24 * 3600 * 1000;

interface ApiParts {
  store: DocStore;
  world: World;
  posted: (type: string) => boolean;
}

interface Answer {
  status: number;
  body: string;
  /** The same reply as the first time. */
  replayed?: boolean;
}

const faultAnswer = ({ status, type, message, more }: Fault): Answer => ({
  status,
  body: JSON.stringify({ error: { type, message, ...more } }),
});

/** Found before the work began: not remembered, so that the mended request may use its key. */
const isEarly = ({ type, more }: Fault) =>
  type === 'idempotency_error' || (more.code?.startsWith('parameter_') ?? false);

interface Asked {
  id: string;
  raw: unknown;
  key: string | null;
  /** Of method, path and parameters: what a key is bound to. */
  digest: string;
  nowMs: number;
}

/** The reply that this key was given before. @throws Fault when it was given to another request */
async function recall(store: DocStore, { key, digest, nowMs }: Asked): Promise<RememberedDoc | null> {
  if (!key) return null;
  if (key.length > KEY_MAX)
    throw new Fault(400, 'idempotency_error', `Keys have at most ${KEY_MAX} characters.`);
  const found = await store.get<RememberedDoc>('payments.remembered', key);
  if (!found || nowMs - found.atMs > KEY_LIFE_MS) return null;
  if (found.digest === digest) return found;
  throw new Fault(
    400,
    'idempotency_error',
    'Keys for idempotent requests can only be used with the same parameters they were first used with.',
  );
}

async function remember(
  store: DocStore,
  { key, digest, nowMs }: Asked,
  { status, body }: Answer,
): Promise<void> {
  if (!key) return;
  const remembered: RememberedDoc = { id: key, digest, status, body, atMs: nowMs };
  await store.put('payments.remembered', remembered);
}

/** The work and the memory of its reply are one transaction: a crash leaves both or neither. */
async function runCall({ store, world, posted }: ApiParts, call: Call, asked: Asked): Promise<Answer> {
  try {
    return await store.transaction(async (tx) => {
      const before = await recall(tx, asked);
      if (before) return { status: before.status, body: before.body, replayed: true };
      const ledger = openLedger(tx, world, posted, asked.key);
      const result = await call.run(ledger, asked.raw, asked.id);
      const answer =
        'refused' in result
          ? faultAnswer(result.refused)
          : { status: 200, body: JSON.stringify(await present(ledger, result.answer, result.expand)) };
      await ledger.flush();
      await remember(tx, asked, answer);
      return answer;
    });
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const answer = faultAnswer(error);
    if (!isEarly(error)) await remember(store, asked, answer);
    return answer;
  }
}

function callRoute(parts: ApiParts, call: Call): Route {
  return route(call.method, call.path, async ({ request, url, param }) => {
    const { world } = parts;
    const reply = ({ status, body, replayed }: Answer) =>
      new Response(body, {
        status,
        headers: {
          'content-type': 'application/json',
          'request-id': makeId('req', world.random),
          ...(replayed && { 'idempotent-replayed': 'true' }),
        },
      });
    if (!/^Bearer \S+/.test(request.headers.get('authorization') ?? '')) {
      return reply(faultAnswer(new Fault(401, 'authentication_error', 'You did not provide an API key.')));
    }
    const isPost = call.method === 'POST';
    const text = isPost ? await request.text() : url.search.slice(1);
    const answer = await runCall(parts, call, {
      id: param('id'),
      raw: parseForm(text),
      key: isPost ? request.headers.get('idempotency-key') : null,
      digest: createHash('sha256').update(`${call.method} ${url.pathname}\n${text}`).digest('hex'),
      nowMs: world.now().getTime(),
    });
    return reply(answer);
  });
}

/** The API as routes. */
export const apiRoutes = (parts: ApiParts): Route[] => CALLS.map((call) => callRoute(parts, call));

/** What an address of the API that we do not know is told. */
export const unknownCall = (method: string, path: string): Response =>
  json(
    { error: { type: 'invalid_request_error', message: `Unrecognized request URL (${method}: ${path}).` } },
    404,
  );
