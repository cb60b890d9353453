import type { DocStore } from '../core/doc-store.ts';
import type { Handler } from '../core/router.ts';
import { readBody } from './body.ts';
import { listReply } from './list.ts';
import { noSuchBucket, noSuchKey, S3Fault } from './s3-fault.ts';
import { openShelf, type ObjectDoc, type Shelf } from './shelf.ts';
import { verifySignature, type Keys } from './sigv4.ts';
import { textsOf, xml } from './xml.ts';

interface ObjectsParts {
  store: DocStore;
  /** Where the bytes lie; made when missing. */
  folder: string;
  keys: Keys;
  now: () => Date;
}

interface Asked {
  request: Request;
  bucket: string;
  key: string;
  query: URLSearchParams;
  signedHash: string;
  shelf: Shelf;
}

const KEPT = /^(x-amz-meta-.+|cache-control|content-disposition|content-language)$/;
const BUCKET_NAME = /^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/;

/** Query names of calls that this stand-in has not learnt; better refused than misunderstood. */
const UNKNOWN = [
  'uploads',
  'uploadId',
  'partNumber',
  'acl',
  'policy',
  'tagging',
  'versioning',
  'lifecycle',
  'cors',
];

const notLearnt = () => new S3Fault(501, 'NotImplemented', 'This stand-in has not learnt that call.');

function objectHeaders(object: ObjectDoc): Record<string, string> {
  return {
    ...object.headers,
    'content-type': object.type,
    'content-length': String(object.bytes),
    'last-modified': new Date(object.modifiedAt).toUTCString(),
    etag: object.etag,
    'accept-ranges': 'bytes',
  };
}

/** `bytes=0-99`, `bytes=100-`, `bytes=-50`; null without one. @throws S3Fault 416 */
function readRange(header: string | null, size: number): { start: number; end: number } | null {
  const match = header && /^bytes=(\d*)-(\d*)$/.exec(header);
  if (!match || (!match[1] && !match[2])) return null;
  const [, from = '', to = ''] = match;
  const start = from ? Number(from) : Math.max(0, size - Number(to));
  const end = from && to ? Math.min(Number(to), size - 1) : size - 1;
  if (start > end) throw new S3Fault(416, 'InvalidRange', 'The requested range is not satisfiable.');
  return { start, end };
}

async function getObject({ request, bucket, key, shelf }: Asked): Promise<Response> {
  const object = await shelf.find(bucket, key);
  if (!object) throw (await shelf.hasBucket(bucket)) ? noSuchKey() : noSuchBucket();
  const headers = objectHeaders(object);
  if (request.headers.get('if-none-match') === object.etag)
    return new Response(null, { status: 304, headers });
  if (request.method === 'HEAD') return new Response(null, { headers });
  const bytes = await shelf.read(object);
  const range = readRange(request.headers.get('range'), bytes.length);
  if (!range) return new Response(new Uint8Array(bytes), { headers });
  const part = bytes.subarray(range.start, range.end + 1);
  // The checksum is of the whole, and a client would hold it against the part.
  const plain = Object.entries(headers).filter(([name]) => !name.startsWith('x-amz-checksum'));
  return new Response(new Uint8Array(part), {
    status: 206,
    headers: {
      ...Object.fromEntries(plain),
      'content-length': String(part.length),
      'content-range': `bytes ${range.start}-${range.end}/${bytes.length}`,
    },
  });
}

async function putObject({ request, bucket, key, signedHash, shelf }: Asked): Promise<Response> {
  if (request.headers.has('x-amz-copy-source')) throw notLearnt();
  const body = await readBody(request, signedHash);
  const headers = Object.fromEntries([...request.headers].filter(([name]) => KEPT.test(name)));
  const type = request.headers.get('content-type') ?? 'application/octet-stream';
  const object = await shelf.put(bucket, key, body, { type, headers });
  return new Response(null, { headers: { etag: object.etag, ...body.checksums } });
}

async function deleteMany({ request, bucket, signedHash, shelf }: Asked): Promise<Response> {
  const { bytes } = await readBody(request, signedHash);
  const keys = textsOf(bytes.toString(), 'Key');
  for (const key of keys) await shelf.remove(bucket, key);
  const quiet = textsOf(bytes.toString(), 'Quiet')[0] === 'true';
  return xml('DeleteResult', quiet ? {} : { Deleted: keys.map((key) => ({ Key: key })) });
}

async function answerBucket(asked: Asked): Promise<Response> {
  const { request, bucket, query, shelf } = asked;
  if (request.method === 'PUT') {
    if (!BUCKET_NAME.test(bucket))
      throw new S3Fault(400, 'InvalidBucketName', 'The bucket name is not valid.');
    if (await shelf.hasBucket(bucket)) {
      throw new S3Fault(409, 'BucketAlreadyOwnedByYou', 'You have this bucket already.');
    }
    await shelf.makeBucket(bucket);
    return new Response(null, { headers: { location: `/${bucket}` } });
  }
  if (!(await shelf.hasBucket(bucket))) throw noSuchBucket();
  if (request.method === 'HEAD') return new Response(null);
  if (request.method === 'GET' && query.get('list-type') === '2') {
    return listReply(bucket, await shelf.list(bucket), query);
  }
  if (request.method === 'POST' && query.has('delete')) return deleteMany(asked);
  throw notLearnt();
}

async function answerObject(asked: Asked): Promise<Response> {
  switch (asked.request.method) {
    case 'GET':
    case 'HEAD':
      return getObject(asked);
    case 'PUT':
      return putObject(asked);
    case 'DELETE':
      await asked.shelf.remove(asked.bucket, asked.key);
      return new Response(null, { status: 204 });
    default:
      throw notLearnt();
  }
}

/** An object store that speaks the S3 protocol, path style. Every request must be signed. */
export function createObjects({ store, folder, keys, now }: ObjectsParts): Handler {
  const shelf = openShelf(store, folder, now);
  return async (request) => {
    const url = new URL(request.url);
    try {
      const signedHash = verifySignature(request, keys, now());
      const [, bucket = '', ...rest] = url.pathname.split('/').map(decodeURIComponent);
      const key = rest.join('/');
      const asked: Asked = { request, bucket, key, query: url.searchParams, signedHash, shelf };
      if (!bucket || UNKNOWN.some((name) => url.searchParams.has(name))) throw notLearnt();
      return await (key ? answerObject(asked) : answerBucket(asked));
    } catch (error) {
      if (!(error instanceof S3Fault)) throw error;
      return request.method === 'HEAD'
        ? new Response(null, { status: error.status })
        : xml('Error', { Code: error.code, Message: error.message, Resource: url.pathname }, error.status);
    }
  };
}
