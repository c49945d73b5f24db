import { formatMoney, moneyText, parseMoney, toMoney } from './money';

describe('money', () => {
  it.each([
    ['123.4', '123.40'],
    ['0.005', '0.01'],
    ['-0.005', '-0.01'],
    ['-0.004', '0.00'],
    ['1.004999', '1.00'],
  ])('keeps %s as %s', (input, expected) => {
    expect(moneyText(toMoney(input))).toBe(expected);
  });

  it.each([
    ['1234.5', '1234.50'],
    ['$1,234.50', '1234.50'],
    ['  $ 12 ', '12.00'],
    ['-$12.34', '-12.34'],
    ['−$1,000.00', '-1000.00'],
    ['€5', '5.00'],
    ['0', '0.00'],
    ['999,999,999,999.99', '999999999999.99'],
  ])('reads %p', (text, expected) => {
    const read = parseMoney(text);
    expect(read.ok && moneyText(read.value)).toBe(expected);
  });

  it.each([
    ['', 'not_money'],
    ['abc', 'not_money'],
    ['1.234,50', 'not_money'],
    ['1,23', 'not_money'],
    ['12,34,567.00', 'not_money'],
    ['(12.50)', 'not_money'],
    ['1e5', 'not_money'],
    ['$', 'not_money'],
    ['12.345', 'too_many_decimals'],
    ['1000000000000', 'too_large'],
  ])('refuses %p as %s and shows how to write it', (text, code) => {
    expect(parseMoney(text)).toEqual({
      ok: false,
      code,
      message: expect.stringContaining('such as 1234.50'),
    });
  });

  it('quotes a long cell only in part', () => {
    const read = parseMoney('x'.repeat(30_000));
    expect(!read.ok && read.message.length).toBeLessThan(150);
  });

  it.each([
    ['1234.5', '$1,234.50'],
    ['-12', '−$12.00'],
    ['0', '$0.00'],
    ['999999999999.99', '$999,999,999,999.99'],
  ])('shows %s as %s', (text, expected) => {
    expect(formatMoney(text, 'USD')).toBe(expected);
    expect(formatMoney(toMoney(text), 'USD')).toBe(expected);
  });

  it('shows cents of every currency, in the way of the locale', () => {
    expect(formatMoney('1234.5', 'EUR', 'de-DE')).toBe('1.234,50\u00a0€');
    expect(formatMoney('1234.5', 'JPY')).toBe('¥1,234.50');
  });

  it('does not show what is no amount', () => {
    expect(() => formatMoney('n/a', 'USD')).toThrow(RangeError);
  });
});
