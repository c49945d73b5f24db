import { type MachineRateBasis } from '@brakeven/contract';
import { D } from '@brakeven/values';
import { type BasisTexts, computeRate, createBasisForm, readBasis } from './basis-form';

const texts: BasisTexts = {
  price: '$48,000',
  salvage: '6000',
  lifeYears: '10',
  interestPercent: '6 %',
  floorArea: '120',
  spaceCost: '12',
  insurancePerYear: '300',
  upkeepPerYear: '900',
  productiveHoursPerYear: '1,600',
  powerKw: '7.5',
  loadPercent: '60',
  tariffPerKwh: '0.14',
  consumablesPerHour: '1.2',
};

const read = (change: Partial<BasisTexts> = {}, units: 'us' | 'metric' = 'us') =>
  readBasis({ ...texts, ...change }, units);

describe('the basis of a machine-hour rate', () => {
  it('is read from what people write, areas in the unit of the shop', () => {
    expect(read()).toMatchObject({
      price: '48000.00',
      interestPercent: '6',
      // 120 × 0.09290304 m² (1 ft = 0.3048 m, NIST SP 811), five decimals.
      floorAreaM2: '11.14836',
      productiveHoursPerYear: '1600',
      loadPercent: '60',
      consumablesPerHour: '1.20',
    });
    expect(read({ floorArea: '20', spaceCost: '60' }, 'metric')).toMatchObject({
      floorAreaM2: '20',
      spaceCostPerM2Year: '60.00',
    });
  });

  it('keeps the cost of space to the cent, though square feet have no end in square metres', () => {
    for (const [area, cost] of [
      ['120', '12'],
      ['1337', '9.85'],
      ['85.5', '14.4'],
    ] as const) {
      const basis = read({ floorArea: area, spaceCost: cost });
      const yearly = D(basis?.floorAreaM2 ?? 0).times(D(basis?.spaceCostPerM2Year ?? 0));
      expect(yearly.toFixed(2)).toBe(D(area).times(D(cost)).toFixed(2));
    }
  });

  it('is shown again as it was typed', () => {
    const basis = read() as MachineRateBasis;
    expect(createBasisForm(basis, 'us').getRawValue()).toMatchObject({ floorArea: '120', spaceCost: '12' });
    expect(readBasis(createBasisForm(basis, 'us').getRawValue(), 'us')).toEqual(basis);
  });

  it('gives no rate while a field cannot be read or makes no sense, and says which', () => {
    const wrong: [keyof BasisTexts, string][] = [
      ['price', '0'],
      ['price', 'a lot'],
      ['salvage', '-1'],
      ['lifeYears', '0'],
      ['interestPercent', '1001'],
      ['floorArea', '12 acres'],
      ['spaceCost', '-3'],
      ['productiveHoursPerYear', '0'],
      ['productiveHoursPerYear', '8785'],
      ['powerKw', '7.1234'],
      ['loadPercent', '101'],
      ['tariffPerKwh', ''],
      ['consumablesPerHour', '1,2'],
    ];
    for (const [field, text] of wrong) {
      expect(read({ [field]: text })).toBeNull();
      const form = createBasisForm(null, 'us');
      form.setValue({ ...texts, [field]: text });
      expect(form.controls[field].errors).not.toBeNull();
    }
    const form = createBasisForm(null, 'us');
    form.setValue({ ...texts, salvage: '48000.01' });
    expect(form.hasError('salvage')).toBe(true);
    expect(read({ salvage: '48000.01' })).toBeNull();
  });

  it('gives the rate with its parts', () => {
    const basis = read({ floorArea: '20', spaceCost: '60' }, 'metric');
    if (!basis) throw new Error('The basis is good.');
    const { ratePerHour, parts } = computeRate(basis);
    expect(ratePerHour.toFixed(2)).toBe('6.97');
    expect(parts.depreciation.toFixed()).toBe('2.625');
  });
});
