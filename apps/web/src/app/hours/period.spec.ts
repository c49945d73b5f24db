import { toLocalDate } from '@brakeven/values';
import { toDayRange, toPeriod } from './period';

const tuesday = toLocalDate('2026-12-01');

describe('toDayRange', () => {
  it('begins weeks on the shop’s day', () => {
    expect(toDayRange('this-week', tuesday, 1)).toEqual({ from: '2026-11-30', to: '2026-12-06' });
    expect(toDayRange('this-week', tuesday, 0)).toEqual({ from: '2026-11-29', to: '2026-12-05' });
    expect(toDayRange('last-week', tuesday, 1)).toEqual({ from: '2026-11-23', to: '2026-11-29' });
  });

  it('counts thirteen weeks with this one', () => {
    expect(toDayRange('13-weeks', tuesday, 1)).toEqual({ from: '2026-09-07', to: '2026-12-06' });
  });

  it('takes whole months, and no bounds for all', () => {
    expect(toDayRange('this-month', tuesday, 1)).toEqual({ from: '2026-12-01', to: '2026-12-31' });
    expect(toDayRange('all', tuesday, 1)).toEqual({});
  });

  it('takes the days as given, and leaves out what is no day', () => {
    expect(toDayRange('custom', tuesday, 1, { from: '2026-02-28', to: '2026-02-30' })).toEqual({
      from: '2026-02-28',
    });
  });
});

describe('toPeriod', () => {
  it('falls back to the quarter when the address says nothing or nonsense', () => {
    expect([toPeriod('all'), toPeriod(undefined), toPeriod('decade')]).toEqual([
      'all',
      '13-weeks',
      '13-weeks',
    ]);
  });
});
