import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { ForcePipe } from './force-pipe';
import { HoursPipe } from './hours-pipe';
import { InstantPipe } from './instant-pipe';
import { LengthPipe } from './length-pipe';
import { LocalDatePipe } from './local-date-pipe';
import { MassPipe } from './mass-pipe';
import { MoneyPipe } from './money-pipe';
import { RatePipe } from './rate-pipe';
import { SHOP_FORMAT, type ShopFormat } from './shop-format';

describe('pipes for figures', () => {
  const format = signal<ShopFormat>({ currency: 'USD', units: 'us', timeZone: 'America/Chicago' });

  beforeEach(() => {
    format.set({ currency: 'USD', units: 'us', timeZone: 'America/Chicago' });
    TestBed.configureTestingModule({ providers: [{ provide: SHOP_FORMAT, useValue: format }] });
  });

  const make = <T>(pipe: new () => T): T => TestBed.runInInjectionContext(() => new pipe());

  it('write money to the cent in the shop’s currency, with a minus that is one', () => {
    expect(make(MoneyPipe).transform('1234.5')).toBe('$1,234.50');
    expect(make(MoneyPipe).transform('-12.00')).toBe('−$12.00');
    format.set({ ...format(), currency: 'CAD' });
    expect(make(MoneyPipe).transform('0.05')).toBe('CA$0.05');
  });

  it('keep all the decimals of a rate, and all those of hours', () => {
    expect(make(RatePipe).transform('0.125')).toBe('$0.125');
    expect(make(HoursPipe).transform('7.3333')).toBe('7.3333');
    expect(make(HoursPipe).transform('1234.0000')).toBe('1,234.00');
  });

  it('show a day as that day, and a moment on the shop’s clock', () => {
    expect(make(LocalDatePipe).transform('2026-03-02')).toBe('Mar 2, 2026');
    expect(make(LocalDatePipe).transform('2026-03-02', 'monthYear')).toBe('March 2026');
    expect(make(InstantPipe).transform('2026-03-02T03:15:00Z')).toMatch(/^Mar 1, 2026, 9:15\sPM$/u);
  });

  it('convert lengths, forces and weights to the shop’s units', () => {
    expect(make(LengthPipe).transform('1828.8')).toBe('72\u00a0in');
    expect(make(ForcePipe).transform('533.786594')).toBe('60\u00a0US tons');
    expect(make(MassPipe).transform('15.966451424')).toBe('35.2\u00a0lb');
    format.set({ ...format(), units: 'metric' });
    expect(make(LengthPipe).transform('1828.8')).toBe('1,828.8\u00a0mm');
    expect(make(ForcePipe).transform('533.786594')).toBe('533.8\u00a0kN');
    expect(make(MassPipe).transform('886.1851530455')).toBe('886.19\u00a0kg');
  });

  it('show a dash for what is absent, never 0', () => {
    for (const pipe of [
      MoneyPipe,
      RatePipe,
      HoursPipe,
      LocalDatePipe,
      InstantPipe,
      LengthPipe,
      ForcePipe,
      MassPipe,
    ]) {
      expect(make<{ transform(value: null): string }>(pipe).transform(null)).toBe('–');
    }
  });
});
