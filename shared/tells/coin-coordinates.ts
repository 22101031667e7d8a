import type { Circle } from '../reports/photo';
import type { FacePlace } from '../reports/report-content';

/** A spot in a photo: fractions of its width and of its height from the upper left corner. */
export interface PhotoSpot {
  readonly x: number;
  readonly y: number;
}

/** How a coin lies in its photo. */
export interface CoinFrame {
  readonly circle: Circle;
  /** Degrees clockwise by which the coin is turned from upright. */
  readonly uprightDegrees: number;
  /** Height of the photo divided by its width. */
  readonly aspect: number;
}

/**
 * Coin coordinates of a spot in a photo: clock hours 0 ≤ h < 12 from the side's upright, and the
 * fraction of the radius. They survive cropping, scaling and turning of the photo.
 */
export function toCoin(
  spot: PhotoSpot, frame: CoinFrame,
): Pick<FacePlace, 'clockHours' | 'radiusFraction'> {
  const across = spot.x - frame.circle.x;
  const down = (spot.y - frame.circle.y) * frame.aspect;
  const degrees = (Math.atan2(across, -down) * 180) / Math.PI - frame.uprightDegrees;
  return {
    clockHours: (((degrees / 30) % 12) + 12) % 12,
    radiusFraction: Math.hypot(across, down) / frame.circle.radius,
  };
}

/** The spot in a photo at which coin coordinates lie; the inverse of `toCoin`. */
export function toPhoto(
  place: Pick<FacePlace, 'clockHours' | 'radiusFraction'>, frame: CoinFrame,
): PhotoSpot {
  const angle = ((place.clockHours * 30 + frame.uprightDegrees) * Math.PI) / 180;
  const reach = place.radiusFraction * frame.circle.radius;
  return {
    x: frame.circle.x + reach * Math.sin(angle),
    y: frame.circle.y - (reach * Math.cos(angle)) / frame.aspect,
  };
}

/** Coordinates as they are kept: hours to 1/1000, fractions to 1/1000 and at most 1.2. */
export function roundPlace(
  place: Pick<FacePlace, 'clockHours' | 'radiusFraction'>,
): Pick<FacePlace, 'clockHours' | 'radiusFraction'> {
  return {
    clockHours: (Math.round(place.clockHours * 1000) / 1000) % 12,
    radiusFraction: Math.min(1.2, Math.max(0, Math.round(place.radiusFraction * 1000) / 1000)),
  };
}
