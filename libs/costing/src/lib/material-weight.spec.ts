import { D, massIn, toLength, toMass } from '@brakeven/values';
import { computeFlatWeight, toStockWeight } from './material-weight';

describe('the weight of flat metal', () => {
  it('is pieces × length × width × thickness × density', () => {
    // 2 × 2 m × 1 m × 3 mm = 0.012 m³ × 7850 kg/m³
    const sheets = {
      pieces: 2,
      length: toLength(2000, 'mm'),
      width: toLength(1000, 'mm'),
      thickness: toLength(3, 'mm'),
      densityKgPerM3: D(7850),
    };
    expect(computeFlatWeight(sheets).toFixed()).toBe('94.2');
    expect(computeFlatWeight({ ...sheets, pieces: '0.5' }).toFixed()).toBe('23.55');
  });

  it('is kept to ten decimals of a kilogram', () => {
    // 1 × 1 × 0.0598 in at 7850 kg/m³: 16.387064 mm³ × 59.8 × 7.85e-6 kg = 0.00769258 …
    const blank = {
      pieces: 1,
      length: toLength(1, 'in'),
      width: toLength(1, 'in'),
      thickness: toLength('0.0598', 'in'),
      densityKgPerM3: D(7850),
    };
    expect(computeFlatWeight(blank).toFixed()).toBe('0.0076925795');
  });
});

it('keeps hundredths of a pound exact', () => {
  expect(massIn(toStockWeight(toMass('123.45', 'lb')), 'lb').toFixed()).toBe('123.45');
});
