import type { APIContext, APIRoute } from 'astro';
import { z } from 'zod';
import type { App } from '#server/app';
import type { Transaction } from '#server/db/client';
import { AppError } from '#server/errors';
import { fieldErrors } from '#server/forms';
import type { Enqueue } from '#server/jobs/boss';
import { once } from '#server/once';
import { requireRole, type Role, type Viewer } from '#server/services/viewer';

const KEY = /^[\w-]{16,100}$/;

/** What a write endpoint's `run` gets: the open transaction and the checked input. */
export interface WriteContext<I> {
  app: App;
  viewer: Viewer;
  tx: Transaction;
  enqueue: Enqueue;
  input: I;
  params: APIContext['params'];
}

async function readJson(request: Request): Promise<unknown> {
  if (!request.headers.get('content-type')?.startsWith('application/json')) {
    throw new AppError('wrong-type', 'Send this as JSON.');
  }
  try {
    return await request.json();
  } catch {
    throw new AppError('bad-request', 'The message did not arrive whole. Try again.');
  }
}

/** @throws AppError invalid with one sentence a field */
export function parseInput<S extends z.ZodType>(schema: S, body: unknown): z.output<S> {
  const parsed = schema.safeParse(body);
  if (parsed.success) return parsed.data;
  throw new AppError('invalid', 'Something needs another look.', fieldErrors(parsed.error));
}

/**
 * A JSON write for an island: role, `Idempotency-Key`, schema, then `run` once inside a transaction.
 * Permission on the record itself is the service's, in its where-clause.
 */
export function writeEndpoint<S extends z.ZodType, R>(
  roles: Role[],
  schema: S,
  run: (context: WriteContext<z.output<S>>) => Promise<R>,
): APIRoute {
  return async ({ request, locals, params }) => {
    const viewer = requireRole(locals.viewer, ...roles);
    const key = request.headers.get('idempotency-key') ?? '';
    if (!KEY.test(key))
      throw new AppError('bad-request', 'The message has no key. Reload the page and try again.');
    const body = await readJson(request);
    const input = parseInput(schema, body);
    const path = new URL(request.url).pathname;
    const { reply, replayed } = await once(
      locals.app,
      viewer.id,
      { key, body: { path, body } },
      (tx, enqueue) => run({ app: locals.app, viewer, tx, enqueue, input, params }),
    );
    return Response.json(reply ?? {}, { headers: replayed ? { 'idempotent-replay': 'true' } : {} });
  };
}

/** A JSON read for an island. */
export function readEndpoint<R>(
  roles: Role[],
  run: (context: {
    app: App;
    viewer: Viewer;
    params: APIContext['params'];
    query: URLSearchParams;
  }) => Promise<R>,
): APIRoute {
  return async ({ request, locals, params }) => {
    const viewer = requireRole(locals.viewer, ...roles);
    return Response.json(
      await run({ app: locals.app, viewer, params, query: new URL(request.url).searchParams }),
    );
  };
}
