import { hoursFromDays, hoursText } from '@brakeven/values';

// A duration is stored as a fraction of a day that grows by 1/86,400 each second
// (ECMA-376 1st ed. part 3, Time Representation). Printed fractions are cut short; the second they mean is not lost.
describe('durations in spreadsheet cells, as published', () => {
  it.each([
    [
      0.4207639,
      '10.0983',
      'ECMA-376 part 3: TIMEVALUE("10:05:54") = 0.4207639…; 10 h 5 min 54 s = 10.09833… h',
    ],
    [0.5, '12.0000', 'ECMA-376 part 3: TIMEVALUE("12:00:00") = 0.5'],
    [0.0000115, '0.0003', 'ECMA-376 part 3: TIMEVALUE("00:00:01") = 0.0000115…; 1/3600 h = 0.000277… h'],
    [
      0.9999884,
      '23.9997',
      'ECMA-376 part 3: TIMEVALUE("23:59:59") = 0.9999884…; 23 h 59 min 59 s = 23.99972… h',
    ],
    [0.520833, '12.5000', 'Microsoft, TIME function: TIME(0,750,0) = TIME(12,30,0) = .520833'],
    [0.023148, '0.5556', 'Microsoft, TIME function: TIME(0,0,2000) = .023148; 2000 s = 0.5555… h'],
    [0.125, '3.0000', 'Microsoft, TIME function: TIME(27,0,0) = TIME(3,0,0) = .125'],
  ])('reads %d of a day as %s hours (%s)', (days, hours) => {
    expect(hoursText(hoursFromDays(days))).toBe(hours);
  });

  // Computed with decimal arithmetic outside this code: h:mm ÷ 24 to as many digits as a double keeps.
  it.each([
    [0.3125, '7.5000', '7:30'],
    [0.03125, '0.7500', '0:45'],
    [0.34722222222222221, '8.3333', '8:20'],
    [0.30555555555555558, '7.3333', '7:20'],
    [1.5104166666666667, '36.2500', '36:15 in the format [h]:mm'],
  ])('reads %d of a day as %s hours (%s)', (days, hours) => {
    expect(hoursText(hoursFromDays(days))).toBe(hours);
  });
});
