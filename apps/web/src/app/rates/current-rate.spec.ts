import { findCurrentRate, stateRates } from './current-rate';

const rates = [{ validFrom: '2026-09-01' }, { validFrom: '2026-03-03' }, { validFrom: '2027-01-01' }];

describe('stateRates', () => {
  it('says which holds, which is to come and which is past, latest first', () => {
    expect(stateRates(rates, '2026-12-01').map(({ validFrom, state }) => [validFrom, state])).toEqual([
      ['2027-01-01', 'to come'],
      ['2026-09-01', 'current'],
      ['2026-03-03', 'earlier'],
    ]);
  });

  it('lets a rate hold from its very day on', () => {
    expect(findCurrentRate(rates, '2026-09-01')?.validFrom).toBe('2026-09-01');
    expect(findCurrentRate(rates, '2026-08-31')?.validFrom).toBe('2026-03-03');
    expect(findCurrentRate(rates, '2026-03-02')).toBeUndefined();
  });
});
