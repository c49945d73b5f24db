import { type LocalDate } from '@brakeven/values';
import { type CostedEntry, computeEntryLines, type RateBook, type RateGap } from './entry-lines';
import { computeMovingAverage, type StockMove, toMaterialLine, type ValuedMove } from './moving-average';
import { computeOvertimeLines, type OvertimeRule } from './overtime';
import {
  computePostings,
  type CostSource,
  findPostedMaterial,
  findPostedOvertime,
  netFrozenLines,
  type PostedLine,
  type Postings,
} from './post-lines';
import {
  type Invoice,
  type OutsideService,
  type SourceLine,
  toInvoiceLine,
  toOutsideLine,
  toSourceLine,
} from './source-line';

/** A row, and whether it still stands. */
export type Voidable<Row> = Row & { isLive: boolean };

/** Every row of a shop that costs are made of, voided ones too, and what the books hold of them. */
export interface ShopRows {
  entries: readonly Voidable<CostedEntry>[];
  /** The moves of each material. */
  stock: readonly (readonly Voidable<StockMove>[])[];
  outsideServices: readonly Voidable<OutsideService>[];
  invoices: readonly Voidable<Invoice>[];
  book: RateBook;
  overtime: OvertimeRule;
  stored: readonly PostedLine[];
  closedThrough: LocalDate | null;
}

/**
 * All lines and gaps of the open days of a shop: the reference of the rollup. See `computePostings` for what closed
 * months mean, and `computeEntryLines`, `computeOvertimeLines`, `computeMovingAverage` for the amounts.
 * @throws Error if a stock does not cover its moves; what would make it so is refused when it is entered.
 */
export function computeShopPostings(rows: ShopRows): Postings {
  const frozen = netFrozenLines(rows.stored, rows.closedThrough);
  const sources = [
    ...toEntrySources(rows, findPostedOvertime(frozen)),
    ...rows.stock.flatMap((moves) => toIssueSources(moves, findPostedMaterial(frozen))),
    ...rows.outsideServices.map((row) => toSource(row.isLive, toOutsideLine(row))),
    ...rows.invoices.map((row) => toSource(row.isLive, toInvoiceLine(row))),
  ];
  return computePostings({ sources, stored: rows.stored, closedThrough: rows.closedThrough });
}

function toEntrySources(
  { entries, book, overtime }: ShopRows,
  posted: ReturnType<typeof findPostedOvertime>,
): CostSource[] {
  const live = entries.filter((entry) => entry.isLive);
  const ofWeeks = computeOvertimeLines(live, book, overtime, posted);
  const premiums = new Map(ofWeeks.lines.map((line) => [line.sourceId, line]));
  const missing = new Map(ofWeeks.gaps.map((gap) => [gap.entryId, gap]));
  return entries.map((entry) => {
    const { lines, gaps } = computeEntryLines(entry, book);
    const [premium, gap] = [premiums.get(entry.entryId), missing.get(entry.entryId)];
    return {
      sourceId: entry.entryId,
      isLive: entry.isLive,
      lines: withOptional(lines.map(toSourceLine), premium),
      gaps: withOptional<RateGap>(gaps, gap),
    };
  });
}

function toIssueSources(
  moves: readonly Voidable<StockMove>[],
  posted: ReturnType<typeof findPostedMaterial>,
): CostSource[] {
  const live = moves
    .filter((move) => move.isLive)
    .map((move) => (move.kind === 'lot' ? move : { ...move, postedAmount: posted.get(move.moveId) }));
  const valued = new Map(valueMoves(live).map((value) => [value.move.moveId, value]));
  return moves.flatMap((move) => {
    if (move.kind === 'lot') return [];
    const value = valued.get(move.moveId);
    const line = value && toMaterialLine(value);
    return [{ sourceId: move.moveId, isLive: move.isLive, lines: line ? [line] : [] }];
  });
}

function valueMoves(moves: readonly StockMove[]): ValuedMove[] {
  const ledger = computeMovingAverage(moves);
  if (ledger.ok) return ledger.moves;
  const { move, of } = ledger.shortage;
  throw new Error(`The ${of} on ${move.movedOn} (${move.moveId}) is not covered.`);
}

function toSource(isLive: boolean, line: SourceLine): CostSource {
  return { sourceId: line.sourceId, isLive, lines: [line] };
}

function withOptional<T>(items: readonly T[], item: T | undefined): T[] {
  return item === undefined ? [...items] : [...items, item];
}
