import { createHash } from 'node:crypto';
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Doc, DocStore } from '../core/doc-store.ts';
import type { Handler } from '../core/doors.ts';
import { signatureProblem, type Keys } from './signature.ts';

interface Stored extends Doc {
  bucket: string;
  key: string;
  /** Our own file name: what a client calls it never reaches the disk. */
  file: string;
  type: string;
  size: number;
  etag: string;
}

const xml = (status: number, body: string) =>
  new Response(`<?xml version="1.0" encoding="UTF-8"?>${body}`, {
    status,
    headers: { 'content-type': 'application/xml' },
  });
const fault = (status: number, code: string) =>
  xml(status, `<Error><Code>${code}</Code><Message>${code}</Message></Error>`);

/** Takes the chunks of an `aws-chunked` body apart: `size;extensions CRLF bytes CRLF …`, then trailers. */
export function decodeAwsChunked(body: Buffer): Buffer {
  const parts: Buffer[] = [];
  for (let at = 0; ;) {
    const lineEnd = body.indexOf('\r\n', at);
    const size = parseInt(body.subarray(at, lineEnd).toString('latin1'), 16);
    if (lineEnd === -1 || !(size > 0)) return Buffer.concat(parts);
    parts.push(body.subarray(lineEnd + 2, lineEnd + 2 + size));
    at = lineEnd + 2 + size + 2;
  }
}

/** The object store stand-in: the S3 protocol, path style, signatures checked, nobody reads without one. */
export function createObjects(options: {
  store: DocStore;
  folder: string;
  keys: Keys;
  now: () => number;
  newId: (prefix: string) => string;
}): Handler {
  const { store, folder } = options;
  const fileOf = (stored: Stored) => join(folder, stored.file);

  async function put(request: Request, bucket: string, key: string): Promise<Response> {
    const raw = Buffer.from(await request.arrayBuffer());
    const chunked =
      request.headers.get('content-encoding')?.includes('aws-chunked') ||
      request.headers.get('x-amz-content-sha256')?.startsWith('STREAMING-');
    const body = chunked ? decodeAwsChunked(raw) : raw;
    const before = await store.get<Stored>('object', `${bucket}/${key}`);
    const etag = `"${createHash('md5').update(body).digest('hex')}"`;
    const stored: Stored = {
      bucket,
      key,
      file: options.newId('obj_'),
      type: request.headers.get('content-type') ?? 'application/octet-stream',
      size: body.length,
      etag,
    };
    await mkdir(folder, { recursive: true });
    await writeFile(fileOf(stored), body);
    await store.put('object', `${bucket}/${key}`, stored);
    if (before) await rm(fileOf(before), { force: true });
    return new Response(null, { headers: { etag } });
  }

  async function get(bucket: string, key: string, head: boolean): Promise<Response> {
    const stored = await store.get<Stored>('object', `${bucket}/${key}`);
    if (!stored) return fault(404, 'NoSuchKey');
    const headers = { 'content-type': stored.type, etag: stored.etag, 'content-length': String(stored.size) };
    return new Response(head ? null : new Uint8Array(await readFile(fileOf(stored))), { headers });
  }

  async function remove(bucket: string, key: string): Promise<void> {
    const stored = await store.get<Stored>('object', `${bucket}/${key}`);
    if (stored) await rm(fileOf(stored), { force: true });
    await store.remove('object', `${bucket}/${key}`);
  }

  async function list(bucket: string, prefix: string): Promise<Response> {
    const found = (await store.list<Stored>('object')).filter(
      (one) => one.bucket === bucket && one.key.startsWith(prefix),
    );
    const rows = found
      .map(
        (one) => `<Contents><Key>${one.key}</Key><Size>${one.size}</Size><ETag>${one.etag}</ETag></Contents>`,
      )
      .join('');
    return xml(
      200,
      `<ListBucketResult><Name>${bucket}</Name><KeyCount>${found.length}</KeyCount><IsTruncated>false</IsTruncated>${rows}</ListBucketResult>`,
    );
  }

  return async (request) => {
    const problem = signatureProblem(request, options.keys, options.now());
    if (problem) return fault(403, problem);
    const url = new URL(request.url);
    const [bucket = '', ...rest] = url.pathname.slice(1).split('/').map(decodeURIComponent);
    const key = rest.join('/');
    if (!key) {
      if (request.method === 'GET') return list(bucket, url.searchParams.get('prefix') ?? '');
      if (request.method === 'POST' && url.searchParams.has('delete')) {
        const keys = [...(await request.text()).matchAll(/<Key>([^<]*)<\/Key>/g)].map(([, one = '']) => one);
        for (const one of keys) await remove(bucket, one);
        return xml(200, '<DeleteResult></DeleteResult>');
      }
      return new Response(null, { status: 200 });
    }
    if (request.method === 'PUT') return put(request, bucket, key);
    if (request.method === 'GET' || request.method === 'HEAD')
      return get(bucket, key, request.method === 'HEAD');
    if (request.method === 'DELETE') {
      await remove(bucket, key);
      return new Response(null, { status: 204 });
    }
    return fault(405, 'MethodNotAllowed');
  };
}
