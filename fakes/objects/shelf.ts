import { createHash, randomUUID } from 'node:crypto';
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { DocStore } from '../core/doc-store.ts';
import type { Body } from './body.ts';
import { noSuchBucket } from './s3-fault.ts';

/** What is known of an object; its bytes lie in a file of our own naming. */
export interface ObjectDoc {
  /** `bucket/key` */
  id: string;
  bucket: string;
  key: string;
  file: string;
  bytes: number;
  type: string;
  etag: string;
  /** ISO 8601 */
  modifiedAt: string;
  /** `x-amz-meta-*` and the like, given back as they came. */
  headers: Record<string, string>;
}

interface BucketDoc {
  id: string;
  createdAt: string;
}

const OBJECT = 'objects.object';
const BUCKET = 'objects.bucket';

export interface Shelf {
  hasBucket(bucket: string): Promise<boolean>;
  makeBucket(bucket: string): Promise<void>;
  put(
    bucket: string,
    key: string,
    body: Body,
    about: { type: string; headers: Record<string, string> },
  ): Promise<ObjectDoc>;
  find(bucket: string, key: string): Promise<ObjectDoc | null>;
  read(object: ObjectDoc): Promise<Buffer>;
  remove(bucket: string, key: string): Promise<void>;
  /** In the order of their keys' bytes. @throws S3Fault 404 */
  list(bucket: string): Promise<ObjectDoc[]>;
}

/** Keys stand in the order of their UTF-8 bytes. */
export const compareKeys = (one: string, other: string) =>
  Buffer.compare(Buffer.from(one), Buffer.from(other));

/** Buckets and objects: facts in the store, bytes in `folder`, each object in a new file, so that no reader sees half. */
export function openShelf(store: DocStore, folder: string, now: () => Date): Shelf {
  const idOf = (bucket: string, key: string) => `${bucket}/${key}`;
  const dropFile = (file: string) => rm(join(folder, file), { force: true });

  const shelf: Shelf = {
    hasBucket: async (bucket) => (await store.get<BucketDoc>(BUCKET, bucket)) !== null,
    makeBucket: (bucket) => store.put(BUCKET, { id: bucket, createdAt: now().toISOString() } as BucketDoc),
    put: async (bucket, key, { bytes, checksums }, { type, headers }) => {
      if (!(await shelf.hasBucket(bucket))) throw noSuchBucket();
      const file = randomUUID();
      await mkdir(folder, { recursive: true });
      await writeFile(join(folder, file), bytes);
      const before = await shelf.find(bucket, key);
      const object: ObjectDoc = {
        id: idOf(bucket, key),
        bucket,
        key,
        file,
        bytes: bytes.length,
        type,
        etag: `"${createHash('md5').update(bytes).digest('hex')}"`,
        modifiedAt: now().toISOString(),
        headers: { ...headers, ...checksums },
      };
      await store.put(OBJECT, object);
      if (before) await dropFile(before.file);
      return object;
    },
    find: (bucket, key) => store.get<ObjectDoc>(OBJECT, idOf(bucket, key)),
    read: ({ file }) => readFile(join(folder, file)),
    remove: async (bucket, key) => {
      const object = await shelf.find(bucket, key);
      if (!object) return;
      await store.delete(OBJECT, object.id);
      await dropFile(object.file);
    },
    list: async (bucket) => {
      if (!(await shelf.hasBucket(bucket))) throw noSuchBucket();
      return (await store.list<ObjectDoc>(OBJECT, { bucket })).sort((one, other) =>
        compareKeys(one.key, other.key),
      );
    },
  };
  return shelf;
}
