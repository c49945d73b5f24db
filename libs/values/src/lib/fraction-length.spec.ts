import { findFractionInches } from './fraction-length';
import { findWrittenLengthUnit, lengthIn, parseLength } from './length';

describe('inches with a fraction', () => {
  it.each([
    ['3/16', '0.1875'],
    ['3/16 in', '0.1875'],
    ['1 1/2 in', '1.5'],
    ['1-1/2"', '1.5'],
    ['5\' 6 1/2"', '66.5'],
    ["5'-6 1/2”", '66.5'],
    ['5 ft 6 in', '66'],
    ['5’ 3/8”', '60.375'],
    ['5\'6.25"', '66.25'],
    ['5/4', '1.25'],
  ])('are read from %p', (text, inches) => {
    const read = parseLength(text, 'mm');
    expect(read.ok && lengthIn(read.value, 'in').toFixed()).toBe(inches);
  });

  it.each(['1/0', '1 3/2', '0.5 1/2', '5\' 12"', '1/2 mm', '/2', '3/', '1//2', '5" 6\''])(
    'are not read from %p, and nothing becomes 0',
    (text) => {
      expect(findFractionInches(text)).toBeUndefined();
      expect(parseLength(text, 'in')).toMatchObject({
        ok: false,
        message: expect.stringContaining('such as 72 in'),
      });
    },
  );

  it('below nought are refused as negative', () => {
    expect(parseLength('-3/16', 'in')).toMatchObject({ ok: false });
  });
});

it.each([
  ['4.5mm', 'mm'],
  ['3/16', 'in'],
  ["5'", 'ft'],
  ["5' 6", 'in'],
  ['0.1345"', 'in'],
  ['12', undefined],
  ['twelve', undefined],
])('the unit that %p is written in is %p', (text, unit) => {
  expect(findWrittenLengthUnit(text)).toBe(unit);
});
