/**
 * Council Regulation (EC) 975/98 as amended, recast as (EU) 729/2014, annex I: values read in a
 * summary of the law; thickness is the indicative one after Regulation (EU) 566/2012 (memory).
 */
import { describe, expect, it } from 'vitest';
import { standardOf } from './catalogue-type';

describe('Regulation (EU) 729/2014, annex I', () => {
  it.each([
    ['eu-2-euro', 25.75, 2.2, 8.5], ['eu-1-euro', 23.25, 2.33, 7.5],
    ['eu-50-cent', 24.25, 2.38, 7.8], ['eu-20-cent', 22.25, 2.14, 5.74],
    ['eu-10-cent', 19.75, 1.93, 4.1], ['eu-5-cent', 21.25, 1.67, 3.92],
    ['eu-2-cent', 18.75, 1.67, 3.06], ['eu-1-cent', 16.25, 1.67, 2.3],
  ])('%s: %d mm, %d mm thick, %d g', (slug, diameter, thickness, weight) => {
    const standard = standardOf(slug);
    expect(standard.diameter?.nominal?.value).toBe(diameter);
    expect(standard.thickness?.nominal?.value).toBe(thickness);
    expect(standard.weight?.nominal?.value).toBe(weight);
    expect(standard.weight?.nominal?.sourceKind).toBe('secondary');
  });
});
