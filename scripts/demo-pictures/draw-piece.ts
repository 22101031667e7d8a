import sharp, { type OverlayOptions, type Sharp } from 'sharp';
import type { Circle } from '#shared/reports/photo';
import { coinDesigns } from './coin-designs';
import { cutMarks, placeMarks, type DieMark, type PlacedMark } from './die-marks';
import { blur, reliefOf, type HeightMap } from './height-map';
import { lightRelief, stoneGround, type Surface } from './lamp';
import { seededRandom } from './seeded-random';
import { lettersOnArc, lettersOnLine } from './stroke-letters';

export type { DieMark, PlacedMark } from './die-marks';

/** Raised whenever the drawing changes, so that kept pictures are not taken for new ones. */
export const drawingEdition = 5;

export interface FaceDescription {
  /** Slug of a coin type with a design. */
  readonly design: string;
  readonly side: 'obverse' | 'reverse';
  readonly year: number;
  /** What the false die carries, and the seed of where; pieces of one die have the same. */
  readonly marks: DieMark | 'none';
  readonly dieSeed: number;
  /** Sand-like field, as a mould leaves it, 0 to 1. */
  readonly granular: number;
  /** Loss of relief by wear, 0 to 1. */
  readonly wear: number;
  /** Degrees by which the coin is turned clockwise in the picture. */
  readonly turnDegrees: number;
  /** Where the lamp stands, degrees clockwise from the top. */
  readonly lampDegrees: number;
  /** How high the lamp stands above the table, degrees; 42 where not given. */
  readonly lampElevation?: number;
  readonly size: number;
}

export interface DrawnFace {
  readonly jpeg: Buffer;
  readonly width: number;
  readonly height: number;
  readonly circle: Circle;
  readonly uprightDegrees: number;
  readonly marks: readonly PlacedMark[];
}

const coinRadius = 0.42;

/** A photograph of one side of a piece, as a lamp from one side would show it. */
export async function drawFace(face: FaceDescription): Promise<DrawnFace> {
  const { size } = face;
  const { disc, marks } = await lightFace(face, coinRadius * size);
  const ground = sharp(stoneGround(size, coinRadius * size, face.lampDegrees),
    { raw: { width: size, height: size, channels: 3 } });
  return {
    jpeg: await finish(ground, size, disc),
    width: size,
    height: size,
    circle: { x: 0.5, y: 0.5, radius: coinRadius },
    uprightDegrees: face.turnDegrees % 360,
    marks,
  };
}

/**
 * The disc alone on a clear ground, filling the square: WebP, for the front page.
 * @param width pixels of the picture; drawn at the face's size, then made smaller
 */
export async function drawDisc(
  face: FaceDescription, width: number, quality: number,
): Promise<Buffer> {
  const { size } = face;
  const { disc } = await lightFace(face, size / 2 - 1);
  return sharp(disc, { raw: { width: size, height: size, channels: 4 } })
    .resize(width).webp({ quality, alphaQuality: 90, effort: 6 }).toBuffer();
}

async function lightFace(
  face: FaceDescription, radius: number,
): Promise<{ disc: Buffer; marks: readonly PlacedMark[] }> {
  const design = coinDesigns[face.design];
  if (!design) throw new Error(`there is no design ${face.design}`);
  const relief = await reliefOf(design[face.side](face.year), face.size, radius, face.turnDegrees);
  const marks = face.marks === 'none' ? [] : placeMarks(face.marks, face.dieSeed, face.side);
  wearDown(relief, radius, face);
  cutMarks(relief, marks, radius, face.turnDegrees);
  roughen(relief, radius, face);
  const surface: Surface = { metal: design.metal, radius, granular: face.granular,
    wear: face.wear, turnDegrees: face.turnDegrees, toned: face.marks === 'toning',
    seed: face.dieSeed, lampDegrees: face.lampDegrees, lampElevation: face.lampElevation ?? 42 };
  return { disc: lightRelief(relief, surface), marks };
}

/** A plain line drawing for real coin types, whose designs are not imitated. */
export async function drawSchematic(
  words: string, year: number, size: number,
): Promise<Omit<DrawnFace, 'uprightDegrees' | 'marks'>> {
  const radius = coinRadius * size;
  const ticks = Array.from({ length: 72 }, (_, at) =>
    `<path d="M0-.985V${at % 6 === 0 ? -0.93 : -0.955}" transform="rotate(${at * 5})"/>`).join('');
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<rect width="100%" height="100%" fill="#20262b"/><g transform="translate(${size / 2} ${
      size / 2}) scale(${radius})" color="#e9e6df"><g fill="none" stroke="#a9b2b7" `
    + `stroke-width=".007"><circle r="1" fill="#2b3339"/>${ticks}<circle r=".9"/>`
    + '<circle r=".6" stroke-dasharray=".03 .03"/><path d="M-.07 0H.07M0-.07V.07"/></g>'
    + `${lettersOnArc('SCHEMATIC', 0.69, 0.11, 0)}${lettersOnLine(words, 0, -0.30, 0.12)}${
      lettersOnArc(String(year), 0.80, 0.11, 180, true)}</g></svg>`;
  const drawing = sharp(Buffer.from(svg)).flatten().removeAlpha();
  return { jpeg: await finish(drawing, size), width: size, height: size,
    circle: { x: 0.5, y: 0.5, radius: coinRadius } };
}

/** Wear takes the tops off first: what stands high is pressed towards the field. */
function wearDown({ heights }: HeightMap, radius: number, { wear }: FaceDescription): void {
  const limit = radius * (0.056 - 0.040 * wear);
  for (let at = 0; at < heights.length; at++) {
    const height = heights[at] ?? 0;
    if (height > 0) heights[at] = limit * (1 - Math.exp(-height / limit)) * 1.15;
  }
}

/** A mould leaves sand; every field has a little noise, and hairlines from handling. */
function roughen({ size, heights }: HeightMap, radius: number, face: FaceDescription): void {
  const random = seededRandom(face.dieSeed * 31 + face.year);
  const noise = (reach: number): Float32Array => {
    const grain = new Float32Array(heights.length);
    for (let at = 0; at < grain.length; at++) grain[at] = random() - 0.5;
    return blur(grain, size, reach);
  };
  const fine = noise(1);
  const sand = face.granular > 0.1 ? noise(Math.max(1, Math.round(radius * 0.0045))) : undefined;
  const sandHeight = face.granular * radius * 0.016;
  for (let at = 0; at < heights.length; at++) {
    heights[at] = (heights[at] ?? 0) + (fine[at] ?? 0) * 0.34 + (sand?.[at] ?? 0) * sandHeight;
  }
  for (let line = 0; line < 34; line++) scratch(heights, size, random);
}

/** A hairline: a slightly bent scratch, shared among the pixels that it passes between. */
function scratch(heights: Float32Array, size: number, random: () => number): void {
  let [x, y] = [random() * size, random() * size];
  let angle = random() * Math.PI * 2;
  const bend = (random() - 0.5) * 0.004;
  const depth = 0.12 + 0.3 * random();
  const length = size * (0.04 + 0.13 * random());
  for (let step = 0; step < length; step++) {
    x += Math.cos(angle);
    y += Math.sin(angle);
    angle += bend;
    if (x < 1 || y < 1 || x > size - 2 || y > size - 2) return;
    const at = Math.floor(y) * size + Math.floor(x);
    const right = x - Math.floor(x);
    const down = y - Math.floor(y);
    // Deepest half way, where the hand pressed.
    const press = depth * Math.sin((Math.PI * step) / length);
    for (const [pixel, share] of [[at, (1 - right) * (1 - down)], [at + 1, right * (1 - down)],
      [at + size, (1 - right) * down], [at + size + 1, right * down]] as const) {
      heights[pixel] = (heights[pixel] ?? 0) - press * share;
    }
  }
}

/** Lays the disc on its ground and encodes, with the words that say what the picture is. */
async function finish(ground: Sharp, size: number, disc?: Buffer): Promise<Buffer> {
  const words = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<g color="#8d979d">${lettersOnLine('DEMONSTRATION PICTURE', size / 2, size * 0.966,
      size * 0.014)}</g></svg>`;
  const layers: OverlayOptions[] = [{ input: Buffer.from(words) }];
  if (disc) layers.unshift({ input: disc, raw: { width: size, height: size, channels: 4 } });
  return ground.composite(layers).jpeg({ quality: 88 }).toBuffer();
}
