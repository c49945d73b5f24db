import { formatRate, parseRate, rateText, toRate } from './rate';

describe('rates', () => {
  it.each([
    ['85', '85.00'],
    ['28.5', '28.50'],
    ['0.125', '0.125'],
    ['0.1234565', '0.123457'],
    ['33.120894', '33.120894'],
    ['0', '0.00'],
  ])('travel with two to six decimals: %s as %s', (input, expected) => {
    expect(rateText(toRate(input))).toBe(expected);
  });

  it.each([
    ['28.50', '28.50'],
    ['$1,028.5', '1028.50'],
    ['0', '0.00'],
    ['0.123456', '0.123456'],
  ])('are read from %p', (text, expected) => {
    const read = parseRate(text);
    expect(read.ok && rateText(read.value)).toBe(expected);
  });

  it.each([
    ['', 'not_a_rate'],
    ['28,5', 'not_a_rate'],
    ['twenty', 'not_a_rate'],
    ['-1', 'negative'],
    ['0.1234567', 'too_many_decimals'],
    ['100000000', 'too_large'],
  ])('refuse %p as %s and show how to write one', (text, code) => {
    expect(parseRate(text)).toEqual({ ok: false, code, message: expect.stringContaining('such as 28.50') });
  });

  it('are shown as money, with all their decimals', () => {
    expect(formatRate('28.5', 'USD')).toBe('$28.50');
    expect(formatRate(toRate('0.125'), 'USD')).toBe('$0.125');
  });
});
