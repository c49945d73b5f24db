import { Decimal as PlainDecimal } from 'decimal.js';
import { D, type Decimal, roundHalfUp, sum } from './decimal';
import { toMoney } from './money';

describe('D', () => {
  it.each([
    ['12.5', '12.5'],
    ['-0.05', '-0.05'],
    ['+3', '3'],
    ['.5', '0.5'],
    ['5.', '5'],
    ['1e-3', '0.001'],
    [0.1, '0.1'],
    [1e21, '1000000000000000000000'],
  ])('reads %p exactly', (input, expected) => {
    expect(D(input).toFixed()).toBe(expected);
  });

  it.each([
    '',
    ' ',
    '1,5',
    '12 ',
    '0x1f',
    'NaN',
    'Infinity',
    '1_000',
    'abc',
    '1e9999',
    NaN,
    Infinity,
    -Infinity,
  ])('throws on %p rather than guessing', (input) => {
    expect(() => D(input)).toThrow(RangeError);
  });

  it('says what it could not read', () => {
    expect(() => D('7,5')).toThrow("'7,5' is not a decimal number such as 12.5.");
  });

  it('refuses a decimal that is not a number', () => {
    expect(() => D(D(1).div(0))).toThrow(RangeError);
  });

  it('takes over decimals of other clones with its own precision', () => {
    const third = D(new PlainDecimal(1)).div(3);
    expect(third.precision()).toBe(40);
  });

  it('never writes an exponent', () => {
    expect(D('1e-30').toString()).toBe(`0.${'0'.repeat(29)}1`);
    expect(JSON.stringify(D('1e30'))).toBe(`"1${'0'.repeat(30)}"`);
  });

  it('multiplies hours, rate and burden of full width without losing a digit', () => {
    const exact = (999_999_999n * 99_999_999_999_999n * 10_999_999n).toString();
    const product = D('99999.9999').times('99999999.999999').times('10.999999');
    expect(product.toFixed(16)).toBe(`${exact.slice(0, -16)}.${exact.slice(-16)}`);
  });
});

describe('roundHalfUp', () => {
  it.each([
    ['0.005', 2, '0.01'],
    ['-0.005', 2, '-0.01'],
    ['0.00499999999999999999999', 2, '0'],
    ['1.005', 2, '1.01'],
  ])('rounds %s to %d places', (input, places, expected) => {
    expect(roundHalfUp(D(input), places).toFixed()).toBe(expected);
  });

  it('never gives minus nought', () => {
    expect(Object.is(roundHalfUp(D('-0.001'), 2).toNumber(), 0)).toBe(true);
  });
});

describe('sum', () => {
  it('adds exactly', () => {
    expect(sum(['0.1', '0.2', '0.3'].map(D)).toFixed()).toBe('0.6');
  });

  it('of nothing is nought', () => {
    expect(sum<Decimal>([]).toFixed()).toBe('0');
  });

  it('keeps the kind of what it adds', () => {
    const total = sum([toMoney('1.10'), toMoney('2.20')]);
    expect(total satisfies ReturnType<typeof toMoney>).toEqual(toMoney('3.30'));
  });
});
