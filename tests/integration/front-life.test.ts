import { afterAll, describe, expect, inject, it, vi } from 'vitest';
import type { AstroHandler } from '#server/front/server';
import { openPool } from '#server/db/client';
import { createLog } from '#server/log';
import { openFront } from '#support/front';

const CLIENTS = 20;

/** Pages that answer only when told to. */
function slowPages() {
  const waiting: (() => void)[] = [];
  const handler: AstroHandler = async (_request, response) => {
    await new Promise<void>((go) => waiting.push(go));
    response.end('whole');
  };
  return { handler, waiting, answerAll: () => waiting.splice(0).forEach((go) => go()) };
}

describe('health', () => {
  const dead = openPool('postgres://newel@127.0.0.1:1/nowhere', 2, createLog('silent'));
  const living = openPool(`${inject('cluster')}/postgres`, 2, createLog('silent'));
  afterAll(() => Promise.all([dead.end(), living.end()]));

  it('is alive without asking the database', async () => {
    const checkReady = vi.fn(() => Promise.reject(new Error('asked')));
    const { ask } = await openFront({ checkReady });
    expect((await ask('/health/live')).status).toBe(200);
    expect(checkReady).not.toHaveBeenCalled();
  });

  it('is not ready while the database is away, and prerendered pages are still read', async () => {
    const { ask } = await openFront({ checkReady: async () => void (await dead.query('select 1')) });
    const reply = await ask('/health/ready');
    expect([reply.status, reply.headers.get('cache-control')]).toEqual([503, 'no-store']);
    expect((await ask('/health/live')).status).toBe(200);
    expect((await ask('/')).body).toBe('<h1>Newel</h1>');
  });

  it('is ready when it answers', async () => {
    const { ask } = await openFront({ checkReady: async () => void (await living.query('select 1')) });
    expect((await ask('/health/ready')).status).toBe(200);
  });
});

describe('closing', () => {
  it('lets every running request end, says not ready and then takes no more', async () => {
    const { handler, waiting, answerAll } = slowPages();
    const { front, ask } = await openFront({ handler });
    const replies = Array.from({ length: CLIENTS }, () => ask('/week'));
    await expect.poll(() => waiting.length).toBe(CLIENTS);
    const drained = front.drain(300);
    expect((await ask('/health/ready')).status).toBe(503);
    expect((await ask('/health/live')).status).toBe(200);
    await expect.poll(() => front.server.listening).toBe(false);
    answerAll();
    expect((await Promise.all(replies)).map(({ body }) => body)).toEqual(Array(CLIENTS).fill('whole'));
    await drained;
    await expect(ask('/week')).rejects.toMatchObject({ code: 'ECONNREFUSED' });
  });

  it('loses nothing under load, when clients stop as soon as it is not ready', async () => {
    const { front, port } = await openFront();
    const origin = `http://127.0.0.1:${port}`;
    let sent = 0;
    let answered = 0;
    const client = async () => {
      while ((await fetch(`${origin}/health/ready`)).ok) {
        sent += 1;
        const text = await (await fetch(`${origin}/week`)).text();
        if (text === 'secret') answered += 1;
      }
    };
    const clients = Array.from({ length: CLIENTS }, client);
    await expect.poll(() => answered, { timeout: 10_000 }).toBeGreaterThan(CLIENTS * 5);
    const drained = front.drain(500);
    await Promise.all([...clients, drained]);
    expect(answered).toBe(sent);
  });

  it('tells a client that keeps its line open to close it', async () => {
    const { front, ask } = await openFront();
    const drained = front.drain(200);
    const reply = await ask('/week', { headers: { connection: 'keep-alive' } });
    expect(reply.headers.get('connection')).toBe('close');
    await drained;
  });

  it('ends a request that never ends, at the limit', async () => {
    const { handler, waiting } = slowPages();
    const { front, ask } = await openFront({ handler });
    const stuck = ask('/week');
    await expect.poll(() => waiting.length).toBe(1);
    await front.drain(0, 100);
    expect((await stuck).status).toBeNaN();
  });
});
