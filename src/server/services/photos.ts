import { DeleteObjectCommand, GetObjectCommand, PutObjectCommand } from '@aws-sdk/client-s3';
import { and, eq, or } from 'drizzle-orm';
import { fileTypeFromBuffer } from 'file-type';
import sharp from 'sharp';
import type { App } from '#server/app';
import { members, photos } from '#server/db/schema/index';
import { AppError, notFound } from '#server/errors';
import { takeOrRefuse } from '#server/limits';
import type { Viewer } from './viewer.ts';

export const PHOTO_MAX_BYTES = 12 * 1024 * 1024;
const MAX_PIXELS = 40_000_000;
const LONG_SIDE_PX = 1600;
const TYPES = new Set(['image/jpeg', 'image/png', 'image/webp', 'image/avif']);
const WRONG_TYPE = 'That file is not a picture we can read. Send a JPEG, PNG or WebP.';

const put = (app: App, key: string, bytes: Buffer, type: string) =>
  app.objects.send(
    new PutObjectCommand({ Bucket: app.env.s3.bucket, Key: key, Body: bytes, ContentType: type }),
  );

/**
 * Takes a member's picture: what the bytes are decides, not the name. It waits in the store until a job has drawn it
 * anew, which is what removes the place, the camera and whatever else it carried.
 * @throws AppError too-large, wrong-type, too-many
 */
export async function receivePhoto(app: App, viewer: Viewer, bytes: Buffer): Promise<{ id: string }> {
  await takeOrRefuse(app.limits, 'upload', viewer.id);
  if (bytes.length > PHOTO_MAX_BYTES)
    throw new AppError('too-large', 'That picture is larger than 12 MB. Send a smaller one.');
  const type = await fileTypeFromBuffer(bytes);
  if (!type || !TYPES.has(type.mime)) throw new AppError('wrong-type', WRONG_TYPE);
  const size = await sharp(bytes, { limitInputPixels: MAX_PIXELS })
    .metadata()
    .catch(() => null);
  if (!size?.width || !size.height) throw new AppError('wrong-type', WRONG_TYPE);
  const id = app.random.uuid();
  await put(app, `waiting/${id}`, bytes, type.mime);
  await app.transaction(async (tx, enqueue) => {
    await tx.insert(photos).values({
      id,
      memberId: viewer.id,
      objectKey: `waiting/${id}`,
      bytes: bytes.length,
      widthPx: size.width,
      heightPx: size.height,
      createdAt: app.clock.now(),
    });
    await enqueue('photo', { photoId: id });
  });
  return { id };
}

/** Job: redraws a waiting picture as WebP without metadata, at most 1,600 px, and drops the original. May run twice. */
export async function preparePhoto(app: App, photoId: string): Promise<void> {
  const [photo] = await app.db.select().from(photos).where(eq(photos.id, photoId));
  if (!photo || photo.state !== 'waiting') return;
  const original = await app.objects.send(
    new GetObjectCommand({ Bucket: app.env.s3.bucket, Key: photo.objectKey }),
  );
  const bytes = Buffer.from((await original.Body?.transformToByteArray()) ?? []);
  const drawn = await sharp(bytes, { limitInputPixels: MAX_PIXELS })
    .rotate()
    .resize({ width: LONG_SIDE_PX, height: LONG_SIDE_PX, fit: 'inside', withoutEnlargement: true })
    .webp({ quality: 80 })
    .toBuffer({ resolveWithObject: true })
    .catch(() => null);
  if (!drawn) {
    await app.db.update(photos).set({ state: 'refused' }).where(eq(photos.id, photoId));
    return;
  }
  const key = `photos/${photoId}`;
  await put(app, key, drawn.data, 'image/webp');
  await app.db
    .update(photos)
    .set({
      state: 'ready',
      objectKey: key,
      bytes: drawn.data.length,
      widthPx: drawn.info.width,
      heightPx: drawn.info.height,
    })
    .where(eq(photos.id, photoId));
  await app.objects.send(new DeleteObjectCommand({ Bucket: app.env.s3.bucket, Key: photo.objectKey }));
}

/** The picture's bytes for its member or their coach. @throws AppError not-found for everybody else, and while it waits */
export async function openPhoto(app: App, viewer: Viewer, photoId: string): Promise<Uint8Array> {
  const [photo] = await app.db
    .select({ key: photos.objectKey })
    .from(photos)
    .innerJoin(members, eq(members.userId, photos.memberId))
    .where(
      and(
        eq(photos.id, photoId),
        eq(photos.state, 'ready'),
        or(eq(photos.memberId, viewer.id), eq(members.coachId, viewer.id)),
      ),
    );
  if (!photo) throw notFound();
  const object = await app.objects.send(new GetObjectCommand({ Bucket: app.env.s3.bucket, Key: photo.key }));
  if (!object.Body) throw notFound();
  return object.Body.transformToByteArray();
}
