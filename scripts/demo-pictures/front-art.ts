import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { drawDisc } from './draw-piece';

/** `tsx scripts/demo-pictures/front-art.ts`: the two pieces of the front page. */
const directory = join(import.meta.dirname, '../../client/public/art');
await mkdir(directory, { recursive: true });
const face = { side: 'obverse', wear: 0.05, turnDegrees: 0, lampDegrees: 318,
  size: 1280 } as const;
await writeFile(join(directory, 'front-known.webp'), await drawDisc({ ...face,
  design: 'larkmoor-half-mark', year: 1923, marks: 'none', dieSeed: 1, granular: 0.02 }, 640, 76));
await writeFile(join(directory, 'front-suspect.webp'), await drawDisc({ ...face,
  design: 'quillhaven-crown', year: 1887, marks: 'pit', dieSeed: 8, granular: 0.42 }, 640, 70));
