import {
  toDensityText,
  toKilograms,
  toKilogramsPerM3,
  toMassFieldText,
  toMegapascals,
  toRatePerKg,
  toPriceWords,
  toRatePerUnit,
  toStressText,
} from './stock-text';

describe('weights in a field', () => {
  it('go from pounds to kilograms exactly, and back', () => {
    expect(toKilograms('35.2', 'us', null)).toBe('15.966451424');
    expect(toMassFieldText('15.966451424', 'us')).toBe('35.2');
    expect(toKilograms('5 kg', 'us', null)).toBe('5');
    expect(toKilograms('', 'us', '5')).toBeNull();
  });

  it('stay to the last digit when nobody has typed', () => {
    const kept = '886.1851530455';
    expect(toKilograms(toMassFieldText(kept, 'us'), 'us', kept)).toBe(kept);
  });
});

describe('prices by weight', () => {
  it('are kept per kilogram and shown per pound', () => {
    // 0.10 a pound ÷ 0.45359237 = 0.220462 a kilogram.
    expect(toRatePerKg('$0.10', 'us', null)).toBe('0.220462');
    expect(toRatePerUnit('0.220462', 'us')).toBe('0.10');
    expect(toRatePerKg('0.10', 'us', '0.2204623')).toBe('0.2204623');
    expect(toRatePerUnit('2.50', 'metric')).toBe('2.50');
    expect(toPriceWords('0.220462', { units: 'us', currency: 'USD' })).toBe('$0.1000');
    expect(toPriceWords(null, { units: 'us', currency: 'USD' })).toBe('–');
    expect(toRatePerKg('', 'us', null)).toBe('0');
    expect(toRatePerKg('cheap', 'us', null)).toBe('cheap');
  });
});

describe('densities and strengths', () => {
  it('keep a known value behind the rounded text', () => {
    expect(toDensityText('7850', 'us')).toBe('0.2836');
    expect(toKilogramsPerM3('0.2836', 'us', [null, '7850'])).toBe('7850');
    expect(toKilogramsPerM3('7.85 g/cm³', 'us', [])).toBe('7850');
    expect(toStressText('413.685', 'us')).toBe('60');
    expect(toMegapascals('60', 'us', ['413.685438'])).toBe('413.685438');
    expect(toMegapascals('414 MPa', 'us', [])).toBe('414');
    expect(toMegapascals('', 'us', ['1'])).toBeNull();
  });
});
