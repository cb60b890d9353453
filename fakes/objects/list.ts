import { compareKeys, type ObjectDoc } from './shelf.ts';
import { xml, type Xml } from './xml.ts';

const MOST = 1000;

const entry = ({ key, modifiedAt, etag, bytes }: ObjectDoc): Xml => ({
  Key: key,
  LastModified: modifiedAt,
  ETag: etag,
  Size: bytes,
  StorageClass: 'STANDARD',
});

/**
 * ListObjectsV2: prefix, delimiter, start-after, max-keys, continuation-token.
 * @param objects of the bucket, in the order of their keys
 */
export function listReply(bucket: string, objects: ObjectDoc[], query: URLSearchParams): Response {
  const prefix = query.get('prefix') ?? '';
  const delimiter = query.get('delimiter') ?? '';
  const token = query.get('continuation-token');
  const after = token ? Buffer.from(token, 'base64url').toString() : (query.get('start-after') ?? '');
  const most = Math.min(MOST, Number(query.get('max-keys') ?? MOST));
  const groupOf = (key: string) => {
    const cut = delimiter ? key.indexOf(delimiter, prefix.length) : -1;
    return cut < 0 ? null : key.slice(0, cut + delimiter.length);
  };
  const contents: ObjectDoc[] = [];
  const groups = new Set<string>();
  let last = '';
  let truncated = false;
  for (const object of objects) {
    const group = groupOf(object.key);
    const done = compareKeys(object.key, after) <= 0 || (group !== null && after.startsWith(group));
    if (!object.key.startsWith(prefix) || done || (group !== null && groups.has(group))) continue;
    if (contents.length + groups.size >= most) {
      truncated = true;
      break;
    }
    if (group === null) contents.push(object);
    else groups.add(group);
    last = group ?? object.key;
  }
  return xml('ListBucketResult', {
    Name: bucket,
    Prefix: prefix,
    ...(delimiter && { Delimiter: delimiter }),
    MaxKeys: most,
    KeyCount: contents.length + groups.size,
    IsTruncated: truncated,
    ...(truncated && { NextContinuationToken: Buffer.from(last).toString('base64url') }),
    Contents: contents.map(entry),
    CommonPrefixes: [...groups].map((group) => ({ Prefix: group })),
  });
}
