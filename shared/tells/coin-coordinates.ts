import type { Circle } from '../reports/photo';
import type { EdgePlace, FacePlace } from '../reports/report-content';

/** A point in a photo: fractions of its width from the left and of its height from the top. */
export interface PhotoPoint {
  readonly x: number;
  readonly y: number;
}

/** A photo of a side: its size in pixels, where the coin lies in it, and how it is turned. */
export interface FaceView {
  readonly width: number;
  readonly height: number;
  readonly circle: Circle;
  /** Degrees clockwise by which the coin in the photo is turned from upright. */
  readonly uprightDegrees: number;
}

/**
 * A photo of the edge seen from the side: where the coin's rectangle lies, in fractions of width
 * and height, and which angle of the coin faces the camera (degrees clockwise from the obverse's
 * upright). Half of the circumference is in view.
 */
export interface EdgeView {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly centreDegrees: number;
}

const degreesPerHour = 30;
const radians = Math.PI / 180;
/** Hundredths of an hour, thousandths of the radius: some 0.05 mm at the rim of a crown. */
const hourStep = 100;
const fractionStep = 1000;
const degreeStep = 10;

/** Where a pin of a side falls in a photo of that side. */
export function faceToPhoto(place: Pick<FacePlace, 'clockHours' | 'radiusFraction'>,
  view: FaceView): PhotoPoint {
  const angle = (place.clockHours * degreesPerHour + view.uprightDegrees) * radians;
  const distance = place.radiusFraction * view.circle.radius;
  return {
    x: view.circle.x + distance * Math.sin(angle),
    // The radius is a fraction of the width, y one of the height.
    y: view.circle.y - distance * Math.cos(angle) * (view.width / view.height),
  };
}

/** The pin for a point in a photo, rounded; a point beyond the rim is put on the rim. */
export function photoToFace(point: PhotoPoint, side: FacePlace['side'],
  view: FaceView): FacePlace {
  const right = point.x - view.circle.x;
  const up = (view.circle.y - point.y) * (view.height / view.width);
  const degrees = Math.atan2(right, up) / radians - view.uprightDegrees;
  return roundFace({ side, clockHours: degrees / degreesPerHour,
    radiusFraction: Math.hypot(right, up) / view.circle.radius });
}

/** A pin with hours 0 ≤ h < 12 in hundredths and a fraction of 0 to 1 in thousandths. */
export function roundFace(place: FacePlace): FacePlace {
  const radiusFraction = Math.min(1, Math.max(0,
    Math.round(place.radiusFraction * fractionStep) / fractionStep));
  return { side: place.side, radiusFraction,
    // At the centre every hour is the same place; one is chosen so that equal pins are equal.
    clockHours: radiusFraction === 0 ? 0 : wrap(place.clockHours, 12, hourStep) };
}

/** Where a pin on the edge falls in a photo of it, or undefined where it is out of view. */
export function edgeToPhoto(place: Pick<EdgePlace, 'angleDegrees' | 'heightFraction'>,
  view: EdgeView): PhotoPoint | undefined {
  const turned = (place.angleDegrees - view.centreDegrees) * radians;
  if (Math.cos(turned) < 0) return undefined;
  const middle = (view.left + view.right) / 2;
  return { x: middle + (Math.sin(turned) * (view.right - view.left)) / 2,
    y: view.bottom - place.heightFraction * (view.bottom - view.top) };
}

/** The pin for a point in a photo of the edge; one outside the coin is put on its border. */
export function photoToEdge(point: PhotoPoint, view: EdgeView): EdgePlace {
  const across = (2 * (point.x - view.left)) / (view.right - view.left) - 1;
  const turned = Math.asin(Math.min(1, Math.max(-1, across))) / radians;
  return roundEdge({ side: 'edge', angleDegrees: view.centreDegrees + turned,
    heightFraction: (view.bottom - point.y) / (view.bottom - view.top) });
}

/** A pin with degrees 0 ≤ a < 360 in tenths and a height of 0 to 1 in thousandths. */
export function roundEdge(place: EdgePlace): EdgePlace {
  return { side: 'edge', angleDegrees: wrap(place.angleDegrees, 360, degreeStep),
    heightFraction: Math.min(1, Math.max(0,
      Math.round(place.heightFraction * fractionStep) / fractionStep)) };
}

/** Distance of two pins of one side, in fractions of the radius. */
export function faceDistance(a: FacePlace, b: FacePlace): number {
  const at = ({ clockHours, radiusFraction }: FacePlace) => {
    const angle = clockHours * degreesPerHour * radians;
    return [radiusFraction * Math.sin(angle), radiusFraction * Math.cos(angle)] as const;
  };
  const [ax, ay] = at(a);
  const [bx, by] = at(b);
  return Math.hypot(ax - bx, ay - by);
}

/** Rounds to 1/step and wraps into 0 ≤ value < period; 11.999 hours become 0, not 12. */
function wrap(value: number, period: number, step: number): number {
  const steps = Math.round(value * step) % (period * step);
  return (steps < 0 ? steps + period * step : steps + 0) / step;
}
