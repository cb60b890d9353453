import { createHash } from 'node:crypto';
import { crc32 } from 'node:zlib';
import { S3Fault } from './s3-fault.ts';
import { sha256Hex } from './sigv4.ts';

export interface Body {
  bytes: Buffer;
  /** `x-amz-checksum-*` headers that came with the body or after it. */
  checksums: Record<string, string>;
}

const CRLF = Buffer.from('\r\n');

function readTrailer(text: string): Record<string, string> {
  const pairs = text
    .split('\r\n')
    .filter((line) => line.includes(':'))
    .map((line) => [
      line.slice(0, line.indexOf(':')).toLowerCase(),
      line.slice(line.indexOf(':') + 1).trim(),
    ]);
  return Object.fromEntries(pairs) as Record<string, string>;
}

/** `aws-chunked`: pieces each with its length in hexadecimal, then an empty one, then headers that follow the body. */
function decodeChunks(raw: Buffer): Body {
  const pieces: Buffer[] = [];
  let at = 0;
  for (;;) {
    const lineEnd = raw.indexOf(CRLF, at);
    const size = Number.parseInt(raw.toString('latin1', at, lineEnd), 16);
    const start = lineEnd + CRLF.length;
    if (lineEnd < 0 || Number.isNaN(size) || start + size > raw.length) {
      throw new S3Fault(400, 'IncompleteBody', 'The body ends in the middle of a piece.');
    }
    if (size === 0)
      return { bytes: Buffer.concat(pieces), checksums: readTrailer(raw.toString('latin1', start)) };
    pieces.push(raw.subarray(start, start + size));
    at = start + size + CRLF.length;
  }
}

/** Checksums that we can work out, in base64 as the protocol writes them. */
const DIGESTS: Record<string, (bytes: Buffer) => string> = {
  'x-amz-checksum-crc32': (bytes) => {
    const sum = Buffer.alloc(4);
    sum.writeUInt32BE(crc32(bytes));
    return sum.toString('base64');
  },
  'x-amz-checksum-sha1': (bytes) => createHash('sha1').update(bytes).digest('base64'),
  'x-amz-checksum-sha256': (bytes) => createHash('sha256').update(bytes).digest('base64'),
};

/**
 * The body as it was meant, held against the signed hash and the checksums that came with it.
 * @throws S3Fault 400 when it arrived changed
 */
export async function readBody(request: Request, signedHash: string): Promise<Body> {
  const raw = Buffer.from(await request.arrayBuffer());
  const chunked = request.headers.get('content-encoding')?.includes('aws-chunked') ?? false;
  const body = chunked ? decodeChunks(raw) : { bytes: raw, checksums: {} };
  if (/^[0-9a-f]{64}$/.test(signedHash) && sha256Hex(raw) !== signedHash) {
    throw new S3Fault(400, 'XAmzContentSHA256Mismatch', 'The body does not have the hash that was signed.');
  }
  const url = new URL(request.url);
  const checksums: Record<string, string> = {};
  for (const [name, digest] of Object.entries(DIGESTS)) {
    // A signed address may carry the checksum of an empty body, worked out before there was one.
    const given = body.checksums[name] ?? (url.searchParams.has(name) ? null : request.headers.get(name));
    if (!given) continue;
    if (digest(body.bytes) !== given) throw new S3Fault(400, 'BadDigest', `${name} does not fit the body.`);
    checksums[name] = given;
  }
  return { bytes: body.bytes, checksums };
}
