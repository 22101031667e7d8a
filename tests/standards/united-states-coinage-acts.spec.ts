/**
 * United States Statutes at Large: the coinage acts of 2 April 1792 (1 Stat. 246), 18 January 1837
 * (5 Stat. 136), 3 March 1849 (9 Stat. 397) and 12 February 1873 (17 Stat. 424). Weights in
 * grains as the acts give them, turned into grams by 64.79891 mg.
 */
import { describe, expect, it } from 'vitest';
import { specificationOf, standardOf } from './catalogue-type';

const gramsOf = (slug: string) => standardOf(slug).weight?.nominal;
const toleranceOf = (slug: string) => standardOf(slug).weight?.tolerance;

describe('standard weights', () => {
  it.each([
    ['us-dollar-draped-bust', 26.95635, 'Act of 1792, s. 9: 416 grains'],
    ['us-dollar-morgan', 26.72955, 'Act of 1837, s. 9: 412.5 grains'],
    ['us-dollar-peace', 26.72955, 'Act of 1837, s. 9: 412.5 grains'],
    ['us-dollar-trade', 27.21554, 'Act of 1873, s. 15: 420 grains'],
    ['us-half-walking', 12.5, 'Act of 1873, s. 15: twelve and one-half grams'],
    ['us-half-franklin', 12.5, 'Act of 1873, s. 15: twelve and one-half grams'],
    ['us-quarter-standing', 6.25, 'Act of 1873, s. 15: half of the half dollar'],
    ['us-dime-mercury', 2.5, 'Act of 1873, s. 15: a fifth of the half dollar'],
    ['us-cent-lincoln-wheat', 3.11035, 'Act of 1873, s. 16: 48 grains'],
    ['us-20-liberty', 33.43624, 'Act of 1837, s. 10, by the Act of 1849: 516 grains'],
    ['us-20-saint', 33.43624, 'Act of 1873, s. 14: 516 grains'],
  ])('%s: %d g (%s)', (slug, grams) => {
    expect(gramsOf(slug)?.value).toBeCloseTo(grams, 5);
    expect(gramsOf(slug)?.sourceKind).toBe('statute');
  });

  it('bronze cent of 1873, s. 16: 48 grains', () => {
    expect(specificationOf('us-cent-indian', 1880).weight?.nominal?.value).toBeCloseTo(3.11035, 5);
  });
});

describe('fineness', () => {
  it('silver of 1792, s. 13: 1485 parts of 1664', () => {
    expect(standardOf('us-dollar-draped-bust').fineness?.nominal?.value).toBeCloseTo(0.892428, 6);
  });
  it.each(['us-dollar-morgan', 'us-dollar-peace', 'us-dollar-trade', 'us-half-walking',
    'us-quarter-standing', 'us-dime-mercury', 'us-20-liberty', 'us-20-saint'])(
    '%s: 900 of 1000 (Act of 1837, s. 8; Act of 1873, s. 13)', (slug) => {
      expect(standardOf(slug).fineness?.nominal?.value).toBe(0.9);
    });
});

describe('deviation allowed in a single piece', () => {
  it.each([
    ['us-dollar-morgan', 0.0971984, 'Act of 1837, s. 25: 1.5 grains'],
    ['us-dollar-peace', 0.0971984, 'Act of 1837, s. 25: 1.5 grains'],
    ['us-dollar-trade', 0.0971984, 'Act of 1873, s. 37: 1.5 grains'],
    ['us-half-walking', 0.0971984, 'Act of 1873, s. 37: 1.5 grains'],
    ['us-quarter-standing', 0.0971984, 'Act of 1873, s. 37: 1.5 grains'],
    ['us-dime-mercury', 0.0971984, 'Act of 1873, s. 37: 1.5 grains'],
    ['us-cent-lincoln-wheat', 0.1295978, 'Act of 1873, s. 38: 2 grains'],
    ['us-20-liberty', 0.0323995, 'Act of 1849, s. 4: 0.5 grain'],
    ['us-20-saint', 0.0323995, 'Act of 1873, s. 36: 0.5 grain'],
  ])('%s: %d g (%s)', (slug, grams) => {
    expect(toleranceOf(slug)?.value).toBeCloseTo(grams, 6);
  });
});
