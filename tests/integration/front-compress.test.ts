import { request, type IncomingMessage, type ServerResponse } from 'node:http';
import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { openFront } from '#support/front';

const WORDS = 'The landing is where the climb is judged. '.repeat(200);

/** A page that writes in two pieces, as Astro does, with the length it would have unpacked. */
const page = (type: string) => (_request: IncomingMessage, response: ServerResponse) => {
  response.writeHead(200, { 'content-type': type, 'content-length': String(WORDS.length), vary: 'cookie' });
  response.write(WORDS.slice(0, 100));
  response.end(WORDS.slice(100));
};

/** The reply as raw bytes: `fetch` would unpack it and hide what went over the line. */
function raw(port: number, accept: string) {
  return new Promise<{ headers: IncomingMessage['headers']; body: Buffer }>((done, fail) => {
    const asked = request(
      { port, host: '127.0.0.1', path: '/week', headers: { 'accept-encoding': accept } },
      (reply) => {
        const pieces: Buffer[] = [];
        reply.on('data', (piece: Buffer) => pieces.push(piece));
        reply.on('end', () => done({ headers: reply.headers, body: Buffer.concat(pieces) }));
      },
    );
    asked.on('error', fail).end();
  });
}

describe('pages made for one person are compressed on the way out', () => {
  it.each([
    ['br', 'gzip, deflate, br', brotliDecompressSync],
    ['gzip', 'gzip', gunzipSync],
  ] as const)('as %s when the browser takes it', async (encoding, accept, unpack) => {
    const { port } = await openFront({ handler: page('text/html; charset=utf-8') });
    const { headers, body } = await raw(port, accept);
    expect(headers['content-encoding']).toBe(encoding);
    expect(headers['content-length']).toBeUndefined();
    expect(headers.vary).toBe('cookie, accept-encoding');
    expect(body.length).toBeLessThan(WORDS.length / 10);
    expect(unpack(body).toString('utf8')).toBe(WORDS);
  });

  it.each([
    ['the browser takes none', 'text/html', 'identity'],
    ['it is a picture', 'image/webp', 'br'],
  ])('not when %s', async (_why, type, accept) => {
    const { port } = await openFront({ handler: page(type) });
    const { headers, body } = await raw(port, accept);
    expect(headers['content-encoding']).toBeUndefined();
    expect(body.toString('utf8')).toBe(WORDS);
  });

  it('and leaves replies without a body alone', async () => {
    const empty = (_request: IncomingMessage, response: ServerResponse) =>
      void response.writeHead(204, { 'content-type': 'text/html' }).end();
    const { port } = await openFront({ handler: empty });
    const { headers, body } = await raw(port, 'br');
    expect(headers['content-encoding']).toBeUndefined();
    expect(body.length).toBe(0);
  });
});
