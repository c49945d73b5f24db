import { type TimesheetMapping } from '@brakeven/contract';
import { readFixture } from '../../testing/fixture-file';
import { readTimesheetRows } from './read-timesheet-rows';
import { findTimesheetHeader } from './timesheet-mapping';
import { type TimesheetRow, type TimesheetRows } from './timesheet-row';

async function readRows(path: string, mapping: Partial<TimesheetMapping> = {}): Promise<TimesheetRows> {
  const file = await readFixture(path);
  return readTimesheetRows(file, { ...findTimesheetHeader(file).mapping, ...mapping });
}

/** A row as one line: number, values, problems. */
function toLine({ row, problems, ...values }: TimesheetRow): string {
  const { workedOn, employee, job, operation, machine, hours, good, scrap, note } = values;
  const said = [workedOn, employee, job, operation, machine, hours, good, scrap, note].map(
    (value) => value ?? '-',
  );
  return `${row}: ${said.join(' | ')}${problems.map(({ code, cell }) => ` !${code} ${cell}`).join('')}`;
}

const FIRST = '2026-03-02 | 101 | 2041 | FORM | P2 | 7.5000 | 24 | 1 | first run';
const SECOND = '2026-03-03 | Mara Quill | 2042 | WELD | - | 2.2500 | - | - | -';
const RAW = '2: 2026-03-02 | Mara Quill | 2041 | FORM | P2 | 7.5000 | 24 | - | -';
const spans = ['7.5000', '36.2500', '8.3333', '0.7500'].map(
  (hours, at) => `${at + 2}: 2026-03-02 | 101 | 2041 | FORM | - | ${hours} | - | - | -`,
);
const shared = ['2.5000 | 1', '5.0000 | 2', '7.5000 | 3'].map(
  (counts, at) => `${at + 2}: 2026-03-02 | 101 | 2041 | FORM | - | ${counts} | - | -`,
);

describe('timesheets that are read whole', () => {
  it.each<[string, string[]]>([
    ['plain.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['plain-libreoffice.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['plain.csv', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['plain-libreoffice.csv', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['utf8-bom.csv', [`2: ${FIRST}`, `3: ${SECOND.replace('Mara Quill', 'Zoë Brûlé')}`]],
    ['date-1904.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['date-1904-libreoffice.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['header-on-row-7.xlsx', [`8: ${FIRST}`, `9: ${SECOND}`]],
    ['formula-hours.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['shared-formula-hours.xlsx', shared],
    ['shared-formula-hours-libreoffice.xlsx', shared],
    ['hours-as-duration.xlsx', spans],
    ['hours-as-duration-libreoffice.xlsx', spans],
    ['rich-text-employee.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['hyperlink-job.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['merged-title.xlsx', [`5: ${FIRST}`, `6: ${SECOND}`]],
    ['unusual-headers.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['padded-numbers.xlsx', [`2: ${FIRST.replace('101', '00007')}`, `3: ${SECOND}`]],
    ['sheets-before-styles.xlsx', [`2: ${FIRST}`, `3: ${SECOND}`]],
    ['inline-strings.xlsx', [RAW]],
    ['iso-dates.xlsx', [RAW]],
    ['cells-without-addresses.xlsx', [RAW]],
    ['escaped-h-in-format.xlsx', [RAW]],
    ['prefixed-tags.xlsx', [RAW]],
    ['other-part-names.xlsx', [RAW]],
    ['validation-on-whole-column.xlsx', [RAW]],
    [
      'quoted.csv',
      [
        '2: 2026-03-02 | Quill, Mara | 2041 | FORM | - | 7.5000 | - | - | said "done"; then left',
        '4: 2026-03-03 | 101 | 2042 | WELD | - | 2.2500 | - | - | 3/8" plate',
      ],
    ],
  ])('%s', async (name, lines) => {
    const read = await readRows(`ok/${name}`);
    expect(read.rows.map(toLine)).toEqual(lines);
    expect(read.controlTotal).toBeNull();
    expect(read.problems).toEqual([]);
  });

  it('reads hours as text and drops the noise of binary sums', async () => {
    const texts = await readRows('ok/hours-as-text.xlsx');
    expect(texts.rows.map(({ hours }) => hours)).toEqual(['7.5000', '7.5000', '0.7500']);
    const noisy = await readRows('ok/float-noise.xlsx');
    expect(noisy.rows.map(({ hours }) => hours)).toEqual(['0.3000', '7.0001']);
  });

  it('keeps the cell behind every mapped field, blank ones too', async () => {
    const [, second] = (await readRows('ok/plain.xlsx')).rows;
    expect(second?.cells).toEqual({
      date: 'A3',
      employee: 'B3',
      job: 'C3',
      operation: 'D3',
      machine: 'E3',
      hours: 'F3',
      good: 'G3',
      scrap: 'H3',
      note: 'I3',
    });
  });

  it('reads text dates and decimal commas in the forms that the mapping declares', async () => {
    const declared = await readRows('ok/semicolon-decimal-comma.csv', {
      dateFormat: 'DD.MM.YYYY',
      decimalMark: ',',
    });
    expect(declared.rows.map(toLine)).toEqual([
      '2: 2026-03-02 | Mara Quill | 2041 | FORM | P2 | 7.5000 | 24 | 1 | Kerbe; neu',
      '3: 2026-03-03 | 101 | 2042 | WELD | - | 2.2500 | - | - | -',
    ]);
    expect(declared.controlTotal).toEqual({ row: 4, hours: '9.7500', cell: 'F4' });
    const asPoint = await readRows('ok/semicolon-decimal-comma.csv', {
      dateFormat: 'DD.MM.YYYY',
      decimalMark: '.',
    });
    expect(asPoint.rows.map(({ hours, problems }) => [hours, problems.map(({ code }) => code)])).toEqual([
      [null, ['hours_unreadable']],
      [null, ['hours_unreadable']],
    ]);
  });
});

describe('what is no entry', () => {
  it('takes the totals row at the foot as control total and passes signatures over', async () => {
    const read = await readRows('ok/totals-row.xlsx');
    expect(read.rows.map(toLine)).toEqual([`2: ${FIRST}`, `3: ${SECOND}`]);
    expect(read.controlTotal).toEqual({ row: 5, hours: '9.7500', cell: 'F5' });
    expect(read.problems).toEqual([expect.objectContaining({ code: 'text_row_skipped', cell: 'A7' })]);
  });

  it('takes hours with nothing else at the very end as control total', async () => {
    const read = await readRows('ok/totals-row-unlabelled.xlsx');
    expect(read.rows).toHaveLength(2);
    expect(read.controlTotal).toEqual({ row: 4, hours: '9.7500', cell: 'F4' });
  });

  it('adds up durations from LibreOffice, formula, comment and all', async () => {
    const read = await readRows('ok/native-libreoffice.xlsx');
    expect(read.rows.map(toLine)).toEqual([
      '4: 2026-03-02 | Mara Quill | 2041 | FORM | - | 7.5000 | - | - | -',
      '5: 2026-03-03 | 101 | 2042 | WELD | - | 36.2500 | - | - | -',
    ]);
    expect(read.controlTotal).toEqual({ row: 6, hours: '43.7500', cell: 'E6' });
  });

  it('skips subtotals with a notice and takes the grand total', async () => {
    const read = await readRows('ok/subtotals.xlsx');
    expect(read.rows.map(({ row }) => row)).toEqual([2, 4]);
    expect(read.controlTotal).toEqual({ row: 6, hours: '9.7500', cell: 'F6' });
    expect(read.problems.map(({ code, cell }) => `${code} ${cell}`)).toEqual([
      'subtotal_skipped F3',
      'subtotal_skipped F5',
    ]);
  });

  it('skips a header that stands there again', async () => {
    const read = await readRows('ok/header-repeated.xlsx');
    expect(read.rows.map(({ row }) => row)).toEqual([2, 4]);
    expect(read.problems.map(({ code, cell }) => `${code} ${cell}`)).toEqual(['header_repeated A3']);
  });
});

describe('rows that are refused', () => {
  it.each<[string, string[][]]>([
    ['text-dates.xlsx', [['date_unreadable A2'], ['date_unreadable A3']]],
    [
      'dates-impossible.xlsx',
      [
        ['date_out_of_range A2'],
        ['date_out_of_range A3'],
        ['date_out_of_range A4'],
        ['date_unreadable A5'],
        ['date_unreadable A6'],
      ],
    ],
    ['error-cells.xlsx', [['cell_error F2'], ['cell_error C3']]],
    ['formula-without-result.xlsx', [['formula_without_result A2', 'formula_without_result F2']]],
    [
      'missing-cells.xlsx',
      [
        ['date_missing A2'],
        ['employee_missing B3'],
        ['job_missing C4'],
        ['operation_missing D5'],
        ['hours_missing F6'],
      ],
    ],
    ['unreadable-hours.xlsx', [2, 3, 4, 5, 6, 7].map((row) => [`hours_unreadable F${row}`])],
    ['unreadable-pieces.xlsx', [['pieces_unreadable G2', 'pieces_unreadable H2']]],
    ['job-became-date.xlsx', [['job_unreadable C2'], ['employee_unreadable B3']]],
  ])('%s names each cell', async (name, expected) => {
    const { rows } = await readRows(`not-ok/${name}`);
    expect(rows.map(({ problems }) => problems.map(({ code, cell }) => `${code} ${cell}`))).toEqual(expected);
    for (const { problems, cells } of rows) {
      for (const { field, cell, message } of problems) {
        expect(cells[field]).toBe(cell);
        expect(message).toContain(cell.replace(/[A-Z]/g, ''));
      }
    }
  });

  it('leaves what cannot be read null, never 0, and keeps the rest of the row', async () => {
    const { rows } = await readRows('not-ok/error-cells.xlsx');
    expect(rows[0]).toMatchObject({ workedOn: '2026-03-02', job: '2041', hours: null });
    expect(rows[1]).toMatchObject({ job: null, hours: '2.2500' });
    const dates = await readRows('not-ok/text-dates.xlsx', { dateFormat: 'DD/MM/YYYY' });
    expect(dates.rows.map(({ workedOn }) => workedOn)).toEqual(['2026-02-03', '2026-04-13']);
    const american = await readRows('not-ok/text-dates.xlsx', { dateFormat: 'MM/DD/YYYY' });
    expect(american.rows.map(({ workedOn }) => workedOn)).toEqual(['2026-03-02', null]);
    expect(american.rows[1]?.problems[0]?.message).toContain('MM/DD/YYYY');
  });

  it('refuses a mapping to a sheet that is not there, naming those that are', async () => {
    const reading = readRows('ok/plain.xlsx', { sheet: 'Week 99' });
    await expect(reading).rejects.toMatchObject({
      code: 'sheet_not_found',
      message: expect.stringContaining("'Week 10'"),
    });
  });
});
