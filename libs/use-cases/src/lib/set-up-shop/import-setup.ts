import { AppError, SETUP_SHEET_NAMES, type SetupResult } from '@brakeven/contract';
import {
  deleteRegisterRows,
  findConstraintViolation,
  insertRegisterRows,
  listPostedIssueAmounts,
  listRegisterRows,
  lockBooks,
  REGISTER,
  type RegisterTable,
  replaceRegisterRows,
  type ShopTransaction,
  updateRegisterRows,
} from '@brakeven/database';
import { readSetupWorkbook, type SetupFile, type SheetFile } from '@brakeven/workbook';
import { inShopOf, type ShopContext, todayOf } from '../context';
import { toStorableJson } from '../import-timesheet/storable-text';
import { readUpload, type UploadedFile, type UploadTools } from '../import-timesheet/upload';
import { refusingRows } from '../refuse-rows';
import { rollUpAfter } from '../roll-up-after';
import { checkStock } from './check-stock';
import { checkOpenings } from './dated-rows';
import { planEstimates } from './plan-estimates';
import { planIssues } from './plan-issues';
import { planInvoices, planOutsideServices } from './plan-job-money';
import { planCustomers, planJobs, planOverhead } from './plan-jobs';
import { planMachineCosts, planMachineRates, planMachines, planOperations } from './plan-machines';
import { planMaterials } from './plan-materials';
import { planPeople } from './plan-people';
import { planSheetLots } from './plan-sheet-lots';
import { planDies, planPunches } from './plan-tools';
import { SetupDraft, type SetupRegister } from './setup-draft';

/**
 * Says what importing a set-up workbook would do, and what stands in its way; writes nothing.
 * @throws AppError `file_refused`
 */
export async function checkSetup(
  context: ShopContext,
  file: UploadedFile,
  _options: unknown,
  tools: UploadTools,
): Promise<SetupResult> {
  const sheetFile = await readUpload(file, tools);
  const draft = await inShopOf(context, (trx) => draftSetup(trx, context, sheetFile));
  tools.onProgress?.({ stage: 'done', done: 1, total: 1, message: 'The check is done' });
  return toSetupResult(draft);
}

/**
 * Sets the shop up from a workbook: adds what is new, changes what differs, leaves what is the same, all in one
 * transaction or nothing of it. Blank cells change nothing, and nothing is ever taken out. Then costs are rolled up.
 * @throws AppError `file_refused`, `setup_refused` (with the result as details), `conflict`; nothing is written then
 */
export async function importSetup(
  context: ShopContext,
  file: UploadedFile,
  _options: unknown,
  tools: UploadTools,
): Promise<SetupResult> {
  const sheetFile = await readUpload(file, tools);
  const work = async (trx: ShopTransaction): Promise<SetupDraft> => {
    await lockBooks(trx, context.shop.shopId);
    const planned = await draftSetup(trx, context, sheetFile);
    refuseProblems(toSetupResult(planned));
    await writeSetup(trx, context, planned, tools);
    return planned;
  };
  const draft = await refusingRows(context.shop.units, {}, () => inShopOf(context, work)).catch(refuseRace);
  await rollUpAfter(context, tools);
  tools.onProgress?.({ stage: 'done', done: 1, total: 1, message: 'The shop is set up' });
  return toSetupResult(draft);
}

/** References go before what refers to them. */
const WRITE_ORDER = [
  'employee',
  'payRate',
  'customer',
  'machine',
  'machineCostItem',
  'machineRate',
  'operation',
  'overheadRate',
  'job',
  'punch',
  'die',
  'dieOpening',
  'material',
  'sheetLot',
  'materialIssue',
  'outsideService',
  'invoice',
  'estimate',
  'estimateLine',
] as const satisfies readonly RegisterTable[];

async function draftSetup(
  trx: ShopTransaction,
  context: ShopContext,
  sheetFile: SheetFile,
): Promise<SetupDraft> {
  const { shop } = context;
  const read = readSetupWorkbook(sheetFile, { units: shop.units });
  const stated = JSON.parse(toStorableJson(read)) as SetupFile;
  const register: Partial<SetupRegister> = {};
  for (const table of Object.keys(REGISTER) as RegisterTable[]) {
    register[table] = await listRegisterRows(trx, shop.shopId, table);
  }
  const draft = new SetupDraft(register as SetupRegister, {
    today: todayOf(context),
    units: shop.units,
    postedAmounts: await listPostedIssueAmounts(trx, shop.shopId),
  });
  draft.problems.push(...stated.problems);
  planSheets(draft, stated, listFilledCells(sheetFile, SETUP_SHEET_NAMES.jobs));
  return draft;
}

/** Sheets go in the order of their references, whatever order they have in the workbook. */
function planSheets(draft: SetupDraft, stated: SetupFile, filledJobCells: ReadonlySet<string>): void {
  planPeople(draft, stated.people);
  planCustomers(draft, stated.customers);
  planMachines(draft, stated.machines);
  planMachineCosts(draft, stated.machineCosts);
  planMachineRates(draft, stated.machineRates);
  planOperations(draft, stated.operations);
  planOverhead(draft, stated.overhead);
  planJobs(draft, stated.jobs, (address) => address !== undefined && filledJobCells.has(address));
  checkOpenings(draft, stated.jobs);
  planPunches(draft, stated.punches);
  planDies(draft, stated.dies);
  planMaterials(draft, stated.materials);
  planSheetLots(draft, stated.sheetLots);
  checkStock(draft, planIssues(draft, stated.issues), stated.sheetLots);
  planOutsideServices(draft, stated.outsideServices);
  planInvoices(draft, stated.invoices);
  planEstimates(draft, stated.estimates);
}

function listFilledCells({ sheets }: SheetFile, sheetName: string): Set<string> {
  const named = sheets.filter(({ name }) => name.trim().toLowerCase() === sheetName.toLowerCase());
  return new Set(
    named.flatMap(({ rows }) => rows.flatMap(({ cells }) => cells.map(({ address }) => address))),
  );
}

async function writeSetup(
  trx: ShopTransaction,
  { shop: { shopId }, actor }: ShopContext,
  draft: SetupDraft,
  { onProgress }: UploadTools,
): Promise<void> {
  for (const [done, table] of WRITE_ORDER.entries()) {
    onProgress?.({ stage: 'writing', done, total: WRITE_ORDER.length, message: 'Writing the register' });
    const { inserts, voidedIds, deletedIds } = draft.tables[table];
    await deleteRegisterRows(trx, shopId, table, deletedIds);
    if (voidedIds.length > 0) {
      await replaceRegisterRows(trx, shopId, table, inserts, { ids: voidedIds, by: actor.name });
    } else await insertRegisterRows(trx, shopId, table, inserts);
    await updateRegisterRows(trx, shopId, table, draft.tables[table].listUpdates());
  }
}

const ISSUES_MAX = 100;

function refuseProblems(result: SetupResult): void {
  const refused = result.problems.filter(({ severity }) => severity === 'refused');
  if (refused.length === 0) return;
  const cells = refused.length === 1 ? 'One cell needs' : `${refused.length} cells need`;
  const message = `${cells} putting right before the workbook can be imported; nothing was written.`;
  const issues = refused
    .slice(0, ISSUES_MAX)
    .map(({ sheet, cell, code, message: words }) => ({ field: `${sheet}!${cell}`, code, message: words }));
  throw new AppError('setup_refused', message, { issues, details: result });
}

/** Somebody adding the same thing on a page at the same moment is a refusal, not a failure. */
function refuseRace(error: unknown): never {
  if (findConstraintViolation(error)?.kind !== 'unique') throw error;
  const message =
    'The shop was changed by somebody else while the workbook was imported; nothing was written. Import it again.';
  throw new AppError('conflict', message, { cause: error });
}

function toSetupResult({ counts, problems }: SetupDraft): SetupResult {
  return { ...counts, problems: [...problems] };
}
