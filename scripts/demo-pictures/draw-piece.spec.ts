import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import { drawFace, type DrawnFace, type FaceDescription } from './draw-piece';

const face: FaceDescription = { design: 'quillhaven-crown', side: 'obverse', year: 1887,
  marks: 'pit', dieSeed: 5, granular: 0, wear: 0, turnDegrees: 0, lampDegrees: 320, size: 300 };

const greys = (jpeg: Buffer): Promise<Buffer> => sharp(jpeg).greyscale().raw().toBuffer();

let one: DrawnFace;
beforeAll(async () => {
  one = await drawFace(face);
});

describe('drawn pieces', () => {
  it('are the same for the same description, and JPEGs of the size asked for', async () => {
    const other = await drawFace(face);
    expect(one.jpeg.equals(other.jpeg)).toBe(true);
    const { format, width, height } = await sharp(one.jpeg).metadata();
    expect([format, width, height]).toEqual(['jpeg', 300, 300]);
  });

  it.each([
    { kind: 'pit', turnDegrees: 40 }, { kind: 'spike', turnDegrees: 0 },
    { kind: 'tooled', turnDegrees: 350 },
  ] as const)('show each $kind where they say that it lies', async ({ kind, turnDegrees }) => {
    const marked = await drawFace({ ...face, turnDegrees, marks: kind });
    const clean = await greys((await drawFace({ ...face, turnDegrees, marks: 'none' })).jpeg);
    const pixels = await greys(marked.jpeg);
    expect(marked.marks.length).toBeGreaterThan(1);
    for (const { clockHours, radiusFraction } of marked.marks) {
      const angle = ((clockHours * 30 + turnDegrees) * Math.PI) / 180;
      const x = Math.round(150 + radiusFraction * 126 * Math.sin(angle));
      const y = Math.round(150 - radiusFraction * 126 * Math.cos(angle));
      let difference = 0;
      for (let down = -4; down <= 4; down++) {
        for (let across = -4; across <= 4; across++) {
          const at = (y + down) * 300 + x + across;
          difference = Math.max(difference, Math.abs((pixels[at] ?? 0) - (clean[at] ?? 0)));
        }
      }
      expect(difference).toBeGreaterThan(20);
    }
  });

  it('keep the marks of their die under another lamp, and look different', async () => {
    const other = await drawFace({ ...face, lampDegrees: 80 });
    expect(other.marks).toEqual(one.marks);
    expect(other.jpeg.equals(one.jpeg)).toBe(false);
  });
});
