import type { BlurArea, RenditionSize } from '#shared/reports/photo';

/** Limits that hold before a single pixel is decoded. */
export const maximumBytes = 25 * 1024 * 1024;
export const maximumPixels = 60_000_000;
/** Longest side of the private master, in pixels. */
export const masterSide = 4000;

export type RenditionFormat = 'webp' | 'jpeg';

export interface RenditionFile {
  readonly size: RenditionSize;
  readonly format: RenditionFormat;
  readonly path: string;
  readonly width: number;
  readonly height: number;
  readonly bytes: number;
}

/** What the parent asks of the decoding process; files are handed over by path. */
export type DecodeRequest =
  | { readonly kind: 'receive'; readonly source: string; readonly directory: string }
  | { readonly kind: 'render'; readonly master: string; readonly directory: string;
    readonly blurs: readonly BlurArea[] };

export type DecodeRefusal = 'photo_not_an_image' | 'photo_too_many_pixels' | 'photo_damaged';

export interface DecodedPhoto {
  /** Path of the master, where one was made. */
  readonly master: string;
  readonly width: number;
  readonly height: number;
  /** Hex SHA-256 and length of what came. */
  readonly sha256: string;
  readonly bytesReceived: number;
  readonly renditions: readonly RenditionFile[];
}

export type DecodeReply =
  | { readonly ok: true; readonly photo: DecodedPhoto }
  | { readonly ok: false; readonly refusal: DecodeRefusal; readonly cause: string };
