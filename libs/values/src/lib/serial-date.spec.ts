import { dateFromSerial } from './serial-date';

describe('serial dates', () => {
  it('drop the time of day', () => {
    expect(dateFromSerial(46_083.999, '1900')).toEqual({ ok: true, value: '2026-03-02' });
    expect(dateFromSerial('44621.5', '1904')).toEqual({ ok: true, value: '2026-03-02' });
    expect(dateFromSerial(2_958_465.99, '1900')).toEqual({ ok: true, value: '9999-12-31' });
  });

  it.each([
    [0.3125, '1900', 'time_without_date'],
    [0.3125, '1904', 'time_without_date'],
    [0, '1900', 'not_a_date'],
    [-0.5, '1904', 'not_a_date'],
    [60, '1900', 'no_such_day'],
    [60.75, '1900', 'no_such_day'],
    [2_958_466, '1900', 'not_a_date'],
    [1e300, '1900', 'not_a_date'],
  ] as const)('refuse %d in the %s system: %s', (serial, system, code) => {
    expect(dateFromSerial(serial, system)).toEqual({
      ok: false,
      code,
      message: expect.stringContaining('such as 2026-03-02'),
    });
  });

  it('throw on what is no number at all', () => {
    expect(() => dateFromSerial(NaN, '1900')).toThrow(RangeError);
    expect(() => dateFromSerial('soon', '1900')).toThrow(RangeError);
  });
});
