import type { IncomingMessage, ServerResponse } from 'node:http';

export interface HeaderPolicy {
  /** Hashes of every inline script and style the build made: `'sha256-…'`. */
  scriptHashes: readonly string[];
  styleHashes: readonly string[];
  /** Where a form of ours may end after its redirect: the payment pages. */
  formTargets: readonly string[];
  secure: boolean;
}

/** The one Content-Security-Policy of every reply. No `unsafe-inline` for scripts or style elements. */
export function contentSecurityPolicy(policy: HeaderPolicy): string {
  return [
    "default-src 'none'",
    `script-src 'self' ${policy.scriptHashes.join(' ')}`,
    `style-src 'self' ${policy.styleHashes.join(' ')}`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    "manifest-src 'self'",
    "worker-src 'self'",
    "media-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    `form-action 'self' ${policy.formTargets.join(' ')}`.trim(),
    "frame-ancestors 'none'",
  ].join('; ');
}

/** The headers of every reply, errors and 304 included, worked out once. */
export function securityHeaders(policy: HeaderPolicy): readonly (readonly [string, string])[] {
  return [
    ['content-security-policy', contentSecurityPolicy(policy)],
    ['x-content-type-options', 'nosniff'],
    ['referrer-policy', 'same-origin'],
    ['cross-origin-opener-policy', 'same-origin'],
    ['cross-origin-resource-policy', 'same-origin'],
    ['permissions-policy', 'camera=(), geolocation=(), microphone=(), payment=(), usb=()'],
    ...(policy.secure ? [['strict-transport-security', 'max-age=63072000; includeSubDomains'] as const] : []),
  ];
}

export function applyHeaders(
  response: ServerResponse,
  headers: readonly (readonly [string, string])[],
): void {
  for (const [name, value] of headers) response.setHeader(name, value);
}

const NEVER_HANDED_ON = [
  'if-match',
  'if-unmodified-since',
  'if-range',
  'range',
  'if-none-match',
  'if-modified-since',
];

/**
 * What Astro sees: no conditional and no forwarded header of the client's, our own host and origin (so one build serves any
 * public origin), and the address we computed.
 */
export function cleanForAstro(request: IncomingMessage, clientIp: string): void {
  for (const name of Object.keys(request.headers)) {
    if (name.startsWith('x-forwarded-') || name.startsWith('x-astro-') || NEVER_HANDED_ON.includes(name)) {
      delete request.headers[name];
    }
  }
  request.headers.host = 'localhost';
  request.headers.origin = 'http://localhost';
  request.headers['x-forwarded-for'] = clientIp;
}
