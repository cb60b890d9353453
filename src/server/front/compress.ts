import type { IncomingMessage, OutgoingHttpHeaders, ServerResponse } from 'node:http';
import { constants, createBrotliCompress, createGzip } from 'node:zlib';

const TEXT = /^(text\/|application\/(json|rss\+xml|xml|ld\+json)|image\/svg)/;
/** Made for each request, so quick rather than small; what never changes is compressed at the build. */
const BROTLI_QUALITY = 4;
const BODYLESS = new Set([204, 304]);

/**
 * Sends what a page or endpoint writes as brotli or gzip, when the browser takes it and the reply is text. Call it before
 * anything is written. Replies that carry an encoding already go out as they are.
 */
export function compressReply(request: IncomingMessage, response: ServerResponse): void {
  const accept = String(request.headers['accept-encoding'] ?? '');
  const encoding = /\bbr\b/.test(accept) ? 'br' : /\bgzip\b/.test(accept) ? 'gzip' : null;
  if (!encoding || request.method === 'HEAD') return;
  const writeHead = response.writeHead.bind(response) as (...args: unknown[]) => ServerResponse;
  const write = response.write.bind(response);
  const end = response.end.bind(response);

  response.writeHead = ((status: number, ...rest: unknown[]) => {
    const last = rest.at(-1);
    if (last && typeof last === 'object') {
      for (const [name, value] of Object.entries(last as OutgoingHttpHeaders))
        if (value !== undefined) response.setHeader(name, value);
      rest.pop();
    }
    const type = String(response.getHeader('content-type') ?? '');
    if (TEXT.test(type) && !BODYLESS.has(status) && !response.hasHeader('content-encoding')) start();
    return writeHead(status, ...rest);
  }) as typeof response.writeHead;

  function start(): void {
    response.setHeader('content-encoding', encoding ?? '');
    response.appendHeader('vary', 'accept-encoding');
    response.removeHeader('content-length');
    const squeeze =
      encoding === 'br'
        ? createBrotliCompress({ params: { [constants.BROTLI_PARAM_QUALITY]: BROTLI_QUALITY } })
        : createGzip();
    squeeze.on('data', (bytes: Buffer) => write(bytes));
    squeeze.on('end', () => end());
    squeeze.on('error', () => response.destroy());
    response.on('close', () => squeeze.destroy());
    response.write = ((chunk: string | Uint8Array) => squeeze.write(chunk)) as typeof response.write;
    response.end = ((chunk?: string | Uint8Array) => {
      if (chunk === undefined) squeeze.end();
      else squeeze.end(chunk);
      return response;
    }) as typeof response.end;
  }
}
