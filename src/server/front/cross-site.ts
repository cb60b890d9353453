import type { IncomingMessage } from 'node:http';

/** The two addresses that strangers post to by design: the payment provider (signature) and a mail program (token). */
const OPEN_TO_ALL = new Set(['/api/webhooks/stripe', '/unsubscribe']);
const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Whether a request may act. Browsers say where it came from: `Sec-Fetch-Site` must be our own origin (or the address bar);
 * without it `Origin` must equal the public origin. It covers JSON, which Astro's own check lets pass.
 */
export function mayAct(request: IncomingMessage, pathname: string, publicOrigin: string): boolean {
  if (SAFE.has(request.method ?? '') || OPEN_TO_ALL.has(pathname)) return true;
  const site = request.headers['sec-fetch-site'];
  if (site !== undefined) return site === 'same-origin' || site === 'none';
  return request.headers.origin === publicOrigin;
}
