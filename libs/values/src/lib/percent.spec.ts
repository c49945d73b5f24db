import { factorOf, formatPercent, parsePercent, percentText, toPercent } from './percent';

describe('percentages', () => {
  it.each([
    ['28.5', '28.50'],
    ['28.5%', '28.50'],
    ['28.5 %', '28.50'],
    ['0', '0.00'],
    ['0.285', '0.285'],
    ['7.6543', '7.6543'],
  ])('are read from %p as written', (text, expected) => {
    const read = parsePercent(text);
    expect(read.ok && percentText(read.value)).toBe(expected);
  });

  it.each([
    ['', 'not_a_percentage'],
    ['28,5', 'not_a_percentage'],
    ['a lot', 'not_a_percentage'],
    ['1.23456', 'too_many_decimals'],
    ['-1', 'out_of_range'],
    ['1000.5', 'out_of_range'],
  ])('refuse %p as %s and show how to write one', (text, code) => {
    expect(parsePercent(text)).toEqual({ ok: false, code, message: expect.stringContaining('such as 28.5') });
  });

  it('become a factor without rounding', () => {
    expect(factorOf(toPercent('28.5')).toFixed()).toBe('1.285');
    expect(factorOf(toPercent('0')).toFixed()).toBe('1');
    expect(factorOf(toPercent('7.6543')).toFixed()).toBe('1.076543');
  });

  it('are shown with their sign', () => {
    expect(formatPercent('28.50')).toBe('28.5\u00a0%');
    expect(formatPercent(toPercent('0'))).toBe('0\u00a0%');
  });
});
