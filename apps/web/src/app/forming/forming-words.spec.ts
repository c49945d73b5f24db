import { toNumberWords, toSizeText } from './forming-words';

describe('toNumberWords', () => {
  it('has a typographic minus, and none before what rounds to nought', () => {
    expect(toNumberWords(-1.25, 1)).toBe('−1.3');
    expect(toNumberWords(-0.004, 2)).toBe('0.00');
    expect(toNumberWords(0.004, 2)).toBe('0.00');
  });
});

describe('toSizeText', () => {
  it.each([
    ['us', '3.4163', '0.1345 in'],
    ['us', '1219.2', '48 in'],
    ['us', '4', '4 mm'],
    ['metric', '4', '4 mm'],
    ['metric', '3.4163', '3.4163 mm'],
  ] as const)('shows in a %s shop %s mm as %s', (units, millimetres, words) => {
    expect(toSizeText(millimetres, units)).toBe(words);
  });
});
