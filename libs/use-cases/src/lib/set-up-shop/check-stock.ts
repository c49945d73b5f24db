import { SETUP_SHEET_NAMES } from '@brakeven/contract';
import {
  computeMovingAverage,
  findStrandedValue,
  type JobMove,
  type StockLedger,
  type StockMove,
  type StockShortage,
} from '@brakeven/costing';
import { type RegisterRow, type RowRefusal } from '@brakeven/database';
import { D, type Mass, toLocalDate, toMoney } from '@brakeven/values';
import { type SetupFile } from '@brakeven/workbook';
import { toRefusalWords } from '../refuse-rows';
import { type IssueRow } from './plan-issues';
import { type SetupDraft } from './setup-draft';

const STOCK_SHEETS: readonly string[] = [
  SETUP_SHEET_NAMES.materials,
  SETUP_SHEET_NAMES.sheetLots,
  SETUP_SHEET_NAMES.issues,
];

/** Whether all of materials, lots and issues could be read and hold: without one of them the stock is not known. */
export function isStockKnown({ problems }: SetupDraft): boolean {
  return !problems.some(({ severity, sheet }) => severity === 'refused' && STOCK_SHEETS.includes(sheet));
}

/** All moves of a material as they will be. */
export function listStockMoves(draft: SetupDraft, materialId: string): StockMove[] {
  const lots = ofMaterial(draft.tables.sheetLot.listRows(), materialId).map(({ id, values }): StockMove => ({
    kind: 'lot',
    moveId: id,
    movedOn: toLocalDate(String(values['receivedOn'])),
    weight: toWeight(values['weightKg']),
    landedCost: toMoney(D(String(values['cost'])).plus(String(values['freight']))),
  }));
  const issues = ofMaterial(draft.tables.materialIssue.listRows(), materialId).map(
    ({ id, values }): StockMove => {
      const posted = draft.surroundings.postedAmounts.get(id);
      return {
        kind: values['kind'] === 'return' ? 'return' : 'issue',
        moveId: id,
        movedOn: toLocalDate(String(values['issuedOn'])),
        jobId: String(values['jobId']),
        weight: toWeight(values['weightKg']),
        ...(posted === undefined ? {} : { postedAmount: toMoney(posted) }),
      };
    },
  );
  return [...lots, ...issues];
}

/**
 * Refuses what the stock does not cover, and returns of more than was drawn, at the cell of the issue; where an issue
 * that the shop has already would lack its stock, at what the workbook says before it.
 */
export function checkStock(
  draft: SetupDraft,
  issues: ReadonlyMap<string, IssueRow>,
  lots: SetupFile['sheetLots'],
): void {
  if (!isStockKnown(draft)) return;
  const { sheetLot, materialIssue, material } = draft.tables;
  const touched = [...sheetLot.inserts, ...materialIssue.inserts].map(({ values }) => values['materialId']);
  const moved = sheetLot.voidedIds.length > 0 ? material.listRows().map(({ id }) => id) : touched;
  for (const materialId of new Set(moved)) checkMaterial(draft, String(materialId), issues, lots);
}

/** Of one material: more would tell nothing new. */
const TOLD_MAX = 50;

function checkMaterial(
  draft: SetupDraft,
  materialId: string,
  issues: ReadonlyMap<string, IssueRow>,
  lots: SetupFile['sheetLots'],
): void {
  let moves = listStockMoves(draft, materialId);
  let ledger: StockLedger = computeMovingAverage(moves);
  for (let told = 0; !ledger.ok && told < TOLD_MAX; told += 1) {
    const { shortage } = ledger;
    const message = toShortageWords(draft, materialId, shortage);
    const code = shortage.of === 'stock' ? 'stock_short' : 'over_returned';
    const row = issues.get(shortage.move.moveId);
    if (row) draft.refuse('issues', row, findWeightCell(row), { code, message });
    else return refuseAtCause(draft, materialId, shortage.move, { issues, lots, trouble: { code, message } });
    moves = moves.filter(({ moveId }) => moveId !== shortage.move.moveId);
    ledger = computeMovingAverage(moves);
  }
  const stranded = ledger.ok ? findStrandedValue(ledger.moves)?.move : undefined;
  if (!stranded) return;
  const trouble = { code: 'month_closed', message: toStrandedWords(draft, materialId, stranded) };
  refuseAtCause(draft, materialId, stranded, { issues, lots, trouble });
}

interface Causes {
  issues: ReadonlyMap<string, IssueRow>;
  lots: SetupFile['sheetLots'];
  trouble: { code: string; message: string };
}

/** The last issue that the workbook adds before the one in trouble, else a lot that it changes. */
function refuseAtCause(
  draft: SetupDraft,
  materialId: string,
  move: JobMove,
  { issues, lots, trouble }: Causes,
): void {
  const added = ofMaterial(draft.tables.materialIssue.inserts, materialId).filter(
    ({ values }) => String(values['issuedOn']) <= move.movedOn,
  );
  const issue = issues.get(added.at(-1)?.id ?? '');
  if (issue) return draft.refuse('issues', issue, findWeightCell(issue), trouble);
  const changed = new Set(draft.tables.sheetLot.inserts.map(({ values }) => values['number']));
  const meant = lots.filter(({ lot }) =>
    changed.has(draft.tables.sheetLot.find(lot)?.values['number'] ?? null),
  );
  const isOfMaterial = ({ lot }: (typeof lots)[number]) =>
    draft.tables.sheetLot.find(lot)?.values['materialId'] === materialId;
  const lot = meant.find(isOfMaterial) ?? meant[0];
  if (lot) draft.refuse('sheetLots', lot, 'weightKg', trouble);
}

function toShortageWords(
  draft: SetupDraft,
  materialId: string,
  { of, move, missingWeight }: StockShortage,
): string {
  const missing = missingWeight.toFixed();
  const about = toSubject(draft, materialId, move);
  const refusal: RowRefusal =
    of === 'stock'
      ? { kind: 'stock', ...about, missingKg: missing }
      : { kind: 'return', ...about, excessKg: missing };
  return toRefusalWords(refusal, draft.surroundings.units);
}

function toStrandedWords(draft: SetupDraft, materialId: string, move: JobMove): string {
  const refusal = { kind: 'closed-issue', ...toSubject(draft, materialId, move) } as const;
  return toRefusalWords(refusal, draft.surroundings.units);
}

function toSubject(draft: SetupDraft, materialId: string, move: JobMove) {
  const material = String(draft.tables.material.get(materialId)?.values['name']);
  const job = String(draft.tables.job.get(move.jobId)?.values['number']);
  return { material, job, on: move.movedOn };
}

function findWeightCell(row: IssueRow): string {
  if (row.weightKg !== null) return 'weightKg';
  return row.pieces === null ? 'sheets' : 'pieces';
}

function ofMaterial(rows: readonly RegisterRow[], materialId: string): RegisterRow[] {
  return rows.filter(({ values }) => values['materialId'] === materialId);
}

const toWeight = (text: unknown): Mass => D(String(text)) as Mass;
