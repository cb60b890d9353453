import type { APIContext } from 'astro';
import { beforeEach, describe, expect, it, onTestFinished, vi } from 'vitest';
import { openDatabase, openPool } from '#server/db/client';
import { AppError } from '#server/errors';
import { createLog } from '#server/log';
import type { Viewer } from '#server/services/viewer';
import { addPerson } from '#support/people';
import { useApp } from '#support/test-app';
import { onRequest } from '../../src/middleware.ts';

const world = useApp();
// Under vitest Astro's DEV flag is on; here the middleware runs as the built server has it.
beforeEach(() => void vi.stubEnv('DEV', false));

/** What the middleware answers to a request with this cookie, when the page behind it does `page`. */
async function send(
  path: string,
  { cookie = '', app = world.app, page = () => new Response('the page') } = {},
) {
  const locals: {
    app: typeof app;
    requestId: string;
    clientIp: string;
    viewer?: Viewer | null;
    errorPage: (status: number) => string;
  } = {
    app,
    requestId: 'r-1',
    clientIp: '198.51.100.1',
    errorPage: (status) => `<h1>${status}</h1>`,
  };
  const context = {
    locals,
    url: new URL(path, 'http://localhost'),
    request: new Request(new URL(path, 'http://localhost')),
    isPrerendered: false,
    cookies: { get: () => (cookie ? { value: cookie } : undefined) },
    redirect: (to: string, status: number) => new Response(null, { status, headers: { location: to } }),
  };
  const reply = await onRequest(context as unknown as APIContext, () => Promise.resolve(page()));
  if (!(reply instanceof Response)) throw new Error('the middleware gave no reply');
  return {
    status: reply.status,
    location: reply.headers.get('location'),
    text: await reply.text(),
    viewer: locals.viewer,
  };
}

const throwing = (error: unknown) => () => {
  throw error;
};

/** The same app with its database switched off. */
function withoutDatabase() {
  const pool = openPool('postgres://newel@127.0.0.1:1/nowhere', 2, createLog('silent'));
  onTestFinished(() => pool.end());
  return { ...world.app, pool, db: openDatabase(pool) };
}

describe('who is signed in', () => {
  it('is read from the cookie; nobody without, nobody with another', async () => {
    const { cookie, id } = await addPerson(world.app, 'member');
    expect((await send('/week', { cookie })).viewer?.id).toBe(id);
    expect((await send('/week')).viewer).toBeNull();
    expect((await send('/week', { cookie: `${cookie}x` })).viewer).toBeNull();
  });

  it('is not known while the database is away: 503, never "signed out"', async () => {
    const { cookie } = await addPerson(world.app, 'member');
    const page = vi.fn(throwing(new AppError('signed-out', 'Sign in first.')));
    const reply = await send('/week', { cookie, app: withoutDatabase(), page });
    expect([reply.status, reply.location, reply.text]).toEqual([503, null, '<h1>503</h1>']);
    expect(page).not.toHaveBeenCalled();
    const json = await send('/api/messages', { cookie, app: withoutDatabase() });
    expect([json.status, JSON.parse(json.text).error.code]).toEqual([503, 'unavailable']);
  });
});

describe('what a page throws', () => {
  it('leads to sign-in and back when nobody is signed in', async () => {
    const reply = await send('/marks?of=sit-ups', {
      page: throwing(new AppError('signed-out', 'Sign in first.')),
    });
    expect([reply.status, reply.location]).toEqual([303, '/sign-in?next=%2Fmarks%3Fof%3Dsit-ups']);
  });

  it.each([
    ['forbidden', 403],
    ['not-found', 404],
    ['too-many', 429],
  ] as const)('%s is answered with its page and %i', async (code, status) => {
    const reply = await send('/desk', { page: throwing(new AppError(code, 'A sentence.')) });
    expect([reply.status, reply.text]).toEqual([status, `<h1>${status}</h1>`]);
  });

  it('is told to an island in the one shape of errors', async () => {
    const page = throwing(
      new AppError('invalid', 'Something needs another look.', { words: 'Write a word or two.' }),
    );
    const { status, text } = await send('/api/check-ins', { page });
    expect(status).toBe(422);
    expect(JSON.parse(text)).toEqual({
      error: {
        code: 'invalid',
        message: 'Something needs another look.',
        fields: { words: 'Write a word or two.' },
        requestId: 'r-1',
      },
    });
  });

  it('shows nothing of a fault it did not expect', async () => {
    for (const path of ['/week', '/api/messages']) {
      const { status, text } = await send(path, { page: throwing(new Error('password=hunter2')) });
      expect(status).toBe(500);
      expect(text).not.toContain('hunter2');
    }
  });
});
