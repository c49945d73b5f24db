import {
  findForcePerLengthUnit,
  forcePerLengthIn,
  forcePerLengthText,
  parseForcePerLength,
  toForcePerLength,
} from './force-per-length';
import { forceIn, toForce } from './force';
import { lengthIn, toLength } from './length';

describe('a force per length', () => {
  it('is the force of a foot over the length of a foot', () => {
    const metres = lengthIn(toLength(1, 'ft'), 'mm').div(1000);
    expect(toForcePerLength(20, 'US ton/ft').toFixed(12)).toBe(
      forceIn(toForce(20, 'US ton'), 'kN').div(metres).toFixed(12),
    );
    expect(forcePerLengthText(toForcePerLength(20, 'US ton/ft'))).toBe('583.75612');
    expect(forcePerLengthIn(toForcePerLength(98.0665, 'kN/m'), 'tonne/m').toFixed()).toBe('10');
  });

  it('is read with its unit or without', () => {
    const read = (text: string) => {
      const parsed = parseForcePerLength(text, 'US ton/ft');
      return parsed.ok ? forcePerLengthText(parsed.value) : parsed.code;
    };
    expect(read('20')).toBe('583.75612');
    expect(read('20 tons/ft')).toBe('583.75612');
    expect(read('600 kN/m')).toBe('600.00000');
    expect(read('-1')).toBe('negative');
    expect(read('20 tons')).toBe('unknown_unit');
    expect(read('strong')).toBe('not_a_quantity');
    expect(findForcePerLengthUnit('KN/m')).toBe('kN/m');
  });
});
