import { convertToParamMap } from '@angular/router';

import {
  addressOfSearch, isUnfiltered, searchOfAddress, withFacet, without,
} from './search-address';

describe('the address of a search', () => {
  it('holds words, facets and years, and comes back the same', () => {
    const filter = { text: 'crown', metal: ['silver', 'gold'], yearFrom: 1880, yearTo: 1900 };
    const read = searchOfAddress(convertToParamMap(addressOfSearch(filter, true)));
    expect(read).toEqual({ filter, exact: true, after: null });
  });

  it('leaves out what is no year and counts a value once', () => {
    const read = searchOfAddress(
      convertToParamMap({ yearFrom: 'soon', yearTo: '99999', metal: ['gold', 'gold', ''] }),
    );
    expect(read.filter).toEqual({ metal: ['gold'] });
  });

  it('adds and takes away single values', () => {
    const one = withFacet({ metal: ['gold'] }, 'metal', 'silver', true);
    expect(one.metal).toEqual(['gold', 'silver']);
    expect(withFacet(one, 'metal', 'gold', false).metal).toEqual(['silver']);
    expect(isUnfiltered(without({ text: 'crown' }, 'text'))).toBe(true);
  });
});
