/** What the first bytes of a picture say; null where the size stands further in. */
export interface PictureHeader {
  readonly format: 'jpeg' | 'png' | 'webp';
  readonly size: { readonly width: number; readonly height: number } | null;
}

/** Bytes that are enough but for a JPEG with uncommonly large blocks before its frame. */
export const headerLength = 1024 * 1024;

/**
 * Reads the kind and the pixel size of a JPEG (ITU-T T.81, B.2.2), PNG (ISO/IEC 15948, 11.2.2) or
 * WebP (RFC 9649) without decoding it, since decoding eight large photos would end a phone's tab.
 * Answers null where it is none of them.
 */
export function pictureHeader(bytes: Uint8Array): PictureHeader | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff) {
    return { format: 'jpeg', size: jpegSize(view) };
  }
  if (textAt(bytes, 1, 3) === 'PNG' && bytes[0] === 0x89) {
    return {
      format: 'png',
      size: view.byteLength < 24 ? null : { width: view.getUint32(16), height: view.getUint32(20) },
    };
  }
  if (textAt(bytes, 0, 4) === 'RIFF' && textAt(bytes, 8, 4) === 'WEBP') {
    return { format: 'webp', size: view.byteLength < 30 ? null : webpSize(view, bytes) };
  }
  return null;
}

function jpegSize(view: DataView): PictureHeader['size'] {
  let at = 2;
  while (at + 9 < view.byteLength) {
    if (view.getUint8(at) !== 0xff) return null;
    const marker = view.getUint8(at + 1);
    // Frame headers are C0 to CF, but for the tables C4, C8 and CC among them.
    if (marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker)) {
      return { width: view.getUint16(at + 7), height: view.getUint16(at + 5) };
    }
    // Fill bytes stand alone; every other block says its length.
    at += marker === 0xff ? 1 : 2 + view.getUint16(at + 2);
  }
  return null;
}

function webpSize(view: DataView, bytes: Uint8Array): PictureHeader['size'] {
  switch (textAt(bytes, 12, 4)) {
    case 'VP8X':
      return {
        width: 1 + view.getUint16(24, true) + view.getUint8(26) * 65_536,
        height: 1 + view.getUint16(27, true) + view.getUint8(29) * 65_536,
      };
    case 'VP8L': {
      const bits = view.getUint32(21, true);
      return { width: 1 + (bits & 0x3fff), height: 1 + ((bits >> 14) & 0x3fff) };
    }
    case 'VP8 ':
      return {
        width: view.getUint16(26, true) & 0x3fff,
        height: view.getUint16(28, true) & 0x3fff,
      };
    default:
      return null;
  }
}

function textAt(bytes: Uint8Array, from: number, length: number): string {
  return String.fromCharCode(...bytes.subarray(from, from + length));
}
