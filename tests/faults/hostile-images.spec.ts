import { randomUUID } from 'node:crypto';
import { crc32, deflateSync } from 'node:zlib';
import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { UploadedPhoto } from '#shared/reports/photo';
import { addClub, addMember } from '#tests/support/factories/people';
import { cameraJpeg, chequeredPng } from '#tests/support/factories/pictures';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';
import { startFaultRun } from './fault-run';

const run = startFaultRun('damaged photos', { whole: 400, sample: 40 });
const secret = 'TELLTALE-4f1c';
const script = `<script>alert('${secret}')</script>`;

let app: TestApp;
let client: TestClient;
let other: TestClient;

beforeAll(async () => {
  app = await startTestApp();
  const club = await addClub(app.store.owner);
  client = await app.client().signIn((await addMember(app.store.owner, club)).email);
  other = await app.client().signIn((await addMember(app.store.owner, club)).email);
});
afterAll(() => app.stop());

async function upload(bytes: Buffer, name = 'photo.jpg', type = 'image/jpeg') {
  const form = new FormData();
  form.set('id', randomUUID());
  form.set('photo', new Blob([new Uint8Array(bytes)], { type }), name);
  return client.send<UploadedPhoto & ApiProblem>('POST', '/api/photos', form);
}

/** Renditions hold nothing of what was sent but its picture. */
async function expectInert(answer: { status: number; text: string; body: UploadedPhoto }):
Promise<void> {
  expect(answer.status, answer.text).toBe(201);
  for (const file of ['small.webp', 'small.jpeg', 'large.webp', 'large.jpeg']) {
    const { status, headers, bytes } = await client.download(
      `/api/photos/${answer.body.id}/${file}`);
    expect(status).toBe(200);
    expect(bytes.includes(secret), file).toBe(false);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    const { format, width, height, space, pages, exif, xmp, iptc, depth } = await sharp(bytes)
      .metadata();
    expect(format).toBe(file.split('.')[1]);
    expect({ space, depth, pages, exif, xmp, iptc }).toEqual({ space: 'srgb', depth: 'uchar',
      pages: undefined, exif: undefined, xmp: undefined, iptc: undefined });
    expect(Math.max(width, height)).toBeLessThanOrEqual(4000);
  }
}

async function expectStillAnswering(): Promise<void> {
  expect((await client.get('/api/health')).status).toBe(200);
  expect((await upload(await cameraJpeg(60, 80))).status).toBe(201);
  expect(app.log.filter(({ msg }) => msg === 'unexpected error')).toEqual([]);
  await expect.poll(() => readdir(join(app.config.photoDirectory, 'incoming'))).toEqual([]);
}

function pngChunk(type: string, data: Buffer): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const frame = Buffer.alloc(8);
  frame.writeUInt32BE(data.length);
  frame.writeUInt32BE(crc32(body), 4);
  return Buffer.concat([frame.subarray(0, 4), body, frame.subarray(4)]);
}

const pngStart = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

function png(width: number, height: number, pixels: Buffer, ...more: readonly Buffer[]): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 0, 0, 0, 0], 8);
  return Buffer.concat([pngStart, pngChunk('IHDR', header), ...more,
    pngChunk('IDAT', deflateSync(pixels)), pngChunk('IEND', Buffer.alloc(0))]);
}

/** An animated WebP of as many frames. */
async function animation(frames: number): Promise<Buffer> {
  const side = 40;
  const raw = Buffer.alloc(side * side * 3 * frames);
  for (let at = 0; at < raw.length; at++) raw[at] = (at * 7) % 256;
  return sharp(raw, { raw: { width: side, height: side * frames, channels: 3, pageHeight: side } })
    .webp({ loop: 0 }).toBuffer();
}

const plain = (width: number, height: number) => sharp({ create: { width, height, channels: 3,
  background: '#987654' } });

/** What must be refused, by its problem. */
const refused: [string, () => Buffer | Promise<Buffer>, number, string][] = [
  ['an HTML page', () => Buffer.from(`<!doctype html>${script}`), 415, 'photo_not_an_image'],
  ['a PDF', () => Buffer.from(`%PDF-1.7\n${secret}`), 415, 'photo_not_an_image'],
  ['a zip archive', () => Buffer.from('PK\u0003\u0004'.padEnd(200, 'x'), 'latin1'), 415,
    'photo_not_an_image'],
  ['an SVG', () => Buffer.from(`<svg xmlns="http://www.w3.org/2000/svg">${script}</svg>`), 415,
    'photo_not_an_image'],
  ['a TIFF', () => plain(40, 40).tiff().toBuffer(), 415, 'photo_not_an_image'],
  ['a GIF', () => plain(40, 40).gif().toBuffer(), 415, 'photo_not_an_image'],
  ['an AVIF', () => plain(40, 40).avif().toBuffer(), 415, 'photo_not_an_image'],
  ['a script with the first bytes of a JPEG', () => Buffer.concat([
    Buffer.from([0xff, 0xd8, 0xff, 0xe0]), Buffer.from(script)]), 422, 'photo_damaged'],
  ['a PNG of nothing but its signature', () => pngStart, 415, 'photo_not_an_image'],
  ['a PNG with a wrong checksum', async () => {
    const bytes = Buffer.from(await chequeredPng(60));
    bytes[29] = (bytes[29] ?? 0) ^ 0xff;
    return bytes;
  }, 422, 'photo_damaged'],
  ['61 megapixels', () => png(10_000, 6_100, Buffer.alloc(10_001)), 422,
    'photo_too_many_pixels'],
  ['a bomb of 3.6 gigapixels', () => png(60_000, 60_000, Buffer.alloc(60_001)), 422,
    'photo_too_many_pixels'],
  ['an end in the middle', async () => {
    const bytes = await cameraJpeg();
    return bytes.subarray(0, Math.floor(bytes.length * 0.5));
  }, 422, 'photo_damaged'],
  ['26 MB', () => Buffer.alloc(26 * 1024 * 1024, 0xff), 413, 'photo_too_large'],
];

/** What is a picture, and must be nothing else once it is kept. */
const inert: [string, () => Buffer | Promise<Buffer>][] = [
  ['a polyglot of JPEG and HTML', async () => Buffer.concat([await cameraJpeg(),
    Buffer.from(`<html>${script}`)])],
  ['a polyglot of PNG and zip', async () => Buffer.concat([await chequeredPng(100),
    Buffer.from(`PK\u0003\u0004${secret}`, 'latin1')])],
  ['a PNG with a script in its text', async () => {
    const bytes = await chequeredPng(100);
    return Buffer.concat([bytes.subarray(0, 33),
      pngChunk('tEXt', Buffer.from(`Comment\0${script}`, 'latin1')), bytes.subarray(33)]);
  }],
  ['metadata of 2 MB', async () => {
    const jpeg = await plain(120, 90).jpeg().toBuffer();
    const segment = Buffer.alloc(4 + 60_000, secret);
    segment.set([0xff, 0xfe]);
    segment.writeUInt16BE(60_002, 2);
    return Buffer.concat([jpeg.subarray(0, 2), ...Array.from({ length: 35 }, () => segment),
      jpeg.subarray(2)]);
  }],
  // Nothing is unpacked beyond the pixels that the header speaks of.
  ['200 MB packed into 200 kB behind ten by ten pixels', () => png(10, 10,
    Buffer.alloc(200 * 1024 * 1024))],
  ['an animation', () => animation(50)],
  ['CMYK', () => plain(120, 90).toColourspace('cmyk').jpeg().toBuffer()],
  ['16 bits a channel', () => plain(120, 90).toColourspace('rgb16').png().toBuffer()],
  ['grey with transparency', () => sharp({ create: { width: 90, height: 90, channels: 4,
    background: { r: 9, g: 9, b: 9, alpha: 0.3 } } }).greyscale().png().toBuffer()],
  ['1 × 30,000 pixels', () => plain(1, 30_000).png().toBuffer()],
  ['30,000 × 1 pixels', () => plain(30_000, 1).png().toBuffer()],
  ['one pixel', () => plain(1, 1).png().toBuffer()],
  ['an ICC profile and EXIF', () => plain(120, 90).withIccProfile('p3').withExif({
    IFD0: { Copyright: secret, Artist: secret } }).jpeg().toBuffer()],
];

describe('a hostile image', () => {
  it.each(refused)('is refused with a problem: %s', async (_what, make, status, code) => {
    const answer = await upload(await make());
    expect([answer.status, answer.body.code]).toEqual([status, code]);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    await expectStillAnswering();
  });

  it.each(inert)('is rendered inert: %s', async (_what, make) => {
    await expectInert(await upload(await make()));
    await expectStillAnswering();
  });

  it('gains nothing by its name or its declared type', async () => {
    for (const name of ['../../etc/passwd', 'photo.jpg\0.html', 'a'.repeat(5000), 'x.svg', '']) {
      const answer = await upload(await cameraJpeg(60, 80), name, 'text/html');
      if (answer.status === 201) await expectInert(answer);
      else expect(answer.status, JSON.stringify(name)).toBeGreaterThanOrEqual(400);
      expect(answer.status).toBeLessThan(500);
    }
    await expectStillAnswering();
  });
});

describe('photos damaged at random', () => {
  it('are refused or rendered, and the server answers others meanwhile', async () => {
    const originals = [await cameraJpeg(150, 200), await chequeredPng(150),
      await sharp(await cameraJpeg(150, 200)).webp().toBuffer(), await animation(4)];
    const counts: Record<string, number> = {};
    let slowest = 0;
    for (let round = 0; round < run.rounds; round++) {
      const original = originals[run.below(originals.length)] ?? Buffer.alloc(0);
      let bytes = Buffer.from(original);
      if (run.chance(0.3)) bytes = bytes.subarray(0, 1 + run.below(bytes.length));
      for (let flips = run.below(12); flips > 0; flips--) {
        bytes[run.below(bytes.length)] = run.below(256);
      }
      const started = performance.now();
      const [answer, meanwhile] = await Promise.all([upload(bytes), other.get('/api/drafts')]);
      slowest = Math.max(slowest, performance.now() - started);
      expect(meanwhile.status).toBe(200);
      expect([201, 415, 422], answer.text).toContain(answer.status);
      const outcome = answer.status === 201 ? 'rendered' : answer.body.code;
      counts[outcome] = (counts[outcome] ?? 0) + 1;
    }
    await expectStillAnswering();
    run.report({ ...counts, 'slowest ms': Math.round(slowest) });
  });
});
