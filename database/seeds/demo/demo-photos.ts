import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Circle, PhotoSide } from '#shared/reports/photo';
import { coinDesigns } from '../../../scripts/demo-pictures/coin-designs';
import { drawFace, drawingEdition, drawSchematic, type DieMark,
  type PlacedMark } from '../../../scripts/demo-pictures/draw-piece';
import { demoMakers, type DemoReport } from './scenario';

export interface DemoPhoto {
  readonly file: string;
  readonly side: PhotoSide;
  readonly circle: Circle | null;
  readonly uprightDegrees: number;
  readonly caption: string;
  readonly marks: readonly PlacedMark[];
}

const pictureSize = 900;
const marksOf: Readonly<Record<string, DieMark | 'none'>> = {
  pits: 'pit', lumps: 'lump', spikes: 'spike', tooled: 'tooled', toning: 'toning', none: 'none',
};

/** Both sides of a piece of the story, drawn once and kept in DEMO_PICTURES_DIRECTORY. */
export async function drawDemoPhotos(
  report: DemoReport, directory = process.env['DEMO_PICTURES_DIRECTORY'] ?? '.cache/demo-pictures',
): Promise<DemoPhoto[]> {
  await mkdir(directory, { recursive: true });
  const photos: DemoPhoto[] = [];
  for (const side of ['obverse', 'reverse'] as const) {
    photos.push(coinDesigns[report.type] ? await drawDesigned(report, side, directory)
      : await drawPlain(report, side, directory));
  }
  return photos;
}

async function drawDesigned(
  report: DemoReport, side: 'obverse' | 'reverse', directory: string,
): Promise<DemoPhoto> {
  const maker = demoMakers[report.maker];
  const own = hashNumber(`${report.type} ${report.daysAgo} ${side}`);
  const description = {
    design: report.type, side, year: report.year,
    marks: side === 'obverse' || maker?.marks !== 'tooled'
      ? marksOf[maker?.marks ?? 'none'] ?? 'none' : 'none',
    dieSeed: report.die * 101 + hashNumber(`${report.type} ${report.maker}`) % 97,
    granular: maker?.id === 'cast' ? 0.75 : 0.05,
    wear: (own % 5) / 10,
    // No two are held alike, nor lit alike.
    turnDegrees: (own % 17) - 8 < 0 ? 360 + (own % 17) - 8 : (own % 17) - 8,
    lampDegrees: 290 + (own % 60),
    size: pictureSize,
  } as const;
  const { file, meta } = await kept(directory, description, async () => {
    const { jpeg, ...drawn } = await drawFace(description);
    return { jpeg, meta: drawn };
  });
  return { file, side, caption: 'Demonstration picture', ...meta };
}

async function drawPlain(
  report: DemoReport, side: 'obverse' | 'reverse', directory: string,
): Promise<DemoPhoto> {
  const words = report.type.includes('bar') ? 'BAR' : report.type.includes('sovereign')
    ? 'SOVEREIGN' : report.type.includes('20') ? 'TWENTY' : 'DOLLAR';
  const description = { schematic: words, side, year: report.year, size: pictureSize };
  const { file, meta } = await kept(directory, description, async () => {
    const { jpeg, circle } = await drawSchematic(words, report.year, pictureSize);
    return { jpeg, meta: { circle, uprightDegrees: 0, marks: [] } };
  });
  return { file, side, caption: 'Schematic drawing, no photograph', ...meta };
}

interface PictureMeta {
  readonly circle: Circle;
  readonly uprightDegrees: number;
  readonly marks: readonly PlacedMark[];
}

async function kept(
  directory: string, description: object,
  draw: () => Promise<{ jpeg: Buffer; meta: PictureMeta }>,
): Promise<{ file: string; meta: PictureMeta }> {
  const name = createHash('sha256').update(JSON.stringify([drawingEdition, description]))
    .digest('hex').slice(0, 24);
  const file = join(directory, `${name}.jpg`);
  const metaFile = join(directory, `${name}.json`);
  if (existsSync(file) && existsSync(metaFile)) {
    return { file, meta: JSON.parse(await readFile(metaFile, 'utf8')) };
  }
  const { jpeg, meta } = await draw();
  await writeFile(metaFile, JSON.stringify(meta));
  await writeFile(`${file}.unfinished`, jpeg);
  await rename(`${file}.unfinished`, file);
  return { file, meta };
}

function hashNumber(text: string): number {
  return createHash('sha256').update(text).digest().readUInt32BE(0);
}
