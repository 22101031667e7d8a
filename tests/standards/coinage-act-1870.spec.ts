/**
 * Coinage Act 1870 (33 & 34 Vict. c. 10), First Schedule, as reproduced in an encyclopaedia of the
 * time: weight, least current weight, remedy allowance, fineness.
 */
import { expect, it } from 'vitest';
import { standardOf } from './catalogue-type';

it('sovereign: 7.98805 g, remedy 0.01296 g, least current 7.93787 g, fineness 916.66 ± 2', () => {
  const { weight, fineness } = standardOf('gb-sovereign');
  expect(weight?.nominal?.value).toBe(7.98805);
  expect(weight?.tolerance?.value).toBe(0.01296);
  expect(weight?.leastCurrent?.value).toBe(7.93787);
  expect(fineness?.nominal?.value).toBe(0.91666);
  expect(fineness?.tolerance?.value).toBe(0.002);
});

it('sovereign: 20 troy pounds of standard gold make 934.5 pieces', () => {
  // 20 lb × 373.2417216 g / 934.5
  expect(standardOf('gb-sovereign').weight?.nominal?.value).toBeCloseTo(7.98805, 4);
  expect((20 * 373.2417216) / 934.5)
    .toBeCloseTo(standardOf('gb-sovereign').weight?.nominal?.value ?? 0, 4);
});

it('crown: 28.2759 g, remedy 0.11781 g, fineness 925 ± 4; 13.2 to the troy pound', () => {
  const { weight, fineness } = standardOf('gb-crown-925');
  expect(weight?.nominal?.value).toBe(28.2759);
  expect(weight?.tolerance?.value).toBe(0.11781);
  expect(fineness?.nominal?.value).toBe(0.925);
  expect(fineness?.tolerance?.value).toBe(0.004);
  expect(373.2417216 / 13.2).toBeCloseTo(weight?.nominal?.value ?? 0, 3);
});
