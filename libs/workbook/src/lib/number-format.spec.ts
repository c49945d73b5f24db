import { builtInNumberFormat, parseNumberFormat } from './number-format';

describe('number formats', () => {
  it.each([
    ['General', 'number'],
    ['0.00', 'number'],
    ['#,##0.00_);[Red](#,##0.00)', 'number'],
    ['0.00E+00', 'number'],
    ['# ?/?', 'number'],
    ['@', 'number'],
    ['0.00\\h', 'number'],
    ['0.0 "hours"', 'number'],
    ['[$-409]#,##0.00\\ [$USD]', 'number'],
    ['[>24]0.00;0.0', 'number'],
    ['', 'number'],
    ['0%', 'percent'],
    ['0.00%;[Red]-0.00%', 'percent'],
    ['yyyy\\-mm\\-dd', 'date'],
    ['m/d/yy h:mm', 'date'],
    ['[$-F800]dddd\\,\\ mmmm\\ dd\\,\\ yyyy', 'date'],
    ['[$-409]d\\-mmm\\-yy;@', 'date'],
    ['mmm-yy', 'date'],
    ['mm', 'date'],
    ['[$-411]ge.m.d', 'date'],
    ['h:mm', 'duration'],
    ['[h]:mm:ss', 'duration'],
    ['[HH]:MM', 'duration'],
    ['[mm]', 'duration'],
    ['[ss].00', 'duration'],
    ['mm:ss', 'duration'],
    ['[$-409]h:mm AM/PM;@', 'duration'],
    ['h"h" mm"m"', 'duration'],
  ])('%p is a %s', (code, kind) => {
    expect(parseNumberFormat(code).kind).toBe(kind);
  });

  it('keeps how many digits a number is padded to', () => {
    expect(parseNumberFormat('00000')).toEqual({ kind: 'number', zeros: 5 });
    expect(parseNumberFormat('0')).toEqual({ kind: 'number', zeros: 0 });
  });

  // ISO/IEC 29500-1 18.8.30, numFmt: the formats that have a number and no code in the file.
  it.each([
    [0, 'number'],
    [2, 'number'],
    [9, 'percent'],
    [10, 'percent'],
    [11, 'number'],
    [14, 'date'],
    [17, 'date'],
    [18, 'duration'],
    [20, 'duration'],
    [21, 'duration'],
    [22, 'date'],
    [37, 'number'],
    [45, 'duration'],
    [46, 'duration'],
    [47, 'duration'],
    [49, 'number'],
  ])('built-in format %i is a %s', (id, kind) => {
    expect(builtInNumberFormat(id).kind).toBe(kind);
  });
});
