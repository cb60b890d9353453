import { CreateBucketCommand, GetObjectCommand, ListObjectsV2Command } from '@aws-sdk/client-s3';
import { eq } from 'drizzle-orm';
import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import { photos } from '#server/db/schema/index';
import { openPhoto, PHOTO_MAX_BYTES, preparePhoto, receivePhoto } from '#server/services/photos';
import type { Viewer } from '#server/services/viewer';
import { codeOf, queued } from '#support/joining';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();
let coach: Viewer;
beforeAll(async () => {
  coach = await addPerson(world.app, 'coach');
  await world.app.objects.send(new CreateBucketCommand({ Bucket: world.app.env.s3.bucket }));
});

/** A picture as a telephone makes it: on its side, with camera, owner and place inside. */
const snapshot = (width = 2400, height = 1200) =>
  sharp({ create: { width, height, channels: 3, background: '#65371f' } })
    .withExif({
      IFD0: { Make: 'Skerrow Camera Works', Artist: 'Edda Rooke' },
      IFD3: { GPSLatitude: '54/1 30/1 0/1', GPSLatitudeRef: 'N' },
    })
    .withMetadata({ orientation: 6 })
    .jpeg()
    .toBuffer();

const keysOf = async (prefix: string) => {
  const command = new ListObjectsV2Command({ Bucket: world.app.env.s3.bucket, Prefix: prefix });
  return ((await world.app.objects.send(command)).Contents ?? []).map(({ Key }) => Key);
};

describe('a picture', () => {
  it('loses place, camera and name, stands upright, is made smaller, and the original goes', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const bytes = await snapshot();
    expect(bytes.includes('Skerrow Camera Works')).toBe(true);
    const { id } = await receivePhoto(app, member, bytes);
    expect(await codeOf(openPhoto(app, member, id))).toBe('not-found');
    expect(await queued(app, 'photo')).toContainEqual({ photoId: id });
    await preparePhoto(app, id);
    await preparePhoto(app, id);

    const shown = Buffer.from(await openPhoto(app, member, id));
    const found = await sharp(shown).metadata();
    expect(found).toMatchObject({ format: 'webp', width: 800, height: 1600 });
    expect([found.exif, found.iptc, found.xmp, found.orientation]).toEqual(Array(4).fill(undefined));
    expect(shown.includes('Skerrow') || shown.includes('Edda')).toBe(false);
    expect(await keysOf(`waiting/${id}`)).toEqual([]);
    const gone = new GetObjectCommand({ Bucket: app.env.s3.bucket, Key: `waiting/${id}` });
    await expect(app.objects.send(gone)).rejects.toMatchObject({ name: 'NoSuchKey' });
  });

  it('is shown to its member and their coach; everybody else gets the answer of an absent one', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const { id } = await receivePhoto(app, member, await snapshot(60, 40));
    await preparePhoto(app, id);
    expect((await openPhoto(app, coach, id)).length).toBeGreaterThan(0);
    const strangers = [
      await addMember(app, { coach }),
      await addPerson(app, 'coach'),
      await addPerson(app, 'owner'),
    ];
    for (const stranger of strangers) expect(await codeOf(openPhoto(app, stranger, id))).toBe('not-found');
    expect(await codeOf(openPhoto(app, member, app.random.uuid()))).toBe('not-found');
  });

  it('is refused when the bytes are something else, whatever they claim, or too many', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const pretends = Buffer.concat([
      Buffer.from([0xff, 0xd8, 0xff, 0xe0]),
      Buffer.from('<script>alert(1)</script>'),
    ]);
    for (const bytes of [Buffer.from('%PDF-1.7 nothing'), Buffer.from('<svg onload="x()"/>'), pretends]) {
      expect(await codeOf(receivePhoto(app, member, bytes))).toBe('wrong-type');
    }
    expect(await codeOf(receivePhoto(app, member, Buffer.alloc(PHOTO_MAX_BYTES + 1)))).toBe('too-large');
    expect(await app.db.$count(photos, eq(photos.memberId, member.id))).toBe(0);
  });

  it('that breaks off in the middle is kept from everybody and does not stop the queue', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const whole = await sharp({
      create: {
        width: 900,
        height: 900,
        channels: 3,
        background: '#222',
        noise: { type: 'gaussian', mean: 90, sigma: 40 },
      },
    })
      .png()
      .toBuffer();
    const { id } = await receivePhoto(app, member, whole.subarray(0, 4000));
    await preparePhoto(app, id);
    const [row] = await app.db.select().from(photos).where(eq(photos.id, id));
    expect(row?.state).toBe('refused');
    expect(await codeOf(openPhoto(app, member, id))).toBe('not-found');
  });

  it('is taken only so often from one person', async () => {
    const { app } = world;
    const member = await addMember(app, { coach });
    const bytes = await snapshot(20, 20);
    let code = 'none';
    for (let count = 0; count < 200 && code === 'none'; count += 1)
      code = await codeOf(receivePhoto(app, member, bytes));
    expect(code).toBe('too-many');
  });
});
