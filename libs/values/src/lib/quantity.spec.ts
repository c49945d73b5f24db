import { findForceUnit, forceIn, forceText, formatForce, parseForce, toForce } from './force';
import { findLengthUnit, formatLength, lengthIn, lengthText, parseLength, toLength } from './length';
import { findMassUnit, formatMass, massIn, parseMass, toMass } from './mass';

describe('lengths', () => {
  it.each([
    ['72', '1828.80000'],
    ['72 in', '1828.80000'],
    ['6 ft', '1828.80000'],
    ["6'", '1828.80000'],
    ['72"', '1828.80000'],
    ['1,828.8 mm', '1828.80000'],
    ['1828.8MM', '1828.80000'],
    ['1.8288 m', '1828.80000'],
    ['182.88 cm', '1828.80000'],
    ['0.0625 inches', '1.58750'],
  ])('are read from %p, bare numbers as inches', (text, expected) => {
    const read = parseLength(text, 'in');
    expect(read.ok && lengthText(read.value)).toBe(expected);
  });

  it.each([
    ['', 'not_a_quantity'],
    ['six ft', 'not_a_quantity'],
    ['1,5 mm', 'not_a_quantity'],
    ['5 6 ft', 'unknown_unit'],
    ['72 parsecs', 'unknown_unit'],
    ['-1 in', 'negative'],
  ])('refuse %p as %s and show how to write one', (text, code) => {
    expect(parseLength(text, 'in')).toEqual({
      ok: false,
      code,
      message: expect.stringContaining('such as 72 in, 6 ft or 1828.8 mm'),
    });
  });

  it('are shown in the units of the shop', () => {
    expect(formatLength(toLength(72, 'in'), 'us')).toBe('72\u00a0in');
    expect(formatLength(toLength('0.0598', 'in'), 'us')).toBe('0.0598\u00a0in');
    expect(formatLength(toLength(6, 'ft'), 'metric')).toBe('1,828.8\u00a0mm');
    expect(lengthIn(toLength(3, 'ft'), 'in').toFixed()).toBe('36');
  });
});

describe('forces', () => {
  it.each([
    ['60', '533.78659'],
    ['60 tons', '533.78659'],
    ['60 US tons', '533.78659'],
    ['120,000 lbf', '533.78659'],
    ['54.4 tonnes', '533.48176'],
    ['54.4 metric tons', '533.48176'],
    ['534 kN', '534.00000'],
  ])('are read from %p, bare numbers as US tons', (text, expected) => {
    const read = parseForce(text, 'US ton');
    expect(read.ok && forceText(read.value)).toBe(expected);
  });

  it('refuse an unknown unit', () => {
    expect(parseForce('60 stone', 'US ton')).toMatchObject({
      ok: false,
      message: expect.stringContaining('such as 60 US tons'),
    });
  });

  it('always say which ton', () => {
    expect(formatForce(toForce(60, 'US ton'), 'us')).toBe('60\u00a0US tons');
    expect(formatForce(toForce(1, 'US ton'), 'us')).toBe('1\u00a0US ton');
    expect(formatForce(toForce(60, 'US ton'), 'metric')).toBe('533.8\u00a0kN');
  });

  it('come back from the five decimals that are stored', () => {
    const stored = toForce(forceText(toForce(60, 'US ton')), 'kN');
    expect(formatForce(stored, 'us')).toBe('60\u00a0US tons');
    expect(forceIn(stored, 'US ton').toNumber()).toBeCloseTo(60, 5);
  });
});

describe('masses', () => {
  it('are read and shown', () => {
    const read = parseMass('12 lb', 'kg');
    expect(read.ok && massIn(read.value, 'kg').toFixed()).toBe('5.44310844');
    expect(formatMass(toMass(12, 'lb'), 'us')).toBe('12\u00a0lb');
    expect(formatMass(toMass(12, 'lb'), 'metric')).toBe('5.44\u00a0kg');
    expect(massIn(toMass(10, 'kg'), 'kg').toFixed()).toBe('10');
  });

  it('refuse what cannot be read', () => {
    expect(parseMass('heavy', 'lb')).toMatchObject({ ok: false, code: 'not_a_quantity' });
  });
});

describe('units', () => {
  it('are found by their words, whatever the case', () => {
    expect(findLengthUnit('Inches')).toBe('in');
    expect(findLengthUnit('in.')).toBe('in');
    expect(findForceUnit('TONS')).toBe('US ton');
    expect(findForceUnit('kN')).toBe('kN');
    expect(findMassUnit('pounds')).toBe('lb');
    expect(findMassUnit('stone')).toBeUndefined();
  });
});
