import { describe, expect, it } from 'vitest';

import { pictureHeader } from './picture-header';

const text = (words: string): number[] => [...words].map((letter) => letter.charCodeAt(0));
const bytesOf = (...parts: readonly (readonly number[])[]) => Uint8Array.from(parts.flat());

describe('pictureHeader', () => {
  it('reads a JPEG past its blocks, tables and fill bytes', () => {
    const jpeg = bytesOf([0xff, 0xd8], [0xff, 0xe1, 0, 6, 1, 2, 3, 4], [0xff],
      [0xff, 0xc4, 0, 3, 9], [0xff, 0xc2, 0, 17, 8, 0x0f, 0xa0, 0x17, 0x70, 3, 0, 0, 0]);
    expect(pictureHeader(jpeg)).toEqual({ format: 'jpeg', size: { width: 6000, height: 4000 } });
  });
  it('leaves the size open where the JPEG is cut before it', () => {
    expect(pictureHeader(bytesOf([0xff, 0xd8, 0xff, 0xe1, 0xff, 0xff, 0, 0, 0, 0, 0, 0, 0])))
      .toEqual({ format: 'jpeg', size: null });
  });
  it('reads a PNG', () => {
    const png = bytesOf([0x89], text('PNG\r\n\x1a\n'), [0, 0, 0, 13], text('IHDR'),
      [0, 0, 0x1f, 0x40, 0, 0, 0x1d, 0x4c]);
    expect(pictureHeader(png)).toEqual({ format: 'png', size: { width: 8000, height: 7500 } });
  });
  it.each([
    ['extended', [...text('VP8X'), 10, 0, 0, 0, 0, 0, 0, 0, 0x3f, 0x1f, 0, 0x4b, 0x1d, 0]],
    ['lossless', [...text('VP8L'), 9, 0, 0, 0, 0x2f, 0x3f, 0xdf, 0x52, 0x07, 0, 0, 0, 0, 0]],
    ['lossy', [...text('VP8 '), 9, 0, 0, 0, 0, 0, 0, 0x9d, 1, 0x2a, 0x40, 0x1f, 0x4c, 0x1d]],
  ])('reads a WebP, %s', (_kind, chunk) => {
    const webp = bytesOf(text('RIFF'), [0, 0, 0, 0], text('WEBP'), chunk);
    expect(pictureHeader(webp)).toEqual({ format: 'webp', size: { width: 8000, height: 7500 } });
  });
  it('knows what is none of them, whatever its name says', () => {
    expect(pictureHeader(bytesOf(text('<svg xmlns="http://www.w3.org/2000/svg">')))).toBeNull();
    expect(pictureHeader(bytesOf([]))).toBeNull();
  });
});
