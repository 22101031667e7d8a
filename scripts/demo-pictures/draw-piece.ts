import sharp from 'sharp';
import type { Circle } from '#shared/reports/photo';
import { coinDesigns, type CoinDesign } from './coin-designs';
import { reliefOf, type HeightMap } from './height-map';
import { seededRandom } from './seeded-random';
import { lettersOnArc, lettersOnLine } from './stroke-letters';

export type DieMark = 'pit' | 'lump' | 'spike' | 'tooled' | 'toning';

/** Where a mark of a false die lies, in coin coordinates. */
export interface PlacedMark {
  readonly kind: DieMark;
  readonly clockHours: number;
  readonly radiusFraction: number;
}

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
  readonly size: number;
}

export interface DrawnFace {
  readonly jpeg: Buffer;
  readonly circle: Circle;
  readonly uprightDegrees: number;
  readonly marks: readonly PlacedMark[];
}

const coinRadius = 0.42;
const metals: Readonly<Record<CoinDesign['metal'], readonly [number, number, number]>> = {
  silver: [186, 190, 194], gold: [206, 165, 82], copper: [176, 104, 66],
};

/** A photograph of one side of a piece, as a lamp from one side would show it. */
export async function drawFace(face: FaceDescription): Promise<DrawnFace> {
  const design = coinDesigns[face.design];
  if (!design) throw new Error(`there is no design ${face.design}`);
  const { size } = face;
  const radius = coinRadius * size;
  const relief = await reliefOf(design[face.side](face.year), size, radius, face.turnDegrees);
  const marks = face.marks === 'none' ? [] : placeMarks(face.marks, face.dieSeed, face.side);
  cutMarks(relief, marks, radius, face);
  roughen(relief, radius, face);
  const pixels = light(relief, radius, metals[design.metal], face);
  return {
    jpeg: await finish(pixels, size),
    circle: { x: 0.5, y: 0.5, radius: coinRadius },
    uprightDegrees: face.turnDegrees % 360,
    marks,
  };
}

/** The disc alone on a clear ground, for the front page. */
export async function drawDisc(face: FaceDescription): Promise<Buffer> {
  const { jpeg } = await drawFace(face);
  const edge = Math.round(face.size * (0.5 - coinRadius));
  const width = face.size - 2 * edge;
  const round = Buffer.from(`<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${
    width}"><circle cx="50%" cy="50%" r="50%" fill="#fff"/></svg>`);
  return sharp(await sharp(jpeg).extract({ left: edge, top: edge, width, height: width })
    .ensureAlpha().composite([{ input: round, blend: 'dest-in' }]).png().toBuffer())
    .resize(560).webp({ quality: 70 }).toBuffer();
}

/** A plain line drawing for real coin types, whose designs are not imitated. */
export async function drawSchematic(
  words: string, year: number, size: number,
): Promise<Omit<DrawnFace, 'uprightDegrees' | 'marks'>> {
  const radius = coinRadius * size;
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<rect width="100%" height="100%" fill="#20262b"/><g transform="translate(${size / 2} ${
      size / 2}) scale(${radius})" fill="none" stroke="#e9e6df" stroke-width=".012">`
    + '<circle r="1" fill="#3b454c"/><circle r=".92"/><path d="M-.3 0H.3M0-.3V.3"/></g>'
    + `<g transform="translate(${size / 2} ${size / 2}) scale(${radius})" fill="none" `
    + `stroke="#e9e6df" stroke-width="1.4" stroke-linecap="round">${
      lettersOnArc('SCHEMATIC', 0.68, 0.12, 0)}${lettersOnLine(words, 0, 0.36, 0.1)}${
      lettersOnArc(String(year), 0.68, 0.12, 180, true)}</g></svg>`;
  const { data } = await sharp(Buffer.from(svg)).flatten().removeAlpha().raw()
    .toBuffer({ resolveWithObject: true });
  return { jpeg: await finish(data, size), circle: { x: 0.5, y: 0.5, radius: coinRadius } };
}

/** The same for one die, whatever the light and the turn of the picture. */
function placeMarks(kind: DieMark, seed: number, side: string): PlacedMark[] {
  const random = seededRandom(seed * 7919 + (side === 'reverse' ? 1 : 0));
  if (kind === 'tooled') {
    return [{ kind, clockHours: 6.12, radiusFraction: 0.77 },
      { kind, clockHours: 5.7, radiusFraction: 0.74 }];
  }
  if (kind === 'toning') return [{ kind, clockHours: 2.3, radiusFraction: 0.6 }];
  return Array.from({ length: kind === 'spike' ? 5 : 9 }, () => ({
    kind, clockHours: Math.round(random() * 1199) / 100,
    radiusFraction: Math.round((0.25 + random() * 0.6) * 100) / 100,
  }));
}

function cutMarks(
  relief: HeightMap, marks: readonly PlacedMark[], radius: number, face: FaceDescription,
): void {
  const { size, heights } = relief;
  for (const [number, mark] of marks.entries()) {
    const angle = ((mark.clockHours * 30 + face.turnDegrees) * Math.PI) / 180;
    const x = size / 2 + mark.radiusFraction * radius * Math.sin(angle);
    const y = size / 2 - mark.radiusFraction * radius * Math.cos(angle);
    const width = radius * (mark.kind === 'spike' ? 0.010 : 0.020 + 0.008 * (number % 3));
    const height = radius * { pit: -0.030, lump: 0.026, spike: 0.022, tooled: -0.02,
      toning: 0 }[mark.kind];
    const long = mark.kind === 'spike' || mark.kind === 'tooled' ? radius * 0.06 : 0;
    const lean = angle + 0.7 + number;
    const reach = Math.ceil(width * 3 + long);
    for (let down = -reach; down <= reach; down++) {
      for (let across = -reach; across <= reach; across++) {
        const along = across * Math.cos(lean) + down * Math.sin(lean);
        const aside = -across * Math.sin(lean) + down * Math.cos(lean);
        const beyond = Math.max(0, Math.abs(along) - long);
        const fall = Math.exp(-(beyond * beyond + aside * aside) / (width * width));
        const at = Math.round(y + down) * size + Math.round(x + across);
        if (at >= 0 && at < heights.length) heights[at] = (heights[at] ?? 0) + height * fall;
      }
    }
  }
}

/** Wear takes the tops off; a mould leaves sand; every field has a little noise and hairlines. */
function roughen({ size, heights }: HeightMap, radius: number, face: FaceDescription): void {
  const random = seededRandom(face.dieSeed * 31 + face.year);
  const top = radius * 0.036 * (1 - face.wear * 0.6);
  const coarse = new Float32Array((size / 4 + 2) ** 2);
  for (let at = 0; at < coarse.length; at++) coarse[at] = random() - 0.5;
  const side = Math.floor(size / 4) + 2;
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      const at = y * size + x;
      const sand = coarse[(y >> 2) * side + (x >> 2)] ?? 0;
      const worn = (heights[at] ?? 0) > top ? top : heights[at] ?? 0;
      heights[at] = worn + (random() - 0.5) * 0.28 + sand * face.granular * radius * 0.0028;
    }
  }
  for (let line = 0; line < 26; line++) {
    let [x, y] = [random() * size, random() * size];
    const angle = random() * Math.PI * 2;
    for (let step = 0; step < size * 0.16; step++) {
      x += Math.cos(angle);
      y += Math.sin(angle);
      const at = Math.round(y) * size + Math.round(x);
      if (at >= 0 && at < heights.length) heights[at] = (heights[at] ?? 0) - 0.35;
    }
  }
}

/** Diffuse and specular light on the normals, with the faint cartwheel of struck metal. */
function light(
  { size, heights }: HeightMap, radius: number, metal: readonly [number, number, number],
  face: FaceDescription,
): Buffer {
  const pixels = Buffer.alloc(size * size * 3);
  const lamp = (face.lampDegrees * Math.PI) / 180;
  const [lx, ly, lz] = [Math.sin(lamp) * 0.62, -Math.cos(lamp) * 0.62, 0.78];
  const centre = size / 2;
  for (let y = 1; y < size - 1; y++) {
    for (let x = 1; x < size - 1; x++) {
      const at = y * size + x;
      const dx = x - centre;
      const dy = y - centre;
      const away = Math.hypot(dx, dy) / radius;
      const ground = 26
        + 10 * Math.max(0, 1 - Math.hypot(dx + lx * 90, dy + ly * 90) / (size * 0.7));
      if (away > 1.004) {
        // The shadow that the piece throws on the stone.
        const shade = Math.min(1, Math.max(0, (Math.hypot(dx + lx * 14, dy + ly * 14)
          / radius - 1) * 9 + 0.15));
        pixels[at * 3] = ground * 0.95 * shade;
        pixels[at * 3 + 1] = (ground + 4) * shade;
        pixels[at * 3 + 2] = (ground + 9) * shade;
        continue;
      }
      const slopeX = ((heights[at + 1] ?? 0) - (heights[at - 1] ?? 0)) * 0.62;
      const slopeY = ((heights[at + size] ?? 0) - (heights[at - size] ?? 0)) * 0.62;
      const norm = 1 / Math.sqrt(slopeX * slopeX + slopeY * slopeY + 1);
      const facing = (-slopeX * lx - slopeY * ly + lz) * norm;
      const diffuse = Math.max(0, facing);
      const shine = Math.max(0, facing * 1.05 - 0.1) ** 26;
      const turn = Math.atan2(dx, -dy) - lamp;
      const cartwheel = (1 - face.granular * 0.8) * 0.13 * Math.cos(turn * 2)
        * Math.min(1, away * 1.6);
      const bright = 0.16 + 0.86 * diffuse + cartwheel;
      const tone = face.marks === 'toning' ? toningAt(dx / radius, dy / radius) : undefined;
      for (let channel = 0; channel < 3; channel++) {
        const base = (metal[channel] ?? 0) * (tone?.[channel] ?? 1);
        pixels[at * 3 + channel] = Math.max(0, Math.min(255,
          base * bright * (1 - face.granular * 0.16) + 92 * shine * (1 - face.granular * 0.7)));
      }
    }
  }
  return pixels;
}

/** Bands of colour, as a false patina shows them: blue at the rim, then rose and gold. */
function toningAt(x: number, y: number): readonly [number, number, number] {
  const band = Math.hypot(x - 0.12, y + 0.1) * 2.6;
  return [0.97 + 0.1 * Math.sin(band * 3.1), 0.92 + 0.09 * Math.sin(band * 3.1 + 2.1),
    0.94 + 0.15 * Math.sin(band * 3.1 + 4.2)];
}

/** Encodes, with the words that say what it is. */
async function finish(pixels: Buffer, size: number): Promise<Buffer> {
  const words = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<g fill="none" stroke="#a9b2b7" stroke-width="1.5" stroke-linecap="round">`
    + `${lettersOnLine('DEMONSTRATION PICTURE', size / 2, size * 0.968, size * 0.016)}</g></svg>`;
  return sharp(pixels, { raw: { width: size, height: size, channels: 3 } })
    .composite([{ input: Buffer.from(words) }]).jpeg({ quality: 88, mozjpeg: false }).toBuffer();
}

