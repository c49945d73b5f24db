import { type DateFormat, formatLocalDate, parseDateText } from './date-text';
import { toLocalDate } from './local-date';

describe('text dates', () => {
  it.each<[string, DateFormat]>([
    ['2026-03-22', 'YYYY-MM-DD'],
    ['2026/3/22', 'YYYY/MM/DD'],
    ['3/22/2026', 'MM/DD/YYYY'],
    ['22/03/2026', 'DD/MM/YYYY'],
    ['22.3.2026', 'DD.MM.YYYY'],
    ['03-22-2026', 'MM-DD-YYYY'],
    ['22-03-2026', 'DD-MM-YYYY'],
    ['22 Mar 2026', 'DD MMM YYYY'],
    ['22 march 2026', 'DD MMM YYYY'],
    ['Mar. 22, 2026', 'MMM DD YYYY'],
    [' MAR 22 2026 ', 'MMM DD YYYY'],
  ])('reads %p declared as %s', (text, format) => {
    expect(parseDateText(text, format)).toEqual({ ok: true, value: '2026-03-22' });
  });

  it('never guesses the order: the same text is two different days', () => {
    expect(parseDateText('01/02/2026', 'MM/DD/YYYY')).toEqual({ ok: true, value: '2026-01-02' });
    expect(parseDateText('01/02/2026', 'DD/MM/YYYY')).toEqual({ ok: true, value: '2026-02-01' });
  });

  it.each<[string, DateFormat, string]>([
    ['22/03/2026', 'MM/DD/YYYY', 'no_such_day'],
    ['02/30/2026', 'MM/DD/YYYY', 'no_such_day'],
    ['30 Foo 2026', 'DD MMM YYYY', 'no_such_day'],
    ['3/22/26', 'MM/DD/YYYY', 'two_digit_year'],
    ['22 Mar 26', 'DD MMM YYYY', 'two_digit_year'],
    ['2026-03-22', 'MM/DD/YYYY', 'not_a_date'],
    ['22x03x2026', 'DD.MM.YYYY', 'not_a_date'],
    ['3/22/026', 'MM/DD/YYYY', 'not_a_date'],
    ['2026-03-22 07:30', 'YYYY-MM-DD', 'not_a_date'],
    ['', 'YYYY-MM-DD', 'not_a_date'],
    ['46103', 'YYYY-MM-DD', 'not_a_date'],
  ])('refuses %p declared as %s: %s, naming the order with an example', (text, format, code) => {
    expect(parseDateText(text, format)).toEqual({
      ok: false,
      code,
      message: expect.stringMatching(
        new RegExp(`declared as ${format.replaceAll('.', '\\.')}, such as .*2026`),
      ),
    });
  });
});

describe('showing a date', () => {
  const date = toLocalDate('2026-03-02');

  it('is the same day in every style', () => {
    expect(formatLocalDate(date)).toBe('Mar 2, 2026');
    expect(formatLocalDate(date, 'numeric')).toBe('03/02/2026');
    expect(formatLocalDate(date, 'long')).toBe('March 2, 2026');
    expect(formatLocalDate(date, 'weekday')).toBe('Mon, Mar 2, 2026');
    expect(formatLocalDate(date, 'dayMonth')).toBe('Mar 2');
    expect(formatLocalDate(date, 'monthYear')).toBe('March 2026');
  });

  it('follows the locale', () => {
    expect(formatLocalDate(date, 'numeric', 'en-GB')).toBe('02/03/2026');
  });
});
