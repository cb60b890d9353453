import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { Log } from '#server/log';
import { bodyLimit, countedBody, statedTooLarge } from './body.ts';
import { clientAddress } from './client-address.ts';
import { compressReply } from './compress.ts';
import { mayAct } from './cross-site.ts';
import { applyHeaders, cleanForAstro, securityHeaders, type HeaderPolicy } from './headers.ts';
import { canonicalPath } from './path.ts';
import { pageText, sendStatic, type StaticFiles } from './static-files.ts';

/** The built Astro handler (`dist/server/entry.mjs`). */
export type AstroHandler = (
  request: IncomingMessage,
  response: ServerResponse,
  next: (error?: unknown) => void,
  locals: Record<string, unknown>,
) => Promise<void> | void;

export interface FrontOptions {
  handler: AstroHandler;
  files: StaticFiles;
  policy: HeaderPolicy;
  publicOrigin: string;
  trustedProxies: number;
  log: Log;
  /** Throws when the database does not answer. */
  checkReady: () => Promise<void>;
  /** Put beside every request for pages and endpoints. */
  locals: Record<string, unknown>;
}

export interface Front {
  server: Server;
  /** Answers not ready, lets running requests end, then closes. */
  drain(waitMs?: number, limitMs?: number): Promise<void>;
}

/** Parts of Astro's server that this product never uses and that therefore never answer. */
const CLOSED = ['/_image', '/_server-islands', '/_actions', '/api/auth'];
const UNREADABLE: Record<string, string> = {
  HPE_HEADER_OVERFLOW: '431 Request Header Fields Too Large',
  ERR_HTTP_REQUEST_TIMEOUT: '408 Request Timeout',
};
const NOTHING_MORE = 'cache-control: no-store\r\nconnection: close\r\ncontent-length: 0\r\n\r\n';
const METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'DELETE']);

/**
 * Our own HTTP front around the Astro adapter: everything that must hold before a route is chosen holds here.
 */
export function createFront(options: FrontOptions): Front {
  const { files, log } = options;
  const headers = securityHeaders(options.policy);
  let draining = false;

  const errorPage = (status: number) => pageText(files, `/${status}`);

  function plain(response: ServerResponse, status: number, words: string): void {
    if (response.headersSent) return void response.destroy();
    response.setHeader('cache-control', 'no-store');
    response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8' }).end(words);
  }

  function missing(request: IncomingMessage, response: ServerResponse): void {
    const page = files.get('/404');
    if (page) sendStatic(request, response, page, 404);
    else plain(response, 404, 'There is nothing here.');
  }

  async function health(pathname: string, response: ServerResponse): Promise<void> {
    if (pathname === '/health/live') return plain(response, 200, 'alive');
    const ready =
      !draining &&
      (await options.checkReady().then(
        () => true,
        () => false,
      ));
    plain(response, ready ? 200 : 503, ready ? 'ready' : 'not ready');
  }

  async function answer(
    request: IncomingMessage,
    response: ServerResponse,
    requestId: string,
  ): Promise<void> {
    const method = request.method ?? 'GET';
    if (!METHODS.has(method)) return plain(response, 405, 'That is not done here.');
    const verdict = canonicalPath(request.url ?? '', method);
    if (verdict.kind === 'refuse') return plain(response, 400, 'That address is not one of ours.');
    if (verdict.kind === 'move') return void response.writeHead(308, { location: verdict.to }).end();
    const { pathname } = verdict;
    if (pathname === '/health/live' || pathname === '/health/ready') return health(pathname, response);
    const file = method === 'GET' || method === 'HEAD' ? files.get(pathname) : undefined;
    if (file) return sendStatic(request, response, file);
    if (
      pathname.startsWith('/_astro/') ||
      CLOSED.some((root) => pathname === root || pathname.startsWith(`${root}/`))
    ) {
      return missing(request, response);
    }
    const limit = bodyLimit(pathname);
    if (statedTooLarge(request, limit)) {
      response.setHeader('connection', 'close');
      return plain(response, 413, 'That is larger than this address takes.');
    }
    if (!mayAct(request, pathname, options.publicOrigin))
      return plain(response, 403, 'That came from another site.');
    return render(request, response, requestId, limit);
  }

  async function render(
    request: IncomingMessage,
    response: ServerResponse,
    requestId: string,
    limit: number,
  ): Promise<void> {
    const clientIp = clientAddress(request, options.trustedProxies);
    cleanForAstro(request, clientIp);
    compressReply(request, response);
    if (request.method !== 'GET' && request.method !== 'HEAD') {
      // Astro turns the throw into its error reply; the status is put right just before it goes out.
      let tooLarge = false;
      const writeHead = response.writeHead.bind(response) as (...args: unknown[]) => ServerResponse;
      response.writeHead = ((status: number, ...rest: unknown[]) => {
        if (tooLarge) response.setHeader('connection', 'close');
        return writeHead(tooLarge ? 413 : status, ...rest);
      }) as typeof response.writeHead;
      Object.assign(request, { body: countedBody(request, limit, () => (tooLarge = true)) });
    }
    response.setHeader('cache-control', 'private, no-store');
    await options.handler(request, response, () => missing(request, response), {
      ...options.locals,
      requestId,
      clientIp,
      errorPage,
    });
  }

  const server = createServer((request, response) => {
    const requestId = randomUUID();
    const began = performance.now();
    const path = (request.url ?? '').split('?', 1)[0];
    response.setHeader('x-request-id', requestId);
    applyHeaders(response, headers);
    if (draining) response.setHeader('connection', 'close');
    response.on('finish', () => {
      const ms = Math.round((performance.now() - began) * 10) / 10;
      log.info({ requestId, method: request.method, path, status: response.statusCode, ms }, 'request');
    });
    answer(request, response, requestId).catch((error: unknown) => {
      log.error({ requestId, fault: error instanceof Error ? error.stack : 'unknown' }, 'fault in the front');
      plain(response, 500, 'Something broke on our side. Try again.');
    });
  });
  // What Node.js cannot read as a request never becomes one; its answer carries the same headers all the same.
  server.on('clientError', (error: NodeJS.ErrnoException, socket) => {
    if (!socket.writable) return void socket.destroy();
    const lines = headers.map(([name, value]) => `${name}: ${value}\r\n`).join('');
    socket.end(`HTTP/1.1 ${UNREADABLE[error.code ?? ''] ?? '400 Bad Request'}\r\n${lines}${NOTHING_MORE}`);
  });
  server.headersTimeout = 20_000;
  server.requestTimeout = 60_000;
  server.keepAliveTimeout = 65_000;

  return {
    server,
    async drain(waitMs = 1_000, limitMs = 10_000) {
      draining = true;
      await new Promise((resolve) => setTimeout(resolve, waitMs));
      await new Promise<void>((resolve) => {
        const hardEnd = setTimeout(() => server.closeAllConnections(), limitMs);
        server.close(() => {
          clearTimeout(hardEnd);
          resolve();
        });
        server.closeIdleConnections();
      });
    },
  };
}
