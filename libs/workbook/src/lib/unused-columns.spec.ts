import { readSheets } from './read-sheets';
import { readTimesheetRows } from './read-timesheet-rows';
import { findTimesheetHeader } from './timesheet-mapping';

/** The unused columns of a sheet of comma-separated lines, read as its header is recognised. */
async function listUnused(...lines: string[]) {
  const file = await readSheets({ name: 'week.csv', bytes: Buffer.from(lines.join('\r\n')) });
  return readTimesheetRows(file, findTimesheetHeader(file).mapping).unusedColumns;
}

const header = (last: string) => `Date,Employee,Job,Op,Hours,${last}`;
const row = (last: string) => `2026-11-23,101,2041,FORM,7.5,${last}`;

describe('columns that no field is read from', () => {
  it('are named with their header and first different values', async () => {
    const unused = await listUnused(header('Cell'), row('BR1'), row('brake 1'), row('BR1'), row('BR2'));
    expect(unused).toEqual([
      {
        column: 'F',
        text: 'Cell',
        samples: ['BR1', 'brake 1', 'BR2'],
        message: "Column F 'Cell' (BR1, brake 1, …) is not used.",
      },
    ]);
  });

  it('has no mark of more when all values are told, and cuts long ones', async () => {
    const [unused] = await listUnused(
      header('  Supervisor '),
      row('Somebody who has a very long name'),
      row(''),
    );
    expect(unused?.message).toBe("Column F 'Supervisor' (Somebody who has a very…) is not used.");
  });

  it('tells of every column whose hours would be lost, such as overtime', async () => {
    const unused = await listUnused(header('OT hrs,Std'), row('1.5,6'));
    expect(unused.map(({ text }) => text)).toEqual(['OT hrs', 'Std']);
  });

  it('tells of no column that is used, blank below, without a header, or filled beside no entry', async () => {
    expect(await listUnused(header('Mach'), row('P2'))).toEqual([]);
    expect(await listUnused(header('Cell'), row(''), row(' '))).toEqual([]);
    expect(await listUnused(header(''), row('BR1'))).toEqual([]);
    expect(await listUnused(header('Signed'), row(''), ',,,,,', ',,,,,A. Foreman')).toEqual([]);
  });
});
