import { createHash } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { extname, join, relative, sep } from 'node:path';

interface Encoded {
  body: Buffer;
  etag: string;
}

interface StaticFile {
  type: string;
  cache: string;
  encodings: { raw: Encoded; br?: Encoded; gzip?: Encoded };
}

export type StaticFiles = ReadonlyMap<string, StaticFile>;

const TYPES: Record<string, string> = {
  '.html': 'text/html; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.webmanifest': 'application/manifest+json',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.txt': 'text/plain; charset=utf-8',
  '.xml': 'application/xml; charset=utf-8',
};

const encoded = (body: Buffer): Encoded => ({
  body,
  etag: `"${createHash('sha256').update(body).digest('base64url').slice(0, 22)}"`,
});

const readIfThere = (path: string) => readFile(path).then(encoded, () => undefined);

/** `about.html` is served as `/about`, `index.html` as the folder. */
function addressOf(file: string): string {
  const path = `/${file.split(sep).join('/')}`;
  if (!path.endsWith('.html')) return path;
  const bare = path.slice(0, -'.html'.length).replace(/\/?index$/, '');
  return bare === '' ? '/' : bare;
}

/** Reads the built client folder into memory, with the copies compressed by the build. */
export async function loadStaticFiles(folder: string): Promise<StaticFiles> {
  const names = await readdir(folder, { recursive: true, withFileTypes: true });
  const files = names.filter((entry) => entry.isFile() && !/\.(br|gz)$/.test(entry.name));
  const entries = await Promise.all(
    files.map(async (entry) => {
      const path = join(entry.parentPath, entry.name);
      const [raw, br, gzip] = await Promise.all([
        readFile(path).then(encoded),
        readIfThere(`${path}.br`),
        readIfThere(`${path}.gz`),
      ]);
      const address = addressOf(relative(folder, path));
      const file: StaticFile = {
        type: TYPES[extname(entry.name)] ?? 'application/octet-stream',
        cache: address.startsWith('/_astro/') ? 'public, max-age=31536000, immutable' : 'no-cache',
        encodings: { raw, ...(br && { br }), ...(gzip && { gzip }) },
      };
      return [address, file] as const;
    }),
  );
  return new Map(entries);
}

function choose(file: StaticFile, accept: string): [Encoded, string | null] {
  const { raw, br, gzip } = file.encodings;
  if (br && /\bbr\b/.test(accept)) return [br, 'br'];
  if (gzip && /\bgzip\b/.test(accept)) return [gzip, 'gzip'];
  return [raw, null];
}

/**
 * Sends a file, or 304 when the browser has it. `If-Match` and `Range` are not honoured: an error page must never be
 * kept under a hashed name.
 */
export function sendStatic(
  request: IncomingMessage,
  response: ServerResponse,
  file: StaticFile,
  status = 200,
): void {
  const [chosen, encoding] = choose(file, String(request.headers['accept-encoding'] ?? ''));
  response.setHeader('etag', chosen.etag);
  response.setHeader('vary', 'accept-encoding');
  response.setHeader('cache-control', status === 200 ? file.cache : 'no-store');
  if (status === 200 && request.headers['if-none-match']?.split(/,\s*/).includes(chosen.etag)) {
    response.writeHead(304).end();
    return;
  }
  response.setHeader('content-type', file.type);
  response.setHeader('content-length', chosen.body.length);
  if (encoding) response.setHeader('content-encoding', encoding);
  response.writeHead(status);
  response.end(request.method === 'HEAD' ? undefined : chosen.body);
}

/** The uncompressed text of a prerendered page, for a reply made elsewhere. */
export const pageText = (files: StaticFiles, address: string): string | undefined =>
  files.get(address)?.encodings.raw.body.toString('utf8');
