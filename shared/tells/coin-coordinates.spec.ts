import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { FacePlace } from '../reports/report-content';
import { edgeToPhoto, faceDistance, faceToPhoto, photoToEdge, photoToFace, roundFace,
  type EdgeView, type FaceView } from './coin-coordinates';

const fraction = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const views: fc.Arbitrary<FaceView> = fc.record({
  width: fc.integer({ min: 320, max: 8000 }), height: fc.integer({ min: 320, max: 8000 }),
  circle: fc.record({ x: fraction(0.2, 0.8), y: fraction(0.2, 0.8), radius: fraction(0.1, 0.5) }),
  uprightDegrees: fraction(0, 359.9),
});
const places: fc.Arbitrary<FacePlace> = fc.record({
  side: fc.constantFrom('obverse', 'reverse'),
  clockHours: fc.integer({ min: 0, max: 1199 }).map((each) => each / 100),
  radiusFraction: fc.integer({ min: 1, max: 1000 }).map((each) => each / 1000),
});
const upright: FaceView = { width: 1000, height: 500, uprightDegrees: 0,
  circle: { x: 0.5, y: 0.5, radius: 0.2 } };

describe('faceToPhoto', () => {
  it.each([[0, 0.5, 0.1], [3, 0.7, 0.5], [6, 0.5, 0.9], [9, 0.3, 0.5]])(
    'puts the rim at %i o’clock where it lies in a photo twice as wide as high',
    (clockHours, x, y) => {
      const point = faceToPhoto({ clockHours, radiusFraction: 1 }, upright);
      expect(point.x).toBeCloseTo(x, 10);
      expect(point.y).toBeCloseTo(y, 10);
    });

  it('turns with the coin: twelve o’clock of a coin turned by 90° clockwise lies at the right',
    () => {
      const point = faceToPhoto({ clockHours: 0, radiusFraction: 1 },
        { ...upright, uprightDegrees: 90 });
      expect(point.x).toBeCloseTo(0.7, 10);
      expect(point.y).toBeCloseTo(0.5, 10);
    });
});

describe('photoToFace', () => {
  it('gives back a pin from any photo of its side', () => {
    fc.assert(fc.property(places, views, (place, view) => {
      const back = photoToFace(faceToPhoto(place, view), place.side, view);
      expect(faceDistance(place, back)).toBeLessThan(0.001);
    }));
  });

  it('survives cropping: the same point of the coin, the same pin', () => {
    fc.assert(fc.property(places, views, fraction(0.5, 1), (place, view, kept) => {
      const cropped: FaceView = { ...view, width: view.width * kept,
        circle: { ...view.circle, x: view.circle.x / kept, radius: view.circle.radius / kept } };
      const whole = faceToPhoto(place, view);
      const point = faceToPhoto(place, cropped);
      expect(point.x * kept).toBeCloseTo(whole.x, 9);
      expect(point.y).toBeCloseTo(whole.y, 9);
    }));
  });

  it('stays in range for any point, and puts what lies beyond on the rim', () => {
    fc.assert(fc.property(views, fraction(-1, 2), fraction(-1, 2), (view, x, y) => {
      const place = photoToFace({ x, y }, 'obverse', view);
      expect(place.clockHours).toBeGreaterThanOrEqual(0);
      expect(place.clockHours).toBeLessThan(12);
      expect(place.radiusFraction).toBeGreaterThanOrEqual(0);
      expect(place.radiusFraction).toBeLessThanOrEqual(1);
    }));
    expect(photoToFace({ x: 0.5, y: 0 }, 'obverse', upright))
      .toEqual({ side: 'obverse', clockHours: 0, radiusFraction: 1 });
  });
});

describe('roundFace', () => {
  it.each([[11.999, 0], [12, 0], [-0.001, 0], [-1, 11], [3.14159, 3.14], [25, 1]])(
    'writes %d hours as %d', (clockHours, rounded) => {
      expect(Object.is(roundFace({ side: 'obverse', clockHours, radiusFraction: 0.5 }).clockHours,
        rounded)).toBe(true);
    });
  it('knows one centre only', () => {
    expect(roundFace({ side: 'reverse', clockHours: 7, radiusFraction: 0.0001 }))
      .toEqual({ side: 'reverse', clockHours: 0, radiusFraction: 0 });
  });
});

describe('the edge', () => {
  const view: EdgeView = { left: 0.1, right: 0.9, top: 0.4, bottom: 0.6, centreDegrees: 350 };
  it('gives back a pin that is in view, across the turn from 359° to 0°', () => {
    fc.assert(fc.property(fraction(-75, 75), fraction(0, 1), (turned, heightFraction) => {
      const angleDegrees = (350 + turned) % 360;
      const point = edgeToPhoto({ angleDegrees, heightFraction }, view);
      expect(point).toBeDefined();
      if (!point) return;
      const back = photoToEdge(point, view);
      const off = Math.abs(back.angleDegrees - angleDegrees);
      expect(Math.min(off, 360 - off)).toBeLessThanOrEqual(0.051);
      expect(Math.abs(back.heightFraction - heightFraction)).toBeLessThanOrEqual(0.00051);
    }));
  });
  it('shows nothing of the far half', () => {
    expect(edgeToPhoto({ angleDegrees: 170, heightFraction: 0.5 }, view)).toBeUndefined();
  });
  it('puts what lies outside on the border', () => {
    expect(photoToEdge({ x: 0, y: 0 }, view))
      .toEqual({ side: 'edge', angleDegrees: 260, heightFraction: 1 });
  });
});
