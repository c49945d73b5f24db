import { formatHours, hoursFromDays, hoursText, parseHoursText, toHours } from './hours';

describe('hours', () => {
  it.each([
    ['7.5', '7.5000'],
    ['7:30', '7.5000'],
    ['7:30:00', '7.5000'],
    [' 07:20 ', '7.3333'],
    ['0:00:01', '0.0003'],
    ['36:15', '36.2500'],
    ['7.33333333', '7.3333'],
    ['.25', '0.2500'],
    ['0', '0.0000'],
    ['-2', '-2.0000'],
    ['1,234.5', '1234.5000'],
  ])('reads %p as %s', (text, expected) => {
    const read = parseHoursText(text);
    expect(read.ok && hoursText(read.value)).toBe(expected);
  });

  it.each([
    ['', 'not_hours'],
    ['7,5', 'not_hours'],
    ['7h30', 'not_hours'],
    ['7:60', 'not_hours'],
    ['7:3', 'not_hours'],
    ['7:30:60', 'not_hours'],
    ['-7:30', 'not_hours'],
    ['7:30 AM', 'not_hours'],
    ['eight', 'not_hours'],
    ['100000', 'too_large'],
  ])('refuses %p as %s and shows how to write it', (text, code) => {
    expect(parseHoursText(text)).toEqual({
      ok: false,
      code,
      message: expect.stringContaining('such as 7.5 or 7:30'),
    });
  });

  it('rounds a duration to the second before it becomes hours', () => {
    expect(hoursText(hoursFromDays(0.30555555555555558))).toBe('7.3333');
    expect(hoursText(hoursFromDays('0.3124999'))).toBe('7.5000');
    expect(hoursText(hoursFromDays(0))).toBe('0.0000');
    expect(hoursText(hoursFromDays(-0.3125))).toBe('-7.5000');
    expect(() => hoursFromDays(NaN)).toThrow(RangeError);
  });

  it.each([
    ['7.5', '7.50'],
    ['7.3333', '7.3333'],
    ['1234', '1,234.00'],
    ['-0.25', '−0.25'],
  ])('shows %s as %s', (text, expected) => {
    expect(formatHours(text)).toBe(expected);
    expect(formatHours(toHours(text))).toBe(expected);
  });
});
