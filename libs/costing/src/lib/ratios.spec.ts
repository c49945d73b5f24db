import { computeIndicator } from './ratios';

describe('an indicator', () => {
  it('is part ÷ whole to six decimals', () => {
    expect(computeIndicator('scrapRatio', 1, 3)?.toFixed()).toBe('0.333333');
    expect(computeIndicator('plannedScrapRatio', 8, 5)?.toFixed()).toBe('1.6');
    expect(computeIndicator('allocationEfficiency', '0', '7.5')?.toFixed()).toBe('0');
  });

  it('of nothing is no figure, rather than 0', () => {
    expect(computeIndicator('qualityRatio', 0, 0)).toBeNull();
  });

  it('refuses what is below 0, and says which', () => {
    expect(() => computeIndicator('workerEfficiency', -1, 8)).toThrow(
      'hours worked on jobs (APWT) of 0 or more',
    );
    expect(() => computeIndicator('workerEfficiency', 1, -8)).toThrow(
      'hours present without breaks (APAT) of 0 or more',
    );
  });
});
