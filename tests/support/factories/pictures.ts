import sharp from 'sharp';

/**
 * A JPEG as a camera writes it: stored on its side with an Orientation tag, with a GPS position.
 * Upright it is `width` × `height`, red above and blue below.
 */
export async function cameraJpeg(width = 600, height = 800): Promise<Buffer> {
  // Turned by 90° clockwise (Orientation 6), what is stored at the left comes to lie on top.
  const half = { width: height / 2, height: width, channels: 3 as const };
  const red = await sharp({ create: { ...half, background: '#c02020' } }).png().toBuffer();
  const blue = await sharp({ create: { ...half, background: '#2020c0' } }).png().toBuffer();
  return sharp({ create: { width: height, height: width, channels: 3, background: '#000' } })
    .composite([{ input: red, left: 0, top: 0 }, { input: blue, left: height / 2, top: 0 }])
    .jpeg().withMetadata({ orientation: 6, exif: { IFD3: {
      GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1',
      GPSLongitudeRef: 'W', GPSLongitude: '2/1 15/1 0/1' } } })
    .toBuffer();
}

/** Black and white squares of `square` pixels, on which a blur shows. */
export async function chequeredPng(side = 400, square = 10): Promise<Buffer> {
  const pixels = Buffer.alloc(side * side, 0);
  for (let y = 0; y < side; y += 1) {
    for (let x = 0; x < side; x += 1) {
      const isWhite = (Math.floor(x / square) + Math.floor(y / square)) % 2 === 0;
      pixels[y * side + x] = isWhite ? 255 : 0;
    }
  }
  return sharp(pixels, { raw: { width: side, height: side, channels: 1 } }).png().toBuffer();
}

/** Grey values of a rectangle of the picture, row by row. */
export function greysOf(
  bytes: Buffer, area: { left: number; top: number; width: number; height: number },
): Promise<Buffer> {
  return sharp(bytes).extract(area).greyscale().raw().toBuffer();
}

/** The mean red and blue of a picture's upper quarter. */
export async function coloursOnTop(bytes: Buffer): Promise<{ red: number; blue: number }> {
  const { width, height } = await sharp(bytes).metadata();
  const top = await sharp(bytes).extract({ left: 0, top: 0, width,
    height: Math.floor(height / 4) }).toBuffer();
  const { channels } = await sharp(top).stats();
  return { red: channels[0]?.mean ?? 0, blue: channels[2]?.mean ?? 0 };
}
