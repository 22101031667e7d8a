import { Circle, PhotoView, PlacedPhoto } from '#shared/reports/photo';
import { FaceView, PhotoPoint } from '#shared/tells/coin-coordinates';

/** What on a photo tells where the coin lies and which way is up. */
export type Handle = 'centre' | 'radius' | 'upright';
export type Framing = Pick<PlacedPhoto, 'circle' | 'uprightDegrees'>;

const keyStep = 0.004;

/** The photo of a face as coin coordinates are read from it. */
export function faceView(
  photo: PhotoView,
  placed: Framing,
  circle: Circle,
): FaceView {
  return { width: photo.width, height: photo.height, circle,
    uprightDegrees: placed.uprightDegrees };
}

/** Where the handles lie. The one for the radius lies at a right angle to the upright one. */
export function handlePoints(view: FaceView): Readonly<Record<Handle, PhotoPoint>> {
  const at = (degrees: number): PhotoPoint => {
    const angle = (degrees * Math.PI) / 180;
    return {
      x: view.circle.x + view.circle.radius * Math.sin(angle),
      y: view.circle.y - view.circle.radius * Math.cos(angle) * (view.width / view.height),
    };
  };
  return {
    centre: { x: view.circle.x, y: view.circle.y },
    upright: at(view.uprightDegrees),
    radius: at(view.uprightDegrees + 90),
  };
}

/** The framing after a handle was dragged to a point of the photo. */
export function draggedTo(handle: Handle, point: PhotoPoint, view: FaceView): Partial<Framing> {
  const across = point.x - view.circle.x;
  const down = (point.y - view.circle.y) * (view.height / view.width);
  switch (handle) {
    case 'centre':
      return { circle: boundedCircle({ ...view.circle, ...point }) };
    case 'radius':
      return { circle: boundedCircle({ ...view.circle, radius: Math.hypot(across, down) }) };
    case 'upright':
      return { uprightDegrees: wrappedDegrees((Math.atan2(across, -down) * 180) / Math.PI) };
  }
}

/** The framing after an arrow key on a handle; a step of `size` times some 0.4 % or 1 degree. */
export function movedByKey(
  handle: Handle,
  [across, down]: readonly [number, number],
  size: number,
  view: FaceView,
): Partial<Framing> {
  const { x, y, radius } = view.circle;
  const step = keyStep * size;
  switch (handle) {
    case 'centre':
      return { circle: boundedCircle({ radius, x: x + across * step, y: y + down * step }) };
    case 'radius':
      return { circle: boundedCircle({ x, y, radius: radius + (across - down) * step }) };
    case 'upright':
      return { uprightDegrees: wrappedDegrees(view.uprightDegrees + (across - down) * size) };
  }
}

/** Which way an arrow key points: right and down are positive. Undefined for other keys. */
export function arrowOf(key: string): readonly [number, number] | undefined {
  switch (key) {
    case 'ArrowLeft':
      return [-1, 0];
    case 'ArrowRight':
      return [1, 0];
    case 'ArrowUp':
      return [0, -1];
    case 'ArrowDown':
      return [0, 1];
    default:
      return undefined;
  }
}

export function boundedCircle({ x, y, radius }: Circle): Circle {
  return { x: bounded(x, 0, 1), y: bounded(y, 0, 1), radius: bounded(radius, 0.02, 1) };
}

/** Tenths of a degree, 0 ≤ d < 360. */
export function wrappedDegrees(degrees: number): number {
  const tenths = Math.round(degrees * 10) % 3600;
  // The second turn makes -0 a 0, too.
  return ((tenths + 3600) % 3600) / 10;
}

/** Rounded to ten-thousandths, which is finer than a pixel of the largest rendition. */
export function bounded(value: number, low: number, high: number): number {
  return Math.min(high, Math.max(low, Math.round(value * 10_000) / 10_000));
}

/** The point of an element that an event happened at, in fractions of its size. */
export function pointIn(
  element: Element,
  event: Pick<MouseEvent, 'clientX' | 'clientY'>,
): PhotoPoint {
  const box = element.getBoundingClientRect();
  return {
    x: bounded((event.clientX - box.left) / box.width, 0, 1),
    y: bounded((event.clientY - box.top) / box.height, 0, 1),
  };
}
