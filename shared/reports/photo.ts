export const photoSides = ['obverse', 'reverse', 'edge', 'detail'] as const;
export type PhotoSide = (typeof photoSides)[number];

export const renditionSizes = { small: 320, medium: 800, large: 1600 } as const;
export type RenditionSize = keyof typeof renditionSizes;

/** The coin's circle in a photo: centre as fractions of width and height, radius of the width. */
export interface Circle {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
}

/** A rectangle blurred by the reporter, in fractions of the width and of the height. */
export interface BlurArea {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/**
 * A photo as the browser shows it. Files: `/api/photos/<id>/<size>.<webp|jpeg>`, size small,
 * medium or large.
 */
export interface PhotoView {
  readonly id: string;
  /** Pixels of the upright master. */
  readonly width: number;
  readonly height: number;
}

/** `POST /api/photos` (multipart: `id` made by the client, then `photo`). */
export interface UploadedPhoto extends PhotoView {
  readonly blurs: readonly BlurArea[];
}

/** A photo placed in a report: which side, where the coin lies in it, and its upright. */
export interface PlacedPhoto {
  readonly photoId: string;
  readonly side: PhotoSide;
  readonly circle: Circle | null;
  /** Degrees clockwise by which the coin in the photo is turned from upright, 0 ≤ d < 360. */
  readonly uprightDegrees: number;
  readonly caption: string;
}

export interface PlacedPhotoView extends PhotoView {
  readonly side: PhotoSide;
  readonly circle: Circle | null;
  readonly uprightDegrees: number;
  readonly caption: string;
}

export function photoAddress(id: string, size: RenditionSize, format: 'webp' | 'jpeg'): string {
  return `/api/photos/${id}/${size}.${format}`;
}
