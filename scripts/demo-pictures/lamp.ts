import { blur, type HeightMap } from './height-map';
import { seededRandom } from './seeded-random';

export type Metal = 'silver' | 'gold' | 'copper';
type Colour = readonly [red: number, green: number, blue: number];

/** What the lamp falls upon. */
export interface Surface {
  readonly metal: Metal;
  /** Coin radius in pixels. */
  readonly radius: number;
  readonly granular: number;
  readonly wear: number;
  readonly turnDegrees: number;
  readonly toned: boolean;
  readonly seed: number;
  /** Degrees clockwise from the top, and above the table. */
  readonly lampDegrees: number;
  readonly lampElevation: number;
}

/** Colour of each metal in full light, in the hollows, and of its shine; 0 to 1. */
const metals: Readonly<Record<Metal, { light: Colour; hollow: Colour; shine: Colour }>> = {
  silver: { light: [0.87, 0.88, 0.89], hollow: [0.21, 0.215, 0.23], shine: [1, 0.995, 0.97] },
  gold: { light: [1.0, 0.775, 0.33], hollow: [0.30, 0.19, 0.05], shine: [1, 0.90, 0.60] },
  copper: { light: [0.84, 0.44, 0.245], hollow: [0.20, 0.085, 0.05], shine: [1, 0.75, 0.56] },
};
const stone: Colour = [32, 38, 43];

/** Lights the relief: RGBA, clear outside the disc. */
export function lightRelief({ size, heights }: HeightMap, surface: Surface): Buffer {
  const { radius, granular } = surface;
  const pixels = Buffer.alloc(size * size * 4);
  const { light, hollow, shine } = metals[surface.metal];
  const lamp = (surface.lampDegrees * Math.PI) / 180;
  const elevation = (surface.lampElevation * Math.PI) / 180;
  const lx = Math.sin(lamp) * Math.cos(elevation);
  const ly = -Math.cos(lamp) * Math.cos(elevation);
  const lz = Math.sin(elevation);
  // Half way between the lamp and the eye above.
  const half = 1 / Math.hypot(lx, ly, lz + 1);
  // A camera opens wider under a low lamp.
  const exposure = brightnessFacing(0.67) / brightnessFacing(lz);
  const around = blur(heights.slice(), size, Math.max(2, Math.round(radius * 0.014)));
  const flow = flowLines(surface);
  const centre = size / 2;
  const lustre = (1 - granular * 0.85) * (1 - surface.wear * 0.6);
  const reach = radius + 1;
  for (let y = 1; y < size - 1; y++) {
    const dy = y + 0.5 - centre;
    if (Math.abs(dy) > reach) continue;
    const span = Math.sqrt(reach * reach - dy * dy);
    const last = Math.min(size - 2, Math.ceil(centre + span));
    for (let x = Math.max(1, Math.floor(centre - span)); x <= last; x++) {
      const at = y * size + x;
      const dx = x + 0.5 - centre;
      const fromCentre = Math.sqrt(dx * dx + dy * dy);
      const cover = Math.min(1, Math.max(0, radius - fromCentre + 0.5));
      if (cover === 0) continue;
      const away = fromCentre / radius;
      // The field is a shallow dish, and the outer edge of the rim falls away.
      const dish = -0.05 * away + (away > 0.985 ? (away - 0.985) * 45 : 0);
      const nx = -((heights[at + 1] ?? 0) - (heights[at - 1] ?? 0)) * 0.62
        + dish * dx / (fromCentre + 1);
      const ny = -((heights[at + size] ?? 0) - (heights[at - size] ?? 0)) * 0.62
        + dish * dy / (fromCentre + 1);
      const norm = 1 / Math.sqrt(nx * nx + ny * ny + 1);
      const facing = Math.max(0, (nx * lx + ny * ly + lz) * norm);
      const towards = Math.max(0, (nx * lx + ny * ly + lz + 1) * norm * half);
      // Products instead of powers: this runs for every pixel.
      const second = towards * towards;
      const eighth = second * second * second * second;
      const broad = eighth * second * second * second;
      const thirtySecond = eighth * eighth * eighth * eighth;
      const fine = thirtySecond * thirtySecond * thirtySecond;
      const turn = Math.atan2(dx, -dy);
      const wedge = Math.cos(turn - lamp - 0.5) ** 2;
      const cartwheel = lustre * Math.min(1, away * 2.2)
        * (wedge * wedge * wedge * 0.42 - 0.08
          + 0.05 * (flow[Math.floor((turn + Math.PI) * 160)] ?? 0));
      // Hollows keep dirt and see less of the sky.
      const cavity = ((heights[at] ?? 0) - (around[at] ?? 0)) / (radius * 0.0075);
      const open = Math.max(0, Math.min(1, 0.86 + cavity * 0.42));
      const diffuse = exposure * brightnessFacing(facing)
        * (1 + cartwheel) * (0.45 + 0.55 * open);
      const spec = (0.20 * broad + 0.30 * fine * (1 - granular * 0.7))
        * (0.6 + cartwheel * 1.6) * open;
      const tone = surface.toned ? toningAt(dx / radius, dy / radius, surface.turnDegrees) : white;
      for (let channel = 0; channel < 3; channel++) {
        const ground = (hollow[channel] ?? 0) * 0.5 * (1 - open)
          + ((light[channel] ?? 0) * open + (hollow[channel] ?? 0) * (1 - open)) * diffuse;
        const value = (ground * (1 - granular * 0.12) + (shine[channel] ?? 0) * spec)
          * (tone[channel] ?? 1);
        // A soft shoulder, so that no light burns out.
        pixels[at * 4 + channel] = 255 * (value < 0.7 ? value
          : 0.7 + 0.3 * (1 - Math.exp(-(value - 0.7) / 0.3)));
      }
      pixels[at * 4 + 3] = Math.round(255 * cover);
    }
  }
  return pixels;
}

const brightnessFacing = (facing: number): number =>
  0.10 + 0.80 * facing * facing + 0.22 * facing;

const white: Colour = [1, 1, 1];

/** Some ten times as fast as `Math.hypot`, which guards against numbers that never occur here. */
const length = (x: number, y: number): number => Math.sqrt(x * x + y * y);

/** Metal flowed outward under the die: fine spokes, some brighter, some darker. */
function flowLines({ seed, turnDegrees }: Surface): Float32Array {
  const random = seededRandom(seed * 17 + 5);
  const spokes = Float32Array.from({ length: 1006 }, () => random() - 0.5);
  const shift = Math.round((turnDegrees / 360) * spokes.length);
  return spokes.map((_, at) => {
    let sum = 0;
    for (const near of [-2, -1, 0, 1, 2]) {
      sum += spokes[(at + near - shift + 2 * spokes.length) % spokes.length] ?? 0;
    }
    return sum;
  });
}

/**
 * Bands of colour as a painted patina shows them: clear in the middle, then straw, rose, blue and
 * green towards the rim, lying off the centre and straight across the device.
 */
function toningAt(x: number, y: number, turnDegrees: number): Colour {
  const turn = (turnDegrees * Math.PI) / 180;
  const offX = 0.10 * Math.cos(turn) + 0.08 * Math.sin(turn);
  const offY = 0.10 * Math.sin(turn) - 0.08 * Math.cos(turn);
  const away = length(x - offX, y - offY);
  const strength = Math.max(0, Math.min(1, (away - 0.30) / 0.5));
  const phase = away * 12.5 - 3.6;
  return [1 + strength * (0.10 + 0.20 * Math.cos(phase)),
    1 + strength * (0.03 + 0.15 * Math.cos(phase - 1.5)),
    1 + strength * (0.06 + 0.24 * Math.cos(phase - 3.2))];
}

/** The stone on which the piece lies, with its shadow away from the lamp; RGB. */
export function stoneGround(size: number, radius: number, lampDegrees: number): Buffer {
  const pixels = Buffer.alloc(size * size * 3);
  const lamp = (lampDegrees * Math.PI) / 180;
  const lx = Math.sin(lamp);
  const ly = -Math.cos(lamp);
  const random = seededRandom(size);
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      const dx = x + 0.5 - size / 2;
      const dy = y + 0.5 - size / 2;
      // Under the disc nothing is seen.
      if (dx * dx + dy * dy < (radius - 2) ** 2) continue;
      const pool = Math.max(0, 1 - length(dx - lx * size * 0.3, dy - ly * size * 0.3)
        / (size * 0.85));
      const out = length(dx + lx * radius * 0.045, dy + ly * radius * 0.045) / radius - 1;
      const shade = 1 - 0.72 * Math.exp(-Math.max(0, out) * 13);
      const bright = (0.88 + 0.34 * pool) * shade;
      const grain = (random() - 0.5) * 2.4;
      for (let channel = 0; channel < 3; channel++) {
        pixels[(y * size + x) * 3 + channel] = Math.max(0, (stone[channel] ?? 0) * bright + grain);
      }
    }
  }
  return pixels;
}
