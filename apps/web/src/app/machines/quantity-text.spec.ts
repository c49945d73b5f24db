import { toForceText, toKilonewtons, toLengthText, toMillimetres } from './quantity-text';

describe('forces', () => {
  it('are shown in US tons or kilonewtons, as the shop does', () => {
    expect(toForceText('533.78659', 'us')).toBe('60');
    expect(toForceText('533.78659', 'metric')).toBe('533.7866');
    expect(toForceText(null, 'us')).toBe('');
  });

  it('are kept in kilonewtons with five decimals', () => {
    // 60 × 8.896443230521 kN (2000 lbf of 4.4482216152605 N, NIST SP 811 appendix B) = 533.78659383
    expect(toKilonewtons('60', 'us', null)).toBe('533.78659');
    expect(toKilonewtons('534 kN', 'us', null)).toBe('534');
    expect(toKilonewtons(' ', 'us', '533.78659')).toBeNull();
  });

  it('stay to the last digit when nothing was changed', () => {
    expect(toKilonewtons('60', 'us', '533.78661')).toBe('533.78661');
  });
});

describe('lengths', () => {
  it('are shown in inches or millimetres and kept in millimetres', () => {
    expect(toLengthText('1828.8', 'us')).toBe('72');
    expect(toLengthText('1828.8', 'metric')).toBe('1828.8');
    expect(toMillimetres('6 ft', 'us', null)).toBe('1828.8');
    expect(toMillimetres('72', 'us', '1828.80000')).toBe('1828.80000');
    expect(toMillimetres('', 'metric', '1828.8')).toBeNull();
  });
});
