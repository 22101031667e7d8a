import { basisProblem } from './decision-rules';

describe('the basis of a confidence', () => {
  it('is needed where something is published, and nowhere else', () => {
    expect(basisProblem('publish', 'suspected', [])).toBe('required');
    expect(basisProblem('agree_public', 'probable', [])).toBe('required');
    expect(basisProblem('return', null, [])).toBeNull();
    expect(basisProblem(null, null, [])).toBeNull();
  });

  it('reaches "probable" with photographs alone, but not "confirmed"', () => {
    expect(basisProblem('publish', 'probable', ['photographs'])).toBeNull();
    expect(basisProblem('publish', 'confirmed', ['photographs'])).toBe('confirmed_needs_piece');
  });

  it('needs the piece in hand and one objective test outside for "confirmed"', () => {
    expect(basisProblem('publish', 'confirmed', ['piece_in_hand', 'tells_named']))
      .toBe('confirmed_needs_test');
    expect(basisProblem('publish', 'confirmed', ['weight_outside'])).toBe('confirmed_needs_piece');
    expect(basisProblem('publish', 'confirmed', ['piece_in_hand', 'weight_outside'])).toBeNull();
  });
});
