import { DEMO_SHOP } from '@brakeven/demo-shop';
import { addDays, startOfWeek, todayIn } from '@brakeven/values';
import exceljs from 'exceljs';

const MONDAY = 1;

export interface BadTimesheet {
  name: string;
  bytes: Buffer;
  /** Hours of the rows that are right once a column is mapped. */
  hoursGood: number;
  hoursMisspelt: number;
}

/**
 * A workbook of the demo shop's week that is not in yet, in which three cells are wrong: the hours have a heading
 * that nobody could know (E3), a name is misspelt (B5) and a day has 30 hours (E6).
 *
 * @param job number of an open job
 */
export async function writeTimesheetWithThreeBadCells(job: string): Promise<BadTimesheet> {
  const monday = addDays(startOfWeek(todayIn(DEMO_SHOP.timeZone), MONDAY), -7);
  const onDay = (days: number): Date => new Date(`${addDays(monday, days)}T00:00:00Z`);
  const workbook = new exceljs.Workbook();
  const sheet = workbook.addWorksheet('Week');
  sheet.addRow(['Hours of the press room']);
  sheet.addRow([]);
  sheet.addRow(['Date', 'Employee', 'Job', 'Operation', 'Bench clock']);
  sheet.addRow([onDay(0), 'Jory Vance', Number(job), 'FORM', 6.5]);
  sheet.addRow([onDay(0), 'Tobbias Ren', Number(job), 'FORM', 3.25]);
  sheet.addRow([onDay(1), 'Della Marsh', Number(job), 'SHEAR', 30]);
  sheet.addRow([onDay(1), 'Anselm Roe', Number(job), 'WELD', 7]);
  sheet.getColumn(1).numFmt = 'yyyy-mm-dd';
  const bytes = Buffer.from(await workbook.xlsx.writeBuffer());
  return { name: 'Press room.xlsx', bytes, hoursGood: 13.5, hoursMisspelt: 3.25 };
}
