import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import {
  CreateBucketCommand,
  DeleteObjectCommand,
  DeleteObjectsCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { setupServer } from 'msw/node';
import { expect, onTestFinished, test } from 'vitest';
import { createMemoryStore } from '../core/memory-store.ts';
import { mswHandlers } from '../core/msw.ts';
import { serveHttp } from '../core/serve-http.ts';
import { readBody } from './body.ts';
import { createObjects } from './index.ts';

const credentials = { accessKeyId: 'demo', secretAccessKey: 'secret-of-the-tests' };
const Bucket = 'newel';

const clientFor = (endpoint: string, own = credentials) =>
  new S3Client({ endpoint, region: 'local', forcePathStyle: true, credentials: own });

async function setUp() {
  const folder = await mkdtemp(join(tmpdir(), 'newel-objects-'));
  onTestFinished(() => rm(folder, { recursive: true }));
  const time = { offsetMs: 0 };
  const handler = createObjects({
    store: createMemoryStore(),
    folder,
    keys: { accessKey: credentials.accessKeyId, secretKey: credentials.secretAccessKey },
    now: () => new Date(Date.now() + time.offsetMs),
  });
  const { origin, close } = await serveHttp(handler, 0);
  onTestFinished(close);
  const client = clientFor(origin);
  onTestFinished(() => client.destroy());
  await client.send(new CreateBucketCommand({ Bucket }));
  return { client, origin, folder, time, handler };
}

test('an object goes in and comes out whole, with type and own headers; its key may hold anything', async () => {
  const { client, folder } = await setUp();
  const Key = 'photos/2026 11/über + (1)&=.jpg';
  const Body = Buffer.from([0, 1, 2, 255, 13, 10]);
  await client.send(
    new PutObjectCommand({ Bucket, Key, Body, ContentType: 'image/jpeg', Metadata: { member: 'one' } }),
  );
  const got = await client.send(new GetObjectCommand({ Bucket, Key }));
  expect(Buffer.from((await got.Body?.transformToByteArray()) ?? [])).toEqual(Body);
  expect(got).toMatchObject({ ContentType: 'image/jpeg', ContentLength: 6, Metadata: { member: 'one' } });
  const head = await client.send(new HeadObjectCommand({ Bucket, Key }));
  expect(head.ETag).toBe(got.ETag);

  await client.send(new PutObjectCommand({ Bucket, Key, Body: 'second' }));
  expect(await readdir(folder)).toHaveLength(1);
  await client.send(new DeleteObjectCommand({ Bucket, Key }));
  await expect(client.send(new GetObjectCommand({ Bucket, Key }))).rejects.toMatchObject({
    name: 'NoSuchKey',
  });
  await expect(client.send(new HeadObjectCommand({ Bucket, Key }))).rejects.toMatchObject({
    name: 'NotFound',
  });
  expect(await readdir(folder)).toEqual([]);
});

test('a stream arrives in pieces with its checksum after it', async () => {
  const { client } = await setUp();
  const bytes = Buffer.alloc(200_000, 'newel ');
  await client.send(
    new PutObjectCommand({
      Bucket,
      Key: 'clip',
      Body: Readable.from([bytes.subarray(0, 70_001), bytes.subarray(70_001)]),
      ContentLength: bytes.length,
    }),
  );
  const { Body } = await client.send(new GetObjectCommand({ Bucket, Key: 'clip' }));
  expect(Buffer.from((await Body?.transformToByteArray()) ?? []).equals(bytes)).toBe(true);
  const part = await client.send(new GetObjectCommand({ Bucket, Key: 'clip', Range: 'bytes=6-10' }));
  expect(part).toMatchObject({ ContentRange: 'bytes 6-10/200000' });
  expect(await part.Body?.transformToString()).toBe('newel');
});

test('a signed address reads and writes for its time, and only what was signed', async () => {
  const { client, time } = await setUp();
  const put = await getSignedUrl(
    client,
    new PutObjectCommand({ Bucket, Key: 'a.txt', ContentType: 'text/plain' }),
    { expiresIn: 300 },
  );
  expect(
    (await fetch(put, { method: 'PUT', body: 'words', headers: { 'content-type': 'text/plain' } })).status,
  ).toBe(200);
  const get = await getSignedUrl(client, new GetObjectCommand({ Bucket, Key: 'a.txt' }), { expiresIn: 300 });
  const reply = await fetch(get);
  expect([reply.status, await reply.text(), reply.headers.get('content-type')]).toEqual([
    200,
    'words',
    'text/plain',
  ]);
  expect((await fetch(get.replace('a.txt', 'b.txt'))).status).toBe(403);
  expect((await fetch(get, { method: 'DELETE' })).status).toBe(403);
  expect((await fetch(get.replace('X-Amz-Expires=300', 'X-Amz-Expires=3000'))).status).toBe(403);
  time.offsetMs = 299_000;
  expect((await fetch(get)).status).toBe(200);
  time.offsetMs = 302_000;
  const late = await fetch(get);
  expect([late.status, await late.text()]).toEqual([403, expect.stringContaining('Request has expired')]);
});

test('nobody, a wrong secret, an unknown key and an old request are all refused', async () => {
  const { client, origin, time } = await setUp();
  await client.send(new PutObjectCommand({ Bucket, Key: 'a', Body: 'x' }));
  const nobody = await fetch(`${origin}/${Bucket}/a`);
  expect([nobody.status, await nobody.text()]).toEqual([403, expect.stringContaining('AccessDenied')]);
  const wrong = clientFor(origin, { ...credentials, secretAccessKey: 'wrong' });
  await expect(wrong.send(new GetObjectCommand({ Bucket, Key: 'a' }))).rejects.toMatchObject({
    name: 'SignatureDoesNotMatch',
  });
  const unknown = clientFor(origin, { ...credentials, accessKeyId: 'unknown' });
  await expect(unknown.send(new GetObjectCommand({ Bucket, Key: 'a' }))).rejects.toMatchObject({
    name: 'InvalidAccessKeyId',
  });
  time.offsetMs = 20 * 60_000;
  await expect(client.send(new HeadBucketCommand({ Bucket }))).rejects.toMatchObject({
    $metadata: { httpStatusCode: 403 },
  });
});

test.each(['WHEN_SUPPORTED', 'WHEN_REQUIRED'] as const)(
  'a body that arrives changed is refused and not kept (checksums %s)',
  async (requestChecksumCalculation) => {
    const { client: honest, origin } = await setUp();
    const client = new S3Client({
      endpoint: origin,
      region: 'local',
      forcePathStyle: true,
      credentials,
      requestChecksumCalculation,
    });
    onTestFinished(() => client.destroy());
    client.middlewareStack.add(
      (next) => (args) => {
        const request = args.request as { body?: unknown };
        if (request.body) request.body = 'other words';
        return next(args);
      },
      { step: 'finalizeRequest', priority: 'low', name: 'meddle' },
    );
    const put = new PutObjectCommand({ Bucket, Key: 'a', Body: 'these words' });
    await expect(client.send(put)).rejects.toMatchObject({ $metadata: { httpStatusCode: 400 } });
    const head = new HeadObjectCommand({ Bucket, Key: 'a' });
    await expect(honest.send(head)).rejects.toMatchObject({ name: 'NotFound' });
  },
);

test('lists come in the order of the keys, by pages, by prefix and by folder; many are deleted at once', async () => {
  const { client } = await setUp();
  for (const Key of ['b/2', 'a/1', 'b/1', 'c', 'a/<&>'])
    await client.send(new PutObjectCommand({ Bucket, Key, Body: Key }));
  const first = await client.send(new ListObjectsV2Command({ Bucket, MaxKeys: 2 }));
  expect(first.Contents?.map(({ Key }) => Key)).toEqual(['a/1', 'a/<&>']);
  expect(first.IsTruncated).toBe(true);
  const rest = await client.send(
    new ListObjectsV2Command({ Bucket, ContinuationToken: first.NextContinuationToken }),
  );
  expect(rest.Contents?.map(({ Key, Size }) => [Key, Size])).toEqual([
    ['b/1', 3],
    ['b/2', 3],
    ['c', 1],
  ]);
  const folders = await client.send(new ListObjectsV2Command({ Bucket, Delimiter: '/' }));
  expect(folders.CommonPrefixes?.map(({ Prefix }) => Prefix)).toEqual(['a/', 'b/']);
  expect(folders.Contents?.map(({ Key }) => Key)).toEqual(['c']);
  await client.send(
    new DeleteObjectsCommand({
      Bucket,
      Delete: { Objects: [{ Key: 'a/<&>' }, { Key: 'c' }, { Key: 'none' }] },
    }),
  );
  const left = await client.send(new ListObjectsV2Command({ Bucket, Prefix: '' }));
  expect(left.Contents?.map(({ Key }) => Key)).toEqual(['a/1', 'b/1', 'b/2']);
});

test('buckets are made once, and there is nothing in one that was not made', async () => {
  const { client } = await setUp();
  await client.send(new HeadBucketCommand({ Bucket }));
  await expect(client.send(new CreateBucketCommand({ Bucket }))).rejects.toMatchObject({
    name: 'BucketAlreadyOwnedByYou',
  });
  await expect(client.send(new HeadBucketCommand({ Bucket: 'nowhere' }))).rejects.toMatchObject({
    name: 'NotFound',
  });
  await expect(
    client.send(new PutObjectCommand({ Bucket: 'nowhere', Key: 'a', Body: 'x' })),
  ).rejects.toMatchObject({ name: 'NoSuchBucket' });
});

test('the same handler answers the client through msw', async () => {
  const { handler } = await setUp();
  const origin = 'http://127.0.0.1:1';
  const server = setupServer(...mswHandlers(handler, origin));
  server.listen({ onUnhandledRequest: 'error' });
  onTestFinished(() => server.close());
  const client = clientFor(origin);
  await client.send(new PutObjectCommand({ Bucket, Key: 'via-msw', Body: 'words' }));
  const { Body } = await client.send(new GetObjectCommand({ Bucket, Key: 'via-msw' }));
  expect(await Body?.transformToString()).toBe('words');
});

test('the checksum that follows a chunked body is held against it', async () => {
  const arrive = (words: string) =>
    readBody(
      new Request('http://127.0.0.1:1/newel/a', {
        method: 'PUT',
        headers: { 'content-encoding': 'aws-chunked' },
        // The CRC32 of 'newel' in base64, worked out with Python's zlib.crc32.
        body: `${words.length}\r\n${words}\r\n0\r\nx-amz-checksum-crc32:4ej1RA==\r\n\r\n`,
      }),
      'STREAMING-UNSIGNED-PAYLOAD-TRAILER',
    );
  expect((await arrive('newel')).bytes.toString()).toBe('newel');
  await expect(arrive('nevel')).rejects.toMatchObject({ code: 'BadDigest' });
});
