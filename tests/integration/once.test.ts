import type { APIContext } from 'astro';
import { eq } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { drafts, idempotencyKeys } from '#server/db/schema/index';
import { writeEndpoint } from '#server/endpoint';
import { once } from '#server/once';
import type { Viewer } from '#server/services/viewer';
import { addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();

/** Adds a row a sending: a second one would show. */
const write = (viewer: Viewer, key: string, body: unknown = { words: 'a' }) =>
  once(world.app, viewer.id, { key, body }, async (tx) => {
    const name = randomUUID();
    await tx.insert(drafts).values({ userId: viewer.id, key: name, body: {}, savedAt: world.clock.now() });
    return { name };
  });
const writtenBy = ({ id }: Viewer) => world.app.db.$count(drafts, eq(drafts.userId, id));

describe('a write with a key', () => {
  it('is done once, however often it is sent, and answers the same each time', async () => {
    const viewer = await addPerson(world.app, 'member');
    const key = randomUUID();
    const first = await write(viewer, key);
    expect(first.replayed).toBe(false);
    expect(await write(viewer, key)).toEqual({ ...first, replayed: true });
    expect(await writtenBy(viewer)).toBe(1);
  });

  it('is done once when twenty arrive together', async () => {
    const viewer = await addPerson(world.app, 'member');
    const key = randomUUID();
    const replies = await Promise.all(Array.from({ length: 20 }, () => write(viewer, key)));
    expect(replies.filter(({ replayed }) => !replayed)).toHaveLength(1);
    expect(new Set(replies.map(({ reply }) => reply.name)).size).toBe(1);
    expect(await writtenBy(viewer)).toBe(1);
  });

  it('is refused when the key comes again with other contents', async () => {
    const viewer = await addPerson(world.app, 'member');
    const key = randomUUID();
    await write(viewer, key);
    await expect(write(viewer, key, { words: 'b' })).rejects.toMatchObject({ code: 'conflict', status: 409 });
    expect(await writtenBy(viewer)).toBe(1);
  });

  it('is free again when the first one failed', async () => {
    const viewer = await addPerson(world.app, 'member');
    const key = randomUUID();
    const broken = once(world.app, viewer.id, { key, body: {} }, () => Promise.reject(new Error('broken')));
    await expect(broken).rejects.toThrow('broken');
    expect(await world.app.db.$count(idempotencyKeys, eq(idempotencyKeys.key, key))).toBe(0);
    expect((await write(viewer, key)).replayed).toBe(false);
  });

  it('belongs to its person: the same key of another is another write', async () => {
    const [one, two] = [await addPerson(world.app, 'member'), await addPerson(world.app, 'member')];
    const key = randomUUID();
    await write(one, key);
    expect((await write(two, key)).replayed).toBe(false);
  });
});

describe('a write endpoint', () => {
  const Input = z.strictObject({ words: z.string('Write a word or two.').min(1, 'Write a word or two.') });
  const endpoint = writeEndpoint(['member'], Input, ({ input }) => Promise.resolve({ said: input.words }));

  async function send(viewer: Viewer | null, body: string, headers: Record<string, string> = {}) {
    const request = new Request('http://localhost/api/words', {
      method: 'POST',
      body,
      headers: { 'content-type': 'application/json', 'idempotency-key': randomUUID(), ...headers },
    });
    const context = { request, params: {}, locals: { app: world.app, viewer } };
    return endpoint(context as unknown as APIContext);
  }

  it('takes what fits and says when it was a repetition', async () => {
    const viewer = await addPerson(world.app, 'member');
    const key = { 'idempotency-key': randomUUID() };
    const [first, second] = [
      await send(viewer, '{"words":"a"}', key),
      await send(viewer, '{"words":"a"}', key),
    ];
    expect([first.headers.get('idempotent-replay'), second.headers.get('idempotent-replay')]).toEqual([
      null,
      'true',
    ]);
    expect(await second.json()).toEqual({ said: 'a' });
  });

  it.each([
    ['an empty field', '{"words":""}', {}, 'invalid'],
    ['a missing field', '{}', {}, 'invalid'],
    ['a wrong type', '{"words":7}', {}, 'invalid'],
    ['a field it does not know', '{"words":"a","role":"owner"}', {}, 'bad-request'],
    ['half a message', '{"words":', {}, 'bad-request'],
    ['another type', 'words=a', { 'content-type': 'application/x-www-form-urlencoded' }, 'wrong-type'],
    ['no key', '{"words":"a"}', { 'idempotency-key': '' }, 'bad-request'],
    [
      'a key with odd characters',
      '{"words":"a"}',
      { 'idempotency-key': "'; drop table users; --" },
      'bad-request',
    ],
  ])('refuses %s', async (_name, body, headers, code) => {
    const viewer = await addPerson(world.app, 'member');
    await expect(send(viewer, body, headers)).rejects.toMatchObject({ code });
  });

  it('asks who it is before it reads anything', async () => {
    await expect(send(null, 'not even JSON')).rejects.toMatchObject({ code: 'signed-out' });
    for (const role of ['visitor', 'coach', 'owner'] as const) {
      const viewer = await addPerson(world.app, role);
      await expect(send(viewer, '{"words":"a"}')).rejects.toMatchObject({ code: 'forbidden' });
    }
  });
});
