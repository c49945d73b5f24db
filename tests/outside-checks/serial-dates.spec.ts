import { dateFromSerial, type SerialSystem } from '@brakeven/values';

/** [serial, date, source] */
type Published = [serial: number, date: string, source: string];

const PUBLISHED: Record<SerialSystem, Published[]> = {
  '1900': [
    [1, '1900-01-01', 'ECMA-376 1st ed. part 4, 3.17.4 Date Representation: the lower limit'],
    [59, '1900-02-28', 'ECMA-376 1st ed. part 4, 3.17.4: serial 59 is 28 February'],
    [61, '1900-03-01', 'ECMA-376 1st ed. part 4, 3.17.4: serial 61 is 1 March'],
    [3687, '1910-02-03', 'ECMA-376 1st ed. part 4, 3.17.4, example'],
    [38_749, '2006-02-01', 'ECMA-376 1st ed. part 4, 3.17.4, example'],
    [39_448, '2008-01-01', "Microsoft's DATE and XIRR pages: 'January 1, 2008 is serial number 39448'"],
    [
      38_000,
      '2004-01-14',
      "Microsoft's VBA pages: 'the Date value 38000.75 represents 6:00 P.M. on January 14, 2004'",
    ],
    [2_958_465, '9999-12-31', 'ECMA-376 1st ed. part 4, 3.17.4: the upper limit'],
  ],
  '1904': [
    [0, '1904-01-01', 'ECMA-376 1st ed. part 4, 3.17.4: the lower limit'],
    [2_957_003, '9999-12-31', 'ECMA-376 1st ed. part 4, 3.17.4: the upper limit'],
  ],
};

describe.each(['1900', '1904'] as const)('serial dates of the %s system, as published', (system) => {
  it.each(PUBLISHED[system])('reads %d as %s (%s)', (serial, date) => {
    expect(dateFromSerial(serial, system)).toEqual({ ok: true, value: date });
  });
});

// ECMA-376 1st ed. part 4, 3.17.4: 1900 is treated as a leap year, so serial 60 stands for a day that never was;
// Microsoft [MS-XLSB] 2.5.30 DateAsXnum says of an integer part of 60 that no date is specified.
it('refuses serial 60 of the 1900 system', () => {
  expect(dateFromSerial(60, '1900')).toMatchObject({ ok: false, code: 'no_such_day' });
});

// ECMA-376 1st ed. part 4, 3.17.4: a serial outside the range of its date base system is ill-formed.
it.each([
  [0, '1900'],
  [-1, '1900'],
  [2_958_466, '1900'],
  [-1, '1904'],
  [2_957_004, '1904'],
] as const)('refuses serial %d, outside the range of the %s system', (serial, system) => {
  expect(dateFromSerial(serial, system)).toMatchObject({ ok: false, code: 'not_a_date' });
});

// Independent reference: ECMAScript's own proleptic Gregorian calendar (ECMA-262, Time Values and Time Range), in
// which 1970-01-01 is day 0; it is serial 25569, and every day after 1 March 1900 counts from there.
it('agrees with the calendar of ECMA-262 on every day from 1990 to 2060', () => {
  const wrong: number[] = [];
  for (let serial = 32_874; serial <= 58_805; serial += 1) {
    const expected = new Date((serial - 25_569) * 86_400_000).toISOString().slice(0, 10);
    const read = dateFromSerial(serial, '1900');
    const read1904 = dateFromSerial(serial - 1462, '1904');
    if (!read.ok || read.value !== expected || !read1904.ok || read1904.value !== expected)
      wrong.push(serial);
  }
  expect(wrong).toEqual([]);
});
