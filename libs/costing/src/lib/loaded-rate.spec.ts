import { rateText, toPercent, toRate } from '@brakeven/values';
import { computeLoadedRate } from './loaded-rate';

describe('computeLoadedRate', () => {
  it('adds the burden to the wage', () => {
    const { factor, loaded } = computeLoadedRate(toRate('28.50'), toPercent('28'));
    expect(factor.toFixed()).toBe('1.28');
    expect(rateText(loaded)).toBe('36.48');
  });

  it('keeps six decimals, half-up, for it is shown and never booked', () => {
    // 19.99 × 1.285555 = 25.69824445
    expect(rateText(computeLoadedRate(toRate('19.99'), toPercent('28.5555')).loaded)).toBe('25.698244');
    expect(rateText(computeLoadedRate(toRate('24'), toPercent('0')).loaded)).toBe('24.00');
  });
});
