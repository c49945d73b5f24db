import { execFile, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { promisify } from 'node:util';
import { type LocalDate } from '@brakeven/values';
import { parse } from 'csv-parse/sync';
import { writeSetupTemplate } from './write-setup-workbook';
import { writeTimesheetWorkbook } from './write-timesheet';

const hasLibreOffice = spawnSync('soffice', ['--version']).status === 0;
const folder = mkdtempSync(join(tmpdir(), 'brakeven-office-'));
const run = promisify(execFile);

afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** What LibreOffice shows of one sheet of a workbook, as CSV (44 comma, 34 quote, 76 UTF-8; -1 = every sheet). */
async function convertToCsv(name: string, bytes: Buffer, sheet: string): Promise<string[][]> {
  writeFileSync(join(folder, `${name}.xlsx`), bytes);
  const filter = 'csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1';
  const profile = `-env:UserInstallation=${pathToFileURL(join(folder, 'profile'))}`;
  await run('soffice', [
    profile,
    '--headless',
    '--convert-to',
    filter,
    '--outdir',
    folder,
    join(folder, `${name}.xlsx`),
  ]);
  return parse(readFileSync(join(folder, `${name}-${sheet}.csv`)), { relax_column_count: true });
}

// A second spreadsheet program as judge of what we write; without it (another system) there is nothing to ask.
(hasLibreOffice ? describe : describe.skip)('LibreOffice opens what we write', () => {
  it('shows a timesheet with dates, hours and the total as meant', async () => {
    const bytes = await writeTimesheetWorkbook({
      title: 'Week 10',
      sheetName: 'Hours',
      rows: [
        {
          workedOn: '2026-03-02' as LocalDate,
          employee: 'Zoë Quill',
          job: '2041',
          operation: 'FORM',
          machine: 'P2',
          hours: '7.3333',
          good: 24,
          scrap: 0,
          note: '<&> "x" _x0041_',
        },
      ],
    });
    expect(await convertToCsv('week', bytes, 'Hours')).toEqual([
      ['Week 10', '', '', '', '', '', '', '', ''],
      ['', '', '', '', '', '', '', '', ''],
      ['Date', 'Employee', 'Job', 'Operation', 'Machine', 'Hours', 'Good', 'Scrap', 'Note'],
      ['2026-03-02', 'Zoë Quill', '2041', 'FORM', 'P2', '7.3333', '24', '0', '<&> "x" _x0041_'],
      ['Total', '', '', '', '', '7.3333', '', '', ''],
    ]);
  }, 120_000);

  it('shows the set-up template sheet by sheet', async () => {
    const bytes = await writeSetupTemplate();
    expect(await convertToCsv('setup', bytes, 'Machines')).toEqual([
      ['Code', 'Name', 'Kind', 'In service', 'Rated force (tons)', 'Bed length (in)'],
    ]);
    const people = parse(readFileSync(join(folder, 'setup-People.csv')));
    expect(people).toEqual([['Number', 'Name', 'Rate from', 'Wage per hour', 'Burden %']]);
    const issues = parse(readFileSync(join(folder, 'setup-Issues.csv'))) as string[][];
    expect(issues[0]?.slice(0, 4)).toEqual(['Date', 'Job', 'Material', 'Kind']);
    expect(issues[0]?.slice(6)).toEqual(['Blank length (in)', 'Blank width (in)', 'Weight (lb)', 'Note']);
    const materials = parse(readFileSync(join(folder, 'setup-Materials.csv'))) as string[][];
    expect(materials[0]?.slice(3)).toEqual([
      ...['Thickness or gauge (in)', 'Density (lb/in³)', 'Tensile strength (ksi)', 'Recovery price per lb'],
    ]);
  }, 120_000);
});
