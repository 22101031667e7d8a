import { describe, expect, it } from 'vitest';

import { boundedCircle, draggedTo, handlePoints, movedByKey,
  wrappedDegrees } from './circle-handles';

const view = { width: 1000, height: 500, uprightDegrees: 30,
  circle: { x: 0.5, y: 0.5, radius: 0.2 } };

describe('the handles of the circle', () => {
  it('lie where dragging them there changes nothing', () => {
    const points = handlePoints(view);
    expect(draggedTo('upright', points.upright, view)).toEqual({ uprightDegrees: 30 });
    expect(draggedTo('radius', points.radius, view).circle?.radius).toBeCloseTo(0.2, 4);
    expect(draggedTo('centre', points.centre, view)).toEqual({ circle: view.circle });
  });
  it('move by arrow keys: the rim outwards, the top clockwise, the centre along', () => {
    expect(movedByKey('radius', [1, 0], 1, view).circle?.radius).toBeCloseTo(0.204, 6);
    expect(movedByKey('upright', [-1, 0], 5, view)).toEqual({ uprightDegrees: 25 });
    expect(movedByKey('centre', [0, 1], 1, view).circle?.y).toBeCloseTo(0.504, 6);
  });
});

it.each([[-0.04, 0], [360, 0], [-90, 270], [719.96, 0], [12.34, 12.3]])(
  'turns %d degrees into %d', (degrees, wrapped) =>
    expect(Object.is(wrappedDegrees(degrees), wrapped)).toBe(true));

it('keeps the circle on the photo', () => {
  expect(boundedCircle({ x: -1, y: 2, radius: 0 })).toEqual({ x: 0, y: 1, radius: 0.02 });
});
