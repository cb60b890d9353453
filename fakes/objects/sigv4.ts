import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import { S3Fault } from './s3-fault.ts';

/** AWS Signature Version 4 as AWS documents it for S3; the checks here are the server's side of it (memory). */
const ALGORITHM = 'AWS4-HMAC-SHA256';
const SKEW_MS = 15 * 60_000;
const LONGEST_SECONDS = 7 * 86_400;

export interface Keys {
  accessKey: string;
  secretKey: string;
}

const hmac = (key: string | Buffer, data: string) => createHmac('sha256', key).update(data).digest();
export const sha256Hex = (data: string | Buffer) => createHash('sha256').update(data).digest('hex');

/** RFC 3986: everything but letters, digits and `-._~`. */
const encode = (text: string) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (mark) => `%${mark.charCodeAt(0).toString(16).toUpperCase()}`);

interface Claim {
  accessKey: string;
  /** `20261201/local/s3/aws4_request` */
  scope: string;
  signedHeaders: string[];
  signature: string;
  /** `20261201T131500Z` */
  date: string;
  payloadHash: string;
}

const malformed = (words: string) => new S3Fault(400, 'AuthorizationHeaderMalformed', words);

function splitCredential(credential: string): Pick<Claim, 'accessKey' | 'scope'> {
  const [accessKey = '', ...scope] = credential.split('/');
  if (scope.length !== 4 || scope[3] !== 'aws4_request')
    throw malformed('The credential has no valid scope.');
  return { accessKey, scope: scope.join('/') };
}

function fromHeader(request: Request, header: string): Claim {
  const fields = new Map(
    header
      .slice(ALGORITHM.length)
      .split(',')
      .map((part) => part.trim().split('=', 2) as [string, string]),
  );
  return {
    ...splitCredential(fields.get('Credential') ?? ''),
    signedHeaders: (fields.get('SignedHeaders') ?? '').split(';'),
    signature: fields.get('Signature') ?? '',
    date: request.headers.get('x-amz-date') ?? '',
    payloadHash: request.headers.get('x-amz-content-sha256') ?? 'UNSIGNED-PAYLOAD',
  };
}

function fromQuery(query: URLSearchParams): Claim {
  return {
    ...splitCredential(query.get('X-Amz-Credential') ?? ''),
    signedHeaders: (query.get('X-Amz-SignedHeaders') ?? '').split(';'),
    signature: query.get('X-Amz-Signature') ?? '',
    date: query.get('X-Amz-Date') ?? '',
    payloadHash: query.get('X-Amz-Content-Sha256') ?? 'UNSIGNED-PAYLOAD',
  };
}

/** Milliseconds since 1970; NaN for what is no date. */
const readDate = (date: string) =>
  Date.parse(date.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/, '$1-$2-$3T$4:$5:$6Z'));

function canonicalRequest(request: Request, url: URL, claim: Claim): string {
  const path = url.pathname
    .split('/')
    .map((part) => encode(decodeURIComponent(part)))
    .join('/');
  const query = [...url.searchParams]
    .filter(([name]) => name !== 'X-Amz-Signature')
    .map(([name, value]) => `${encode(name)}=${encode(value)}`)
    .sort()
    .join('&');
  const headers = claim.signedHeaders.map((name) => {
    const value = name === 'host' ? url.host : (request.headers.get(name) ?? '');
    return `${name}:${value.trim().replace(/\s+/g, ' ')}\n`;
  });
  return [
    request.method,
    path,
    query,
    headers.join(''),
    claim.signedHeaders.join(';'),
    claim.payloadHash,
  ].join('\n');
}

function signatureFor(request: Request, url: URL, claim: Claim, secretKey: string): string {
  const [day = '', region = '', service = '', end = ''] = claim.scope.split('/');
  const key = [region, service, end].reduce(hmac, hmac(`AWS4${secretKey}`, day));
  const digest = sha256Hex(canonicalRequest(request, url, claim));
  return createHmac('sha256', key)
    .update([ALGORITHM, claim.date, claim.scope, digest].join('\n'))
    .digest('hex');
}

/**
 * Checks the signature of a request, in its header or in its query.
 * @returns the payload's hash as signed, to be held against the body
 * @throws S3Fault 403 for an anonymous, wrongly signed, expired or badly timed request
 */
export function verifySignature(request: Request, keys: Keys, now: Date): string {
  const url = new URL(request.url);
  const header = request.headers.get('authorization');
  const isQuery = url.searchParams.has('X-Amz-Signature');
  if (!isQuery && !header?.startsWith(ALGORITHM)) {
    throw new S3Fault(403, 'AccessDenied', 'Anonymous access is forbidden.');
  }
  const claim = isQuery ? fromQuery(url.searchParams) : fromHeader(request, header ?? '');
  if (claim.accessKey !== keys.accessKey) {
    throw new S3Fault(403, 'InvalidAccessKeyId', 'The access key is not known here.');
  }
  if (!claim.signedHeaders.includes('host')) throw malformed('The host header must be signed.');
  const age = now.getTime() - readDate(claim.date);
  if (!(age > -SKEW_MS))
    throw new S3Fault(403, 'RequestTimeTooSkewed', 'The request is dated too far ahead.');
  if (isQuery) {
    const seconds = Number(url.searchParams.get('X-Amz-Expires'));
    if (!(seconds >= 1 && seconds <= LONGEST_SECONDS)) {
      throw new S3Fault(
        400,
        'AuthorizationQueryParametersError',
        'X-Amz-Expires must be from 1 s to 7 days.',
      );
    }
    if (age > seconds * 1000) throw new S3Fault(403, 'AccessDenied', 'Request has expired');
  } else if (age > SKEW_MS) {
    throw new S3Fault(403, 'RequestTimeTooSkewed', 'The request is too old.');
  }
  const expected = Buffer.from(signatureFor(request, url, claim, keys.secretKey));
  const given = Buffer.from(claim.signature);
  if (expected.length !== given.length || !timingSafeEqual(expected, given)) {
    throw new S3Fault(403, 'SignatureDoesNotMatch', 'The signature does not fit the request.');
  }
  return claim.payloadHash;
}
