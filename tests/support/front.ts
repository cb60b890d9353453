import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { connect, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach } from 'vitest';
import { createFront, type Front, type FrontOptions } from '#server/front/server';
import { loadStaticFiles } from '#server/front/static-files';
import { createLog } from '#server/log';

export const ORIGIN = 'https://newel.example';
const BUILT = {
  'index.html': '<h1>Newel</h1>',
  '404.html': '<h1>There is nothing here</h1>',
  '500.html': '<h1>Something broke</h1>',
  '_astro/page.abc123.js': 'export const hall = 1;\n'.repeat(40),
};

/** What the pages behind the front saw. */
interface Seen {
  url: string;
  headers: IncomingMessage['headers'];
  clientIp: unknown;
  body: string;
}

export interface Reply {
  status: number;
  headers: Map<string, string>;
  body: string;
}

/** A client on the bare socket: it sends exactly these bytes and reads until the server closes or falls silent. */
export function speak(port: number, bytes: string | Buffer): Promise<string> {
  return new Promise((done, fail) => {
    const socket = connect(port, '127.0.0.1', () => socket.write(bytes));
    let heard = '';
    socket.setEncoding('utf8');
    socket.on('data', (chunk: string) => (heard += chunk));
    socket.on('end', () => done(heard));
    // A server that refuses a body in mid-flight may reset the line after its answer.
    socket.on('error', (error) => (heard ? done(heard) : fail(error)));
    socket.on('close', () => done(heard));
  });
}

export function parseReply(text: string): Reply {
  const [head = '', ...rest] = text.split('\r\n\r\n');
  const [line = '', ...lines] = head.split('\r\n');
  const headers = lines.map((each): [string, string] => {
    const at = each.indexOf(':');
    return [each.slice(0, at).toLowerCase(), each.slice(at + 1).trim()];
  });
  return { status: Number(line.split(' ')[1]), headers: new Map(headers), body: rest.join('\r\n\r\n') };
}

async function readBody(request: IncomingMessage): Promise<string> {
  const source = (request as IncomingMessage & { body?: AsyncIterable<Buffer> }).body ?? request;
  let body = '';
  for await (const chunk of source) body += String(chunk);
  return body;
}

const opened: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const close of opened.splice(0)) await close();
});

/** The real front on a free port, before pages that note what reaches them and answer `secret`. */
export async function openFront(over: Partial<FrontOptions> = {}) {
  const folder = await mkdtemp(join(tmpdir(), 'newel-front-'));
  for (const [name, text] of Object.entries(BUILT)) {
    await mkdir(dirname(join(folder, name)), { recursive: true });
    await writeFile(join(folder, name), text);
  }
  const seen: Seen[] = [];
  const front: Front = createFront({
    async handler(request, response: ServerResponse, _next, locals) {
      const { url = '', headers } = request;
      try {
        const body = await readBody(request);
        seen.push({ url, headers: { ...headers }, clientIp: locals['clientIp'], body });
        response.writeHead(200, { 'content-type': 'text/plain' }).end('secret');
      } catch {
        response.writeHead(500).end('the page broke');
      }
    },
    files: await loadStaticFiles(folder),
    policy: {
      scriptHashes: ["'sha256-abc'"],
      styleHashes: ["'sha256-def'"],
      formTargets: ['https://pay.example'],
      secure: true,
    },
    publicOrigin: ORIGIN,
    trustedProxies: 0,
    log: createLog('silent'),
    checkReady: () => Promise.resolve(),
    locals: {},
    ...over,
  });
  await new Promise<void>((done) => front.server.listen(0, '127.0.0.1', done));
  const { port } = front.server.address() as AddressInfo;
  opened.push(async () => {
    front.server.closeAllConnections();
    if (front.server.listening) await new Promise((done) => front.server.close(done));
    await rm(folder, { recursive: true });
  });

  /** One request on its own line. `target` goes out as it stands, however wrong it is. */
  const ask = async (
    target: string,
    {
      method = 'GET',
      headers = {},
      body = '',
    }: { method?: string; headers?: Record<string, string>; body?: string } = {},
  ) => {
    const lines = {
      host: 'newel.example',
      connection: 'close',
      ...(body && { 'content-length': String(Buffer.byteLength(body)) }),
      ...headers,
    };
    const head = Object.entries(lines).map(([name, value]) => `${name}: ${value}\r\n`);
    return parseReply(await speak(port, `${method} ${target} HTTP/1.1\r\n${head.join('')}\r\n${body}`));
  };
  return { front, port, seen, ask };
}
