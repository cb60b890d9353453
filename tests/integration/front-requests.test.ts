import { describe, expect, it } from 'vitest';
import { openFront, ORIGIN, parseReply, speak } from '#support/front';

const JSON_TYPE = { 'content-type': 'application/json' };
const SAME_SITE = { ...JSON_TYPE, 'sec-fetch-site': 'same-origin' };
const MEGABYTE = 1024 * 1024;
const stated = (bytes: number) => ({ ...SAME_SITE, 'content-length': String(bytes) });

/** A POST whose body comes in chunks, without a stated length. */
function chunked(target: string, bytes: number): string {
  const size = 64 * 1024;
  const chunk = `${size.toString(16)}\r\n${'x'.repeat(size)}\r\n`;
  const lines = Object.entries({ ...SAME_SITE, host: 'newel.example', 'transfer-encoding': 'chunked' });
  const head = lines.map(([name, value]) => `${name}: ${value}\r\n`).join('');
  return `POST ${target} HTTP/1.1\r\n${head}connection: close\r\n\r\n${chunk.repeat(Math.ceil(bytes / size))}0\r\n\r\n`;
}

describe('hole 4, a body without bounds', () => {
  it('9 MB to /_server-islands are answered before they are sent, and reach nothing', async () => {
    const { ask, seen } = await openFront();
    const reply = await ask('/_server-islands/Any', { method: 'POST', headers: stated(9 * MEGABYTE) });
    expect(reply.status).toBe(404);
    expect(seen).toEqual([]);
  });

  it.each([
    ['/api/messages', MEGABYTE + 1],
    ['/api/photos', 12 * MEGABYTE + 1],
    ['/week', 9 * MEGABYTE],
  ])('%s with %i bytes stated is refused before a byte is read', async (target, bytes) => {
    const { ask, seen } = await openFront();
    const { status, headers } = await ask(target, { method: 'POST', headers: stated(bytes) });
    expect([status, headers.get('connection')]).toEqual([413, 'close']);
    expect(seen).toEqual([]);
  });

  it.each(['-1', '1e99', 'many'])('a stated length of %s is no length', async (length) => {
    const { ask, seen } = await openFront();
    const { status } = await ask('/api/messages', {
      method: 'POST',
      headers: { ...SAME_SITE, 'content-length': length },
    });
    expect([400, 413]).toContain(status);
    expect(seen).toEqual([]);
  });

  it('a chunked body is cut off where the limit is', async () => {
    const { port, seen } = await openFront();
    const reply = parseReply(await speak(port, chunked('/api/messages', 2 * MEGABYTE)));
    expect([reply.status, reply.headers.get('connection')]).toEqual([413, 'close']);
    expect(seen).toEqual([]);
  });

  it('a chunked body within the limit arrives whole', async () => {
    const { port, seen } = await openFront();
    const reply = parseReply(await speak(port, chunked('/api/messages', MEGABYTE / 2)));
    expect(reply.status).toBe(200);
    expect(seen[0]?.body).toHaveLength(MEGABYTE / 2);
  });

  it('a photo of 2 MB goes through where photos go', async () => {
    const { port, seen } = await openFront();
    expect(parseReply(await speak(port, chunked('/api/photos', 2 * MEGABYTE))).status).toBe(200);
    expect(seen[0]?.body).toHaveLength(2 * MEGABYTE);
  });
});

describe('what another site sends', () => {
  it.each([
    ['a JSON post that says so', { ...JSON_TYPE, 'sec-fetch-site': 'cross-site' }],
    ['a sister domain', { ...JSON_TYPE, 'sec-fetch-site': 'same-site' }],
    ['with our origin forged beside it', { ...JSON_TYPE, 'sec-fetch-site': 'cross-site', origin: ORIGIN }],
    ['JSON from a foreign origin, in an older browser', { ...JSON_TYPE, origin: 'https://evil.example' }],
    [
      'a form from a foreign origin',
      { 'content-type': 'application/x-www-form-urlencoded', origin: 'https://evil.example' },
    ],
    ['from a page without an origin', { ...JSON_TYPE, origin: 'null' }],
    ['our host with another port', { ...JSON_TYPE, origin: `${ORIGIN}:8443` }],
    ['without any word of where it comes from', JSON_TYPE],
  ])('%s is refused', async (_name, headers) => {
    const { ask, seen } = await openFront();
    for (const method of ['POST', 'PUT', 'DELETE']) {
      expect((await ask('/api/messages', { method, headers, body: '{}' })).status).toBe(403);
    }
    expect(seen).toEqual([]);
  });

  it.each([
    ['our own page', { ...JSON_TYPE, 'sec-fetch-site': 'same-origin' }],
    ['the address bar', { ...JSON_TYPE, 'sec-fetch-site': 'none' }],
    ['our own page in an older browser', { ...JSON_TYPE, origin: ORIGIN }],
  ])('%s is let through', async (_name, headers) => {
    const { ask } = await openFront();
    expect((await ask('/api/messages', { method: 'POST', headers, body: '{}' })).status).toBe(200);
  });

  it.each(['/api/webhooks/stripe', '/unsubscribe', '/unsubscribe?t=1'])(
    '%s takes strangers, by design',
    async (target) => {
      const { ask } = await openFront();
      expect((await ask(target, { method: 'POST', headers: JSON_TYPE, body: '{}' })).status).toBe(200);
    },
  );

  it.each(['/api/webhooks/stripe/x', '/unsubscribe/all', '/api/webhooks'])('%s does not', async (target) => {
    const { ask } = await openFront();
    expect((await ask(target, { method: 'POST', headers: JSON_TYPE, body: '{}' })).status).toBe(403);
  });
});

describe('what a client claims about itself', () => {
  const FORGED = {
    'x-forwarded-for': '203.0.113.9',
    'x-forwarded-host': 'evil.example',
    'x-forwarded-proto': 'http',
    'x-forwarded-port': '81',
    'x-astro-path': '/desk',
  };

  it('is not believed without a proxy of ours', async () => {
    const { ask, seen } = await openFront();
    await ask('/week', { headers: { ...FORGED, host: 'evil.example' } });
    expect(seen[0]?.clientIp).toBe('127.0.0.1');
    expect(seen[0]?.headers).toMatchObject({ host: 'localhost', 'x-forwarded-for': '127.0.0.1' });
    for (const name of ['x-forwarded-host', 'x-forwarded-proto', 'x-forwarded-port', 'x-astro-path'])
      expect(seen[0]?.headers).not.toHaveProperty(name);
    expect(JSON.stringify(seen)).not.toContain('evil.example');
  });

  it.each([
    [1, '198.51.100.7', '198.51.100.7'],
    [1, '203.0.113.9, 198.51.100.7', '198.51.100.7'],
    [2, '203.0.113.9, 198.51.100.7, 10.0.0.1', '198.51.100.7'],
    [2, '10.0.0.1', '127.0.0.1'],
    [1, '', '127.0.0.1'],
  ])('behind %i proxies "%s" means %s', async (trustedProxies, forwarded, expected) => {
    const { ask, seen } = await openFront({ trustedProxies });
    await ask('/week', { headers: { 'x-forwarded-for': forwarded } });
    expect(seen[0]?.clientIp).toBe(expected);
  });
});
