import { runRollup } from '../../roll-up-costs/run-rollup';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../../testing/worked-shop';

/** The worked shop with a cost in every category. */
export interface FullShop extends WorkedShop {
  materialId: string;
  /** Issue, return, and an issue that is voided once its month is closed. */
  issues: { covers: string; back: string; voided: string };
  /** Jobs beyond those that the payback lists by name. */
  smallJobs: string[];
  overtimeEntryIds: string[];
}

/**
 * On top of the worked shop: premiums that go to their jobs, a material with two lots, services, invoices and a
 * credit note, and seven more jobs on the press. March is closed after its costs were rolled up; then an entry and
 * an issue of it are voided, and an entry comes late.
 */
export async function createFullShop(): Promise<FullShop> {
  const worked = await createWorkedShop();
  await setOvertime(worked);
  const overtimeEntryIds = await addOvertime(worked);
  const stock = await addStock(worked);
  await addMoney(worked);
  const smallJobs = await addSmallJobs(worked);
  const context = worked.context('owner', { now: WORKED_NOW });
  await runRollup(context, {});
  await closeMarch(worked, stock.issues.voided);
  await runRollup(context, {});
  return { ...worked, ...stock, smallJobs, overtimeEntryIds };
}

async function setOvertime(shop: WorkedShop): Promise<void> {
  shop.shop.overtimeTo = 'jobs';
  await shop.inShop((trx) => trx.updateTable('shop').set({ overtimeTo: 'jobs' }).execute());
}

/** 46.5 hours of one week, on two jobs, and as many of the week before in another month's first days. */
function addOvertime({ employees, jobs, operations, addEntries }: WorkedShop): Promise<string[]> {
  const days = ['2026-05-11', '2026-05-12', '2026-05-13', '2026-05-14', '2026-05-15'];
  return addEntries(
    days.map((workedOn, n) => ({
      workedOn,
      employeeId: employees.wen,
      jobId: n % 2 === 0 ? jobs.guards : jobs.covers,
      operationId: operations.weld,
      machineId: null,
      hours: '9.3333',
    })),
  );
}

async function addStock(shop: WorkedShop): Promise<Pick<FullShop, 'materialId' | 'issues'>> {
  const { addMaterial, addLot, addIssue, jobs } = shop;
  const materialId = await addMaterial({ name: '11 ga mild steel', densityKgM3: '7850' });
  const lot = (number: string, receivedOn: string, weightKg: string, cost: string, freight: string) =>
    addLot({ materialId, number, vendor: 'Delta Sheet Supply', receivedOn, weightKg, cost, freight });
  await lot('L-1', '2026-02-25', '500', '611.00', '40.00');
  await lot('L-2', '2026-04-02', '300', '420.10', '0');
  const issue = (jobId: string, issuedOn: string, weightKg: string, more: object = {}) =>
    addIssue({ materialId, jobId, issuedOn, weightKg, ...more });
  return {
    materialId,
    issues: {
      covers: await issue(jobs.covers, '2026-03-10', '120.5', { sheets: 2 }),
      voided: await issue(jobs.guards, '2026-03-12', '33.3333', { pieces: 24, note: 'wrong gauge' }),
      back: await issue(jobs.covers, '2026-04-20', '20', { kind: 'return' }),
    },
  };
}

async function addMoney({ addOutsideService, addInvoice, jobs }: WorkedShop): Promise<void> {
  const service = (jobId: string, incurredOn: string, description: string, amount: string) =>
    addOutsideService({ jobId, incurredOn, vendor: 'Prairie Powder Coat', description, amount });
  await service(jobs.guards, '2026-03-18', 'Powder coat, yellow', '310.00');
  await service(jobs.covers, '2026-04-08', 'Galvanizing', '145.75');
  await addInvoice({ jobId: jobs.guards, number: '5001', invoicedOn: '2026-04-30', amount: '2000.00' });
  await addInvoice({ jobId: jobs.covers, number: '5002', invoicedOn: '2026-05-04', amount: '1999.99' });
  await addInvoice({
    jobId: jobs.covers,
    kind: 'credit-note',
    number: '77',
    invoicedOn: '2026-05-12',
    description: 'Two covers short',
    amount: '160.00',
  });
}

async function addSmallJobs({ addJob, addEntries, employees, operations }: WorkedShop): Promise<string[]> {
  const jobIds: string[] = [];
  for (let n = 1; n <= 7; n += 1) {
    jobIds.push(await addJob({ number: `200${n}`, title: `Bracket ${n}`, openedOn: '2026-04-01' }));
  }
  await addEntries(
    jobIds.map((jobId, n) => ({
      workedOn: `2026-04-1${n}`,
      employeeId: employees.mara,
      jobId,
      operationId: operations.form,
      machineId: null,
      hours: (0.5 + n * 0.25).toFixed(4),
    })),
  );
  return jobIds;
}

async function closeMarch(shop: WorkedShop, issueId: string): Promise<void> {
  const { inShop, addMonthClose, addEntries, entryIds, employees, jobs, operations } = shop;
  await addMonthClose('2026-03-01');
  const voided = { voidedAt: WORKED_NOW(), voidedBy: 'Test' };
  const inMarch = entryIds[12] ?? '';
  await inShop((trx) => trx.updateTable('timeEntry').set(voided).where('entryId', '=', inMarch).execute());
  await inShop((trx) =>
    trx.updateTable('materialIssue').set(voided).where('issueId', '=', issueId).execute(),
  );
  const late = { workedOn: '2026-03-20', machineId: null, hours: '2.5000' };
  await addEntries([
    { ...late, employeeId: employees.mara, jobId: jobs.covers, operationId: operations.weld },
  ]);
}
