import { D } from './decimal';
import { densityIn, densityText, findDensityUnit, parseDensity, toDensity } from './density';

describe('densities', () => {
  // Source: NIST SP 811, appendix B.9: 1 lb/in³ = 2.767990 E+04 kg/m³.
  it('are converted as published', () => {
    expect(toDensity(1, 'lb/in³').toFixed(1)).toBe('27679.9');
    expect(densityIn(toDensity('0.2836', 'lb/in³'), 'lb/in³').minus(D('0.2836')).abs().lt('1e-25')).toBe(
      true,
    );
  });

  it.each([
    ['0.2836 lb/in³', '7850.021'],
    ['0.2836', '7850.021'],
    ['7850 kg/m3', '7850.000'],
    ['2.68 g/cm³', '2680.000'],
  ])('are read from %p, bare numbers as lb/in³', (text, expected) => {
    const read = parseDensity(text, 'lb/in³');
    expect(read.ok && densityText(read.value)).toBe(expected);
  });

  it('refuse another unit with an example', () => {
    expect(parseDensity('490 lb/ft', 'lb/in³')).toMatchObject({
      ok: false,
      code: 'unknown_unit',
      message: expect.stringContaining('such as 0.2836 lb/in³'),
    });
    expect(findDensityUnit('LB/IN3')).toBe('lb/in³');
  });
});
