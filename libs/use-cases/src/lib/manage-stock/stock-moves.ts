import { type Material, type StockMove, type StockMovePage, type StockMoveQuery } from '@brakeven/contract';
import { listStockLedgerRows, type StockLedgerRow } from '@brakeven/database';
import { moneyText, rateText, toMoney, toRate } from '@brakeven/values';
import { z } from 'zod';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, readCursor, writeCursor } from '../page-cursor';
import { toPlainText } from '../quantity-text';
import { getMaterial, getMaterialRow, seesMaterialMoney } from './materials';

const LEDGER_PAGE = 500;

const movePositionSchema = z.object({
  movedOn: z.iso.date(),
  rank: z.number().int().min(0).max(1),
  sourceId: z.uuid(),
});

/**
 * A page of a material's stock ledger, latest first: every move with its value and the stock after it, or those voided.
 * @throws AppError `not_found` (material), `invalid_input` for a cursor of another list
 */
export async function listStockMoves(
  context: ShopContext,
  query: { materialId: string } & StockMoveQuery,
): Promise<StockMovePage> {
  const { materialId, show, cursor, limit } = query;
  const list = `stock-moves.${show}`;
  const after = readCursor(cursor, list, movePositionSchema);
  return inShopOf(context, async (trx) => {
    await getMaterialRow(trx, { materialId });
    const found = await listStockLedgerRows(trx, materialId, show, after, limit + 1);
    const { rows, nextCursor } = cutPage(found, limit, ({ movedOn, rank, sourceId }) =>
      writeCursor(list, { movedOn, rank, sourceId }),
    );
    return { items: rows.map((row) => toStockMove(context, row)), nextCursor };
  });
}

/**
 * A material by its name, with all moves of its stock in the order in which they count.
 * @throws AppError `not_found`
 */
export async function getStockLedger(
  context: ShopContext,
  name: string,
): Promise<{ material: Material; moves: StockMove[] }> {
  const { materialId } = await inShopOf(context, (trx) => getMaterialRow(trx, { name: name.trim() }));
  const moves: StockMove[] = [];
  let cursor: string | undefined;
  do {
    const page = await listStockMoves(context, { materialId, show: 'all', cursor, limit: LEDGER_PAGE });
    moves.push(...page.items);
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
  return { material: await getMaterial(context, { materialId }), moves: moves.reverse() };
}

function toStockMove(context: ShopContext, row: StockLedgerRow): StockMove {
  const seesMoney = seesMaterialMoney(context);
  return {
    moveId: row.sourceId,
    kind: row.kind,
    movedOn: row.movedOn,
    lot: toLot(row, seesMoney),
    job: toJob(row),
    sheets: row.sheets,
    pieces: row.pieces,
    lengthMm: toPlainText(row.lengthMm),
    widthMm: toPlainText(row.widthMm),
    weightKg: toPlainText(row.weightKg),
    balanceKg: toPlainText(row.balanceKg),
    ...(seesMoney ? toMoveMoney(row) : {}),
    note: row.note,
    voidedAt: row.voidedAt?.toISOString() ?? null,
    voidedBy: row.voidedBy,
  };
}

function toMoveMoney({ amount, averagePerKg, balanceAmount }: StockLedgerRow) {
  return {
    amount: amount && moneyText(toMoney(amount)),
    averagePerKg: averagePerKg && rateText(toRate(averagePerKg)),
    balanceAmount: balanceAmount && moneyText(toMoney(balanceAmount)),
  };
}

function toLot({ lotNumber, vendor, cost, freight }: StockLedgerRow, seesMoney: boolean): StockMove['lot'] {
  if (lotNumber === null) return null;
  const lot = { number: lotNumber, vendor: vendor ?? '' };
  if (!seesMoney || cost === null || freight === null) return lot;
  return { ...lot, cost: moneyText(toMoney(cost)), freight: moneyText(toMoney(freight)) };
}

function toJob({ jobId, jobNumber, jobTitle }: StockLedgerRow): StockMove['job'] {
  if (jobId === null || jobNumber === null) return null;
  return { jobId, number: jobNumber, title: jobTitle ?? '' };
}
