import { type TimesheetImported, type TimesheetOptions } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createReader } from '@brakeven/workbook';
import { type ShopContext } from '../../context';
import { checkTimesheet } from '../check-timesheet';
import { importTimesheet } from '../import-timesheet';
import { type UploadedFile, type UploadTools } from '../upload';

// Each test makes a shop of its own on a real database, next to other suites.
jest.setTimeout(30_000);

/** A shop with two people, two jobs, two operations and a press, on Friday 6 March 2026. */
export interface TimesheetShop extends TestShop {
  ids: Record<'dana' | 'ivo' | 'job1041' | 'job1042' | 'form' | 'weld' | 'press', string>;
  tools: UploadTools;
  bookkeeper: ShopContext;
  check(file: UploadedFile, options?: Partial<TimesheetOptions>): ReturnType<typeof checkTimesheet>;
  take(file: UploadedFile, options?: Partial<TimesheetOptions>): Promise<TimesheetImported>;
  /** Live entries as 'day number job operation machine hours', sorted. */
  listEntries(): Promise<string[]>;
}

export const TODAY = '2026-03-06';

export async function createTimesheetShop(): Promise<TimesheetShop> {
  const shop = await createTestShop();
  const dana = await shop.addEmployee({ number: '12', name: 'Dana Quill' });
  const ivo = await shop.addEmployee({ number: '14', name: 'Ivo Marsh' });
  await shop.addPayRate({
    employeeId: dana,
    validFrom: '2025-01-01',
    wagePerHour: '28.50',
    burdenPercent: '28',
  });
  await shop.addPayRate({ employeeId: ivo, validFrom: '2026-03-02', wagePerHour: '24' });
  const ids = {
    dana,
    ivo,
    job1041: await shop.addJob({ number: 'J-1041', title: 'Trench covers' }),
    job1042: await shop.addJob({ number: 'J-1042', title: 'Conveyor guards', status: 'finished' }),
    form: await shop.addOperation({ code: 'FORM', name: 'Forming' }),
    weld: await shop.addOperation({ code: 'WELD', name: 'Welding' }),
    press: await shop.addMachine({ code: 'P2', name: 'Press 2', inServiceOn: '2026-01-01' }),
  };
  const bookkeeper = shop.context('bookkeeper', { now: () => new Date(`${TODAY}T18:00:00Z`) });
  const tools = { reader: createReader() };
  return {
    ...shop,
    ids,
    tools,
    bookkeeper,
    check: (file, options = {}) => checkTimesheet(bookkeeper, file, options, tools),
    take: (file, options = {}) => importTimesheet(bookkeeper, file, options, tools),
    listEntries: () => listEntries(shop),
  };
}

async function listEntries(shop: TestShop): Promise<string[]> {
  const rows = await shop.inShop((trx) =>
    trx
      .selectFrom('timeEntry as t')
      .innerJoin('employee as e', 'e.employeeId', 't.employeeId')
      .innerJoin('job as j', 'j.jobId', 't.jobId')
      .innerJoin('operation as o', 'o.operationId', 't.operationId')
      .leftJoin('machine as m', 'm.machineId', 't.machineId')
      .select(['t.workedOn', 'e.number', 'j.number as job', 'o.code', 'm.code as machine', 't.hours'])
      .where('t.voidedAt', 'is', null)
      .execute(),
  );
  return rows
    .map((row) => [row.workedOn, row.number, row.job, row.code, row.machine ?? '-', row.hours].join(' '))
    .sort();
}

export const HEADER = 'Date,Employee,Job,Operation,Machine,Hours,Good,Scrap,Note';

/** A timesheet as text; each row in the order of the header. */
export function toCsv(rows: readonly string[], { header = HEADER, name = 'week.csv' } = {}): UploadedFile {
  return { name, bytes: new TextEncoder().encode([header, ...rows, ''].join('\r\n')) };
}

/** Three good rows, 16.25 hours. */
export const GOOD_ROWS = [
  '2026-03-02,12,J-1041,FORM,P2,7.5,40,1,first run',
  '2026-03-02,14,J-1041,WELD,,8,,,',
  '2026-03-03,Dana Quill,j-1041,Forming,Press 2,0:45,3,,',
];
