import { D, forceIn, lengthIn, massIn, roundHalfUp, toForce, toLength, toMass } from '@brakeven/values';

// Definitions, all exact: international yard and pound agreement of 1959 (1 in = 25.4 mm, 1 lb = 0.45359237 kg) and
// 3rd CGPM, 1901 (standard gravity 9.80665 m/s²), as NIST SP 811, appendix B, gives them.
describe('exact conversions, from their definitions', () => {
  it('makes an inch 25.4 mm and a foot 304.8 mm', () => {
    expect(toLength(1, 'in').toFixed()).toBe('25.4');
    expect(toLength(1, 'ft').toFixed()).toBe('304.8');
  });

  it('makes a pound 0.45359237 kg', () => {
    expect(toMass(1, 'lb').toFixed()).toBe('0.45359237');
  });

  it('makes a pound-force the weight of a pound under standard gravity: 4.4482216152605 N', () => {
    expect(toForce(1, 'lbf').times(1000).toFixed()).toBe(D('0.45359237').times('9.80665').toFixed());
    expect(toForce(1, 'lbf').times(1000).toFixed()).toBe('4.4482216152605');
  });

  it('makes a US ton-force 2000 lbf and a tonne-force 1000 kg under standard gravity', () => {
    expect(toForce(1, 'US ton').toFixed()).toBe('8.896443230521');
    expect(toForce(1, 'US ton').eq(toForce(2000, 'lbf'))).toBe(true);
    expect(toForce(1, 'tonne').toFixed()).toBe('9.80665');
  });
});

// Rounded factors as printed in tables that others made.
describe('conversions, against printed tables', () => {
  it.each([
    [
      toForce(1, 'US ton'),
      5,
      '8.89644',
      'US Navy facilities handbook 1004/6, appendix B: 1 tonf = 8.896 44 kN',
    ],
    [
      toForce(1000, 'lbf'),
      5,
      '4.44822',
      'US Navy facilities handbook 1004/6, appendix B: 1 kip = 4.448 22 kN',
    ],
    [
      toMass(2000, 'lb'),
      3,
      '907.185',
      'US Navy facilities handbook 1004/6, appendix B: 2000 lb = 0.907 185 t',
    ],
    [toMass(1, 'lb'), 6, '0.453592', 'US Navy facilities handbook 1004/6, appendix B: 1 lb = 0.453 592 kg'],
    [
      toMass(2000, 'lb'),
      4,
      '907.1847',
      'US Army Engineers hydraulics report: tons (2,000 pounds, mass) = 907.1847 kg',
    ],
    [
      forceIn(toForce(1, 'tonne'), 'US ton'),
      7,
      '1.1023113',
      'encyclopaedia article on the ton-force: 1 tf = 1.1023113 short tons-force',
    ],
    [lengthIn(toLength(1000, 'mm'), 'ft'), 4, '3.2808', 'engineering tables: 1 m = 3.2808 ft'],
    [
      massIn(toMass(1000, 'kg'), 'lb'),
      3,
      '2204.623',
      'encyclopaedia article on the ton-force: 1 tf = 2204.623 lbf',
    ],
  ])('gives %s to %d decimals as %s (%s)', (quantity, places, printed) => {
    expect(roundHalfUp(quantity, places).toFixed(places)).toBe(printed);
  });
});
