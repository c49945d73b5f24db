import { type RawCell } from './sheet-file';
import { readHoursCell, readLabelCell, readPiecesCell, type TextForms } from './timesheet-cells';

const forms: TextForms = { date1904: false, dateFormat: undefined, decimalMark: '.', knownDays: new Map() };
const dateCell = (value: number, text: string): RawCell => ({
  address: 'F12',
  hasFormula: false,
  kind: 'date',
  value,
  text,
});
const messageOf = (reading: { ok: boolean; message?: string }) => reading.message;

describe('a number in a cell that is formatted as a date', () => {
  it('is called the number that it is, with its format', () => {
    expect(messageOf(readHoursCell(dateCell(0.3125, '0.3125'), forms))).toBe(
      'Cell F12 holds the number 0.3125 formatted as a date, not hours. Write hours as a number such as 7.5 or as ' +
        'a duration such as 7:30. Format the cell as a number or a duration, not as a date.',
    );
    expect(messageOf(readHoursCell(dateCell(7.5, '1900-01-07 12:00'), forms))).toContain(
      'holds the number 7.5 formatted as a date (1900-01-07 12:00), not hours.',
    );
    expect(messageOf(readLabelCell(dateCell(1001, '1902-09-27'), 'job'))).toContain(
      'holds the number 1001 formatted as a date (1902-09-27), where the job should stand.',
    );
    expect(messageOf(readPiecesCell(dateCell(-3, '-3'), 'good'))).toContain(
      'holds the number -3 formatted as',
    );
  });

  it('is called a date when work can be from that day', () => {
    expect(messageOf(readHoursCell(dateCell(46349, '2026-11-23'), forms))).toContain(
      "holds the date '2026-11-23', not hours.",
    );
  });
});
