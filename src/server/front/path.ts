/** What the raw request target became: a path to route, a place to redirect to, or nothing we answer. */
export type PathVerdict =
  { kind: 'path'; pathname: string; search: string } | { kind: 'move'; to: string } | { kind: 'refuse' };

const TARGET_MAX = 4096;
/** Control and non-ASCII characters, fragment, backslash and semicolon: one class, no nested repeat. */
const FOREIGN = /[^\x21-\x7e]|[#\\;]/;
/** Escapes that hide a per cent sign, a slash, a backslash, a semicolon or a control character. */
const HIDDEN = /%(25|2f|5c|3b|[01][0-9a-f]|7f)/i;
const BROKEN_ESCAPE = /%(?![0-9a-fA-F]{2})/;
const PLAIN = /[^A-Za-z0-9\-._~!$&'()*+,=:@/]/g;

const reencode = (text: string) => text.replace(PLAIN, (char) => encodeURIComponent(char));

/**
 * Makes the path of a request canonical before anything routes on it, so that one page has one spelling and a guard by
 * prefix cannot be passed. Another spelling of a GET is redirected (308); anything hostile, and any other method, is refused.
 */
export function canonicalPath(target: string, method: string): PathVerdict {
  if (!target.startsWith('/') || target.length > TARGET_MAX || FOREIGN.test(target))
    return { kind: 'refuse' };
  const query = target.indexOf('?');
  const raw = query === -1 ? target : target.slice(0, query);
  const search = query === -1 ? '' : target.slice(query);
  if (HIDDEN.test(raw) || BROKEN_ESCAPE.test(raw)) return { kind: 'refuse' };
  let decoded: string;
  try {
    decoded = decodeURIComponent(raw);
  } catch {
    return { kind: 'refuse' };
  }
  if (decoded.split('/').some((segment) => segment === '.' || segment === '..')) return { kind: 'refuse' };
  const folded = decoded.replace(/\/{2,}/g, '/');
  const canonical = reencode(folded.length > 1 && folded.endsWith('/') ? folded.slice(0, -1) : folded);
  if (canonical === raw) return { kind: 'path', pathname: canonical, search };
  return method === 'GET' || method === 'HEAD'
    ? { kind: 'move', to: canonical + search }
    : { kind: 'refuse' };
}
