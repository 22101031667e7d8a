import { createHash } from 'node:crypto';
import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import sharp, { type OutputInfo, type Sharp } from 'sharp';
import { renditionSizes, type BlurArea, type RenditionSize } from '#shared/reports/photo';
import { masterSide, maximumPixels, type DecodedPhoto, type DecodeRefusal, type DecodeReply,
  type DecodeRequest, type RenditionFile, type RenditionFormat } from './decoder-messages';
import { imageKindOf } from './image-kind';

/**
 * The only module that decodes pictures. It runs in a process of its own, so that a hostile file
 * can take down nothing but itself, and is killed when it takes too long.
 */

sharp.cache(false);
sharp.concurrency(1);
// Without this an SVG or a TIFF named `.png` would be opened by its content.
sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({ operation: ['VipsForeignLoadJpegBuffer', 'VipsForeignLoadPngBuffer',
  'VipsForeignLoadWebpBuffer'] });

const hostile = {
  limitInputPixels: maximumPixels, failOn: 'error', pages: 1, sequentialRead: true,
} as const;

class Refused extends Error {
  constructor(readonly refusal: DecodeRefusal, cause: unknown) {
    super(cause instanceof Error ? cause.message : String(cause));
  }
}

interface Raster {
  readonly data: Buffer;
  readonly info: OutputInfo;
}

process.on('message', (request: DecodeRequest) => {
  void answer(request).then((reply) => process.send?.(reply));
});
process.on('disconnect', () => process.exit(0));

async function answer(request: DecodeRequest): Promise<DecodeReply> {
  try {
    const photo = request.kind === 'receive' ? await receive(request.source, request.directory)
      : await render(request.master, request.directory, request.blurs);
    return { ok: true, photo };
  } catch (error) {
    const refusal = error instanceof Refused ? error.refusal : 'photo_damaged';
    return { ok: false, refusal, cause: error instanceof Error ? error.message : String(error) };
  }
}

/** Upright, sRGB, without metadata, at most 4,000 px: the master; then what is served of it. */
async function receive(source: string, directory: string): Promise<DecodedPhoto> {
  const bytes = await readFile(source);
  if (!imageKindOf(bytes)) throw new Refused('photo_not_an_image', 'unknown first bytes');
  const { width, height } = await metadataOf(bytes);
  if (width * height > maximumPixels) throw new Refused('photo_too_many_pixels', 'too large');
  const master = await sharp(bytes, hostile).autoOrient().toColourspace('srgb')
    .resize({ width: masterSide, height: masterSide, fit: 'inside', withoutEnlargement: true })
    .flatten({ background: '#ffffff' })
    .jpeg({ quality: 92, chromaSubsampling: '4:4:4' })
    .toBuffer({ resolveWithObject: true });
  const path = join(directory, 'master.jpeg');
  await writeFile(path, master.data);
  return {
    master: path, width: master.info.width, height: master.info.height,
    sha256: createHash('sha256').update(bytes).digest('hex'), bytesReceived: bytes.length,
    renditions: await renditionsOf(master.data, directory, []),
  };
}

async function render(
  path: string, directory: string, blurs: readonly BlurArea[],
): Promise<DecodedPhoto> {
  const master = await readFile(path);
  const { width, height } = await metadataOf(master);
  return {
    master: path, width, height, sha256: '', bytesReceived: master.length,
    renditions: await renditionsOf(master, directory, blurs),
  };
}

async function metadataOf(bytes: Buffer): Promise<{ width: number; height: number }> {
  try {
    const { width, height } = await sharp(bytes, hostile).metadata();
    return { width, height };
  } catch (error) {
    const tooMany = error instanceof Error && /pixel limit/.test(error.message);
    throw new Refused(tooMany ? 'photo_too_many_pixels' : 'photo_damaged', error);
  }
}

/** Decodes the master once, blurs, and makes every size of that one raster. */
async function renditionsOf(
  master: Buffer, directory: string, blurs: readonly BlurArea[],
): Promise<RenditionFile[]> {
  const largest = renditionSizes.large;
  let raster: Raster = await sharp(master, hostile).removeAlpha()
    .resize({ width: largest, height: largest, fit: 'inside', withoutEnlargement: true })
    .raw().toBuffer({ resolveWithObject: true });
  for (const area of blurs) raster = await withBlurred(raster, area);
  const files: RenditionFile[] = [];
  for (const [size, side] of Object.entries(renditionSizes) as [RenditionSize, number][]) {
    for (const format of ['webp', 'jpeg'] as const) {
      files.push(await writeRendition(raster, size, side, format, directory));
    }
  }
  return files;
}

async function writeRendition(
  raster: Raster, size: RenditionSize, side: number, format: RenditionFormat, directory: string,
): Promise<RenditionFile> {
  const sized = fromRaster(raster)
    .resize({ width: side, height: side, fit: 'inside', withoutEnlargement: true });
  const path = join(directory, `${size}.${format}`);
  const { data, info } = await (format === 'webp' ? sized.webp({ quality: 82, effort: 3 })
    : sized.jpeg({ quality: 84 })).toBuffer({ resolveWithObject: true });
  await writeFile(path, data);
  return { size, format, path, width: info.width, height: info.height, bytes: data.length };
}

/**
 * Covers an area with what is left of it after shrinking it to at most five pixels a side and
 * smoothing those: nothing finer survives, so it can't be sharpened back.
 */
async function withBlurred(raster: Raster, area: BlurArea): Promise<Raster> {
  const { width, height } = raster.info;
  const left = Math.max(0, Math.floor(area.x * width));
  const top = Math.max(0, Math.floor(area.y * height));
  const right = Math.min(width, Math.ceil((area.x + area.width) * width));
  const bottom = Math.min(height, Math.ceil((area.y + area.height) * height));
  if (right <= left || bottom <= top) return raster;
  const size = { width: right - left, height: bottom - top };
  const few = await fromRaster(raster).extract({ left, top, ...size })
    .resize({ width: Math.min(5, size.width), height: Math.min(5, size.height), fit: 'fill' })
    .blur(0.8).raw().toBuffer({ resolveWithObject: true });
  const cover = await fromRaster(few).resize({ ...size, fit: 'fill', kernel: 'cubic' })
    .png().toBuffer();
  return fromRaster(raster).composite([{ input: cover, left, top }]).removeAlpha().raw()
    .toBuffer({ resolveWithObject: true });
}

function fromRaster({ data, info }: Raster): Sharp {
  return sharp(data, { raw: { width: info.width, height: info.height, channels: info.channels } });
}
