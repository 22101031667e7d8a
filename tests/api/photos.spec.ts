import { createHash, randomUUID } from 'node:crypto';
import { readdir, readFile, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { crc32, deflateSync } from 'node:zlib';
import exifr from 'exifr';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { UploadedPhoto } from '#shared/reports/photo';
import { createDiskPhotoStore } from '#server/images/photo-store';
import { createPhotoDecoder } from '#server/images/photo-decoder';
import { createPhotosService } from '#server/photos/photos-service';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { cameraJpeg, chequeredPng, coloursOnTop, greysOf } from '#tests/support/factories/pictures';
import { fileReport, publishReport, reportContent,
  uploadPhoto } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let client: TestClient;
const files = ['small', 'medium', 'large'].flatMap((size) => [`${size}.webp`, `${size}.jpeg`]);

beforeAll(async () => {
  app = await startTestApp();
  club = await addClub(app.store.owner);
  client = await app.client().signIn((await addMember(app.store.owner, club)).email);
});
afterAll(() => app.stop());

async function upload(bytes: Buffer, name = 'photo.jpg', id: string = randomUUID()) {
  const form = new FormData();
  form.set('id', id);
  form.set('photo', new Blob([new Uint8Array(bytes)]), name);
  return client.send<UploadedPhoto & ApiProblem>('POST', '/api/photos', form);
}

async function filesBelow(directory: string): Promise<string[]> {
  const names = await readdir(directory, { recursive: true });
  const found: string[] = [];
  for (const name of names) {
    if ((await stat(join(directory, name))).isFile()) found.push(join(directory, name));
  }
  return found;
}

/** A PNG that says it is enormous and holds next to nothing. */
function hugePng(width: number, height: number): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 0, 0, 0, 0], 8);
  return Buffer.concat([Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    pngChunk('IHDR', header), pngChunk('IDAT', deflateSync(Buffer.alloc(width + 1))),
    pngChunk('IEND', Buffer.alloc(0))]);
}

function pngChunk(type: string, data: Buffer): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const length = Buffer.alloc(4);
  length.writeUInt32BE(data.length);
  const check = Buffer.alloc(4);
  check.writeUInt32BE(crc32(body));
  return Buffer.concat([length, body, check]);
}

describe('an uploaded photo', () => {
  it('is served upright, in three sizes and two formats, without metadata', async () => {
    const sent = await cameraJpeg(600, 800);
    expect((await exifr.gps(sent))?.latitude).toBeCloseTo(51.5);
    const answer = await upload(sent);
    expect(answer.status).toBe(201);
    expect(answer.body).toMatchObject({ width: 600, height: 800, blurs: [] });
    for (const file of files) {
      const served = await client.download(`/api/photos/${answer.body.id}/${file}`);
      expect(served.status, file).toBe(200);
      expect(served.headers.get('content-type')).toBe(`image/${file.split('.')[1]}`);
      expect(served.headers.get('x-content-type-options')).toBe('nosniff');
      expect(served.headers.get('content-security-policy')).toContain('sandbox');
      const { red, blue } = await coloursOnTop(served.bytes);
      expect(red, file).toBeGreaterThan(blue + 80);
      expect(served.bytes.includes('Exif')).toBe(false);
      expect(await exifr.parse(served.bytes).catch(() => undefined)).toBeFalsy();
    }
    const row = await app.store.owner('photo').where({ id: answer.body.id }).first('sha256');
    expect(row.sha256).toEqual(createHash('sha256').update(sent).digest());
  });

  it('leaves no file with its metadata anywhere, and nothing on its way', async () => {
    await upload(await cameraJpeg());
    const kept = await filesBelow(join(app.config.photoDirectory, 'kept'));
    expect(kept.length).toBeGreaterThanOrEqual(7);
    for (const file of kept) expect((await readFile(file)).includes('Exif')).toBe(false);
    await expect.poll(() => filesBelow(join(app.config.photoDirectory, 'incoming'))).toEqual([]);
  });

  it('is the same one when it is sent twice', async () => {
    const id = randomUUID();
    const bytes = await cameraJpeg(90, 120);
    expect((await upload(bytes, 'a.jpg', id)).status).toBe(201);
    const again = await upload(bytes, 'a.jpg', id);
    expect(again.status).toBe(200);
    expect(again.body).toEqual({ id, width: 90, height: 120, blurs: [] });
  });

  it.each<[string, () => Buffer | Promise<Buffer>, number, string]>([
    ['an SVG named .png', () => Buffer.from(
      '<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>'), 415, 'photo_not_an_image'],
    ['a GIF', () => Buffer.from('GIF89a'.padEnd(64, '\0'), 'latin1'), 415, 'photo_not_an_image'],
    ['nothing', () => Buffer.alloc(0), 415, 'photo_not_an_image'],
    ['more than 60 megapixels', () => hugePng(10_000, 6_001), 422, 'photo_too_many_pixels'],
    ['a bomb', () => hugePng(60_000, 60_000), 422, 'photo_too_many_pixels'],
    ['half a photo', async () => (await cameraJpeg()).subarray(0, 1500), 422, 'photo_damaged'],
    ['more than 25 MB', () => Buffer.alloc(25 * 1024 * 1024 + 1, 1), 413, 'photo_too_large'],
  ])('is refused where it is %s', async (_what, bytes, status, code) => {
    const answer = await upload(await bytes(), 'photo.png');
    expect([answer.status, answer.body.code]).toEqual([status, code]);
    await expect.poll(() => filesBelow(join(app.config.photoDirectory, 'incoming'))).toEqual([]);
  });

  it('is refused without a file, and a text field is not taken for one', async () => {
    const form = new FormData();
    form.set('id', randomUUID());
    form.set('photo', '/etc/passwd');
    const answer = await client.send<ApiProblem>('POST', '/api/photos', form);
    expect(answer.status).toBe(422);
    expect(answer.body.fields).toEqual([{ field: 'photo', code: 'required' }]);
  });

  it('is refused with no decoder time left', async () => {
    const decoder = createPhotoDecoder({ processes: 1, waiting: 1, milliseconds: 1 });
    await expect(decoder.decode({ kind: 'receive', source: '/nowhere', directory: '/nowhere' }))
      .rejects.toMatchObject({ code: 'photo_damaged' });
    decoder.close();
  });
});

describe('blurring', () => {
  it('leaves nothing of the blurred part, and everything of the rest', async () => {
    const id = (await upload(await chequeredPng(400, 10), 'p.png')).body.id;
    const before = await client.download(`/api/photos/${id}/large.jpeg`);
    const blurs = [{ x: 0, y: 0, width: 0.5, height: 0.5 }];
    const answer = await client.put<UploadedPhoto>(`/api/photos/${id}/blurs`, { blurs });
    expect(answer.body).toEqual({ id, width: 400, height: 400, blurs });
    const after = await client.download(`/api/photos/${id}/large.jpeg`);
    expect(after.headers.get('etag')).not.toBe(before.headers.get('etag'));
    const spread = async (left: number) => {
      const greys = await greysOf(after.bytes, { left, top: 20, width: 160, height: 160 });
      return Math.max(...greys) - Math.min(...greys);
    };
    expect(await spread(20)).toBeLessThan(60);
    expect(await spread(220)).toBeGreaterThan(200);
    const undone = await client.put<UploadedPhoto>(`/api/photos/${id}/blurs`, { blurs: [] });
    expect(undone.body.blurs).toEqual([]);
  });

  it('is over once the photo is filed, and so is removing it', async () => {
    const photoId = await uploadPhoto(client, await cameraJpeg(60, 80));
    await fileReport(client, reportContent(club, { photos: [
      { photoId, side: 'obverse', circle: null, uprightDegrees: 0, caption: '' }] }));
    const blurred = await client.put<ApiProblem>(`/api/photos/${photoId}/blurs`, { blurs: [] });
    expect([blurred.status, blurred.body.code]).toEqual([409, 'photo_in_use']);
    expect((await client.delete<ApiProblem>(`/api/photos/${photoId}`)).body.code)
      .toBe('photo_in_use');
  });
});

describe('sight of a photo', () => {
  it('follows the report that shows it', async () => {
    const photoId = await uploadPhoto(client, await cameraJpeg(60, 80));
    const path = `/api/photos/${photoId}/small.webp`;
    const otherClub = await addClub(app.store.owner);
    const readers = {
      visitor: app.client(),
      subscriber: await app.client().signIn((await addPerson(app.store.owner)).email),
      otherClub: await app.client().signIn((await addMember(app.store.owner, otherClub)).email),
    };
    const seen = async () => Object.fromEntries(await Promise.all(Object.entries(readers)
      .map(async ([name, reader]) => [name, (await reader.download(path)).status])));
    const nobody = { visitor: 404, subscriber: 404, otherClub: 404 };
    expect(await seen()).toEqual(nobody);
    const number = await fileReport(client, reportContent(club, { audience: 'public', photos: [
      { photoId, side: 'obverse', circle: null, uprightDegrees: 0, caption: '' }] }));
    expect(await seen()).toEqual(nobody);
    await publishReport(app.store.owner, number, { audience: 'clubs' });
    expect(await seen()).toEqual({ ...nobody, otherClub: 200 });
    const hidden = await readers.otherClub.download(path);
    expect(hidden.headers.get('cache-control')).toBe('private, no-cache');
    await publishReport(app.store.owner, number, { audience: 'public' });
    expect(await seen()).toEqual({ visitor: 200, subscriber: 200, otherClub: 200 });
    const open = await readers.visitor.download(path);
    expect(open.headers.get('cache-control')).toBe('public, max-age=300');
    const tag = open.headers.get('etag') ?? '';
    const again = await readers.visitor.get(path,
      { 'If-None-Match': tag, 'Cache-Control': 'max-age=0' });
    expect(again.status).toBe(304);
  });

  it('is its owner\'s before that, and 404 for everything that is not there', async () => {
    const id = (await upload(await cameraJpeg(60, 80))).body.id;
    expect((await client.get<UploadedPhoto>(`/api/photos/${id}`)).body.id).toBe(id);
    const other = await app.client().signIn((await addMember(app.store.owner, club)).email);
    expect((await other.get(`/api/photos/${id}`)).status).toBe(404);
    expect((await other.put(`/api/photos/${id}/blurs`, { blurs: [] })).status).toBe(404);
    expect((await other.delete(`/api/photos/${id}`)).status).toBe(404);
    expect((await client.get(`/api/photos/${randomUUID()}/small.webp`)).status).toBe(404);
    expect((await client.get(`/api/photos/${id}/master.jpeg`)).status).toBe(422);
    expect((await client.delete(`/api/photos/${id}`)).status).toBe(204);
    expect((await client.get(`/api/photos/${id}/small.webp`)).status).toBe(404);
  });
});

describe('the clean-up', () => {
  it('removes what no report and no draft shows, after a week', async () => {
    const ids = { unused: '', drafted: '', fresh: '' };
    for (const name of ['unused', 'drafted', 'fresh'] as const) {
      ids[name] = (await upload(await cameraJpeg(60, 80))).body.id;
    }
    await client.put(`/api/drafts/${randomUUID()}`, { revision: 0,
      content: { photos: [{ photoId: ids.drafted }] } });
    await app.store.owner('photo').whereIn('id', [ids.unused, ids.drafted])
      .update({ created_at: app.store.owner.raw(`now() - interval '8 days'`) });
    const decoder = createPhotoDecoder();
    const kept = join(app.config.photoDirectory, 'kept');
    const before = (await filesBelow(kept)).length;
    const service = createPhotosService({ database: app.database, decoder,
      store: createDiskPhotoStore(kept), incoming: join(app.config.photoDirectory, 'incoming') });
    expect(await service.removeUnused()).toBe(1);
    expect(await service.removeUnused()).toBe(0);
    expect((await filesBelow(kept)).length).toBe(before - 7);
    expect((await client.get(`/api/photos/${ids.unused}`)).status).toBe(404);
    expect((await client.get(`/api/photos/${ids.drafted}`)).status).toBe(200);
    expect((await client.get(`/api/photos/${ids.fresh}`)).status).toBe(200);
  });
});
