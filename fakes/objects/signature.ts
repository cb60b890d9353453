import { createHash, createHmac, timingSafeEqual } from 'node:crypto';

export interface Keys {
  accessKey: string;
  secretKey: string;
}

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');
const hmac = (key: string | Buffer, text: string) => createHmac('sha256', key).update(text).digest();
const escape = (text: string) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (char) => `%${char.charCodeAt(0).toString(16).toUpperCase()}`);

interface Claim {
  credential: string;
  date: string;
  signedHeaders: string;
  signature: string;
  payloadHash: string;
  expiresSeconds: number | null;
}

function readClaim(request: Request, url: URL): Claim | null {
  const query = url.searchParams;
  if (query.has('X-Amz-Signature')) {
    return {
      credential: query.get('X-Amz-Credential') ?? '',
      date: query.get('X-Amz-Date') ?? '',
      signedHeaders: query.get('X-Amz-SignedHeaders') ?? '',
      signature: query.get('X-Amz-Signature') ?? '',
      payloadHash: 'UNSIGNED-PAYLOAD',
      expiresSeconds: Number(query.get('X-Amz-Expires')),
    };
  }
  const header = /Credential=([^,]+), ?SignedHeaders=([^,]+), ?Signature=([0-9a-f]+)/.exec(
    request.headers.get('authorization') ?? '',
  );
  if (!header) return null;
  const [, credential = '', signedHeaders = '', signature = ''] = header;
  const payloadHash = request.headers.get('x-amz-content-sha256') ?? 'UNSIGNED-PAYLOAD';
  return {
    credential,
    signedHeaders,
    signature,
    payloadHash,
    date: request.headers.get('x-amz-date') ?? '',
    expiresSeconds: null,
  };
}

const timeOf = (date: string) =>
  Date.parse(date.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/, '$1-$2-$3T$4:$5:$6Z'));

/**
 * Checks AWS Signature Version 4, in the header or in a signed address, and the address's expiry.
 * @returns null when it may pass, else the protocol's error code
 */
export function signatureProblem(request: Request, keys: Keys, now: number): string | null {
  const url = new URL(request.url);
  const claim = readClaim(request, url);
  if (!claim) return 'AccessDenied';
  const [accessKey = '', day = '', region = '', service = ''] = claim.credential.split('/');
  if (accessKey !== keys.accessKey) return 'InvalidAccessKeyId';
  const signedAt = timeOf(claim.date);
  const livesMs = claim.expiresSeconds === null ? 15 * 60_000 : claim.expiresSeconds * 1000;
  if (!(now - signedAt <= livesMs))
    return claim.expiresSeconds === null ? 'RequestTimeTooSkewed' : 'AccessDenied';
  const query = [...url.searchParams]
    .filter(([name]) => name !== 'X-Amz-Signature')
    .map(([name, value]) => `${escape(name)}=${escape(value)}`)
    .sort()
    .join('&');
  const headers = claim.signedHeaders
    .split(';')
    .map(
      (name) =>
        `${name}:${(request.headers.get(name) ?? (name === 'host' ? url.host : '')).trim().replace(/ +/g, ' ')}\n`,
    )
    .join('');
  const canonical = [
    request.method,
    url.pathname,
    query,
    headers,
    claim.signedHeaders,
    claim.payloadHash,
  ].join('\n');
  const scope = `${day}/${region}/${service}/aws4_request`;
  const toSign = ['AWS4-HMAC-SHA256', claim.date, scope, sha256(canonical)].join('\n');
  const key = hmac(hmac(hmac(hmac(`AWS4${keys.secretKey}`, day), region), service), 'aws4_request');
  const expected = hmac(key, toSign);
  const given = Buffer.from(claim.signature, 'hex');
  return given.length === expected.length && timingSafeEqual(given, expected)
    ? null
    : 'SignatureDoesNotMatch';
}
