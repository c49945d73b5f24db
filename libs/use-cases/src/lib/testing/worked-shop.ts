import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { addDays, toLocalDate } from '@brakeven/values';
import { runRollup } from '../roll-up-costs/run-rollup';

/** The clock of the worked shop. */
export const WORKED_NOW = () => new Date('2026-05-20T17:00:00Z');

/** A shop with three months of work that is rolled up; everything in it is fixed. */
export interface WorkedShop extends TestShop {
  employees: { mara: string; wen: string; ode: string };
  machines: { press: string; saw: string };
  operations: { form: string; cut: string; weld: string };
  jobs: { guards: string; covers: string; internal: string; idle: string };
  importId: string;
  entryIds: string[];
}

/**
 * Two machines (one in service since 2 March), a raise and a new charge-out rate in April, one job that is not
 * billable, one without work, one employee without a wage before May, and no overhead rate before 9 March.
 */
export async function createWorkedShop(): Promise<WorkedShop> {
  const shop = await createTestShop({ weekStart: 1 });
  const employees = {
    mara: await shop.addEmployee({ number: '1', name: 'Mara Lind' }),
    wen: await shop.addEmployee({ number: '2', name: 'wen Abara' }),
    ode: await shop.addEmployee({ number: '3', name: 'Ode Sorrel' }),
  };
  const machines = {
    press: await shop.addMachine({ code: 'PB2', name: 'Press 2', inServiceOn: '2026-03-02' }),
    saw: await shop.addMachine({ code: 'SAW', name: 'Cold saw', kind: 'Saw' }),
  };
  const operations = {
    form: await shop.addOperation({ code: 'FORM', name: 'Form', defaultMachineId: machines.press }),
    cut: await shop.addOperation({ code: 'CUT', name: 'Cut', defaultMachineId: machines.saw }),
    weld: await shop.addOperation({ code: 'WELD', name: 'Weld' }),
  };
  const customerId = await shop.addCustomer('Northgate Conveyors');
  const jobs = {
    guards: await shop.addJob({
      number: '1042',
      title: 'Conveyor guards',
      customerId,
      quotedPrice: '8250.00',
      openedOn: '2026-02-20',
      dueOn: '2026-06-01',
    }),
    covers: await shop.addJob({
      number: '1043',
      title: 'Trench covers',
      quotedPrice: '1999.99',
      status: 'finished',
    }),
    internal: await shop.addJob({ number: '900', title: 'Shop fixtures 100%_done', isBillable: false }),
    idle: await shop.addJob({ number: '1100', title: 'Cabinet shells', customerId, status: 'quoted' }),
  };
  await addRates(shop, employees, machines);
  const importId = await shop.addImport({ fileName: 'march week 1.xlsx', sheet: 'Week 10' });
  const worked: WorkedShop = { ...shop, employees, machines, operations, jobs, importId, entryIds: [] };
  worked.entryIds = await shop.addEntries(makeEntries(worked));
  await runRollup(shop.context('owner', { now: WORKED_NOW }), {});
  return worked;
}

async function addRates(
  shop: TestShop,
  employees: WorkedShop['employees'],
  machines: WorkedShop['machines'],
): Promise<void> {
  const pay = (employeeId: string, validFrom: string, wagePerHour: string, burdenPercent: string) =>
    shop.addPayRate({ employeeId, validFrom, wagePerHour, burdenPercent });
  await pay(employees.mara, '2026-01-01', '28.50', '28.125');
  await pay(employees.mara, '2026-04-06', '29.75', '28.125');
  await pay(employees.wen, '2026-01-01', '24', '25');
  await pay(employees.ode, '2026-05-01', '21.333333', '25.5');
  await shop.addOverheadRate({ validFrom: '2026-03-09', ratePerLabourHour: '12.345' });
  const price = (machineId: string, validFrom: string, rates: [string, string, string]) =>
    shop.addMachineRate({
      machineId,
      validFrom,
      machineHourRate: rates[0],
      chargeOutRate: rates[1],
      runningCostPerHour: rates[2],
    });
  await price(machines.press, '2026-01-01', ['31.25', '95', '4.10']);
  await price(machines.press, '2026-04-13', ['31.25', '98.50', '4.10']);
  await price(machines.saw, '2026-01-01', ['9.90', '40', '1.05']);
  const cost = (incurredOn: string, kind: 'price' | 'freight', description: string, amount: string) =>
    shop.addMachineCostItem({ machineId: machines.press, incurredOn, kind, description, amount });
  await cost('2026-02-10', 'price', 'Press, used', '14500.00');
  await cost('2026-02-17', 'freight', '', '1240.50');
}

/** Ninety entries from 24 February on, every other one from the workbook. */
function makeEntries(shop: WorkedShop) {
  const pick = <T>(items: Record<string, T>, index: number): T => {
    const values = Object.values(items);
    return values[index % values.length] as T;
  };
  const { guards, covers, internal } = shop.jobs;
  return Array.from({ length: 90 }, (_, n) => ({
    workedOn: addDays(toLocalDate('2026-02-24'), Math.floor((n * 85) / 90)),
    employeeId: pick(shop.employees, n),
    jobId: pick({ guards, covers, internal }, Math.floor(n / 2)),
    operationId: pick(shop.operations, Math.floor(n / 3)),
    machineId: n % 11 === 0 ? shop.machines.press : null,
    hours: (0.25 + (n % 13) * 0.6111).toFixed(4),
    goodPieces: n % 4 === 0 ? null : n % 9,
    scrapPieces: n % 5 === 0 ? 1 : null,
    note: n === 7 ? 'Waited for the crane' : null,
    ...(n % 2 === 0 ? { importId: shop.importId, sourceRow: n + 2, sourceCell: `F${n + 2}` } : {}),
  }));
}
