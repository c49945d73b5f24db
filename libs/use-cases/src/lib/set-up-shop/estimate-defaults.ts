import {
  computeAverageLoadedRate,
  computeMovingAverage,
  findValidOn,
  roundFraction,
  type StockLedger,
} from '@brakeven/costing';
import { type RegisterRow, type RegisterTable } from '@brakeven/database';
import { toLocalDate, toPercent, toRate } from '@brakeven/values';
import { groupBy } from '../group-by';
import { listStockMoves } from './check-stock';
import { type SetupDraft } from './setup-draft';

/** Rates and prices that an estimate takes where it states none: those of its day, as the workbook leaves the shop. */
export class EstimateDefaults {
  private readonly ledgers = new Map<string, StockLedger>();

  constructor(private readonly draft: SetupDraft) {}

  /** Average wage with burden of those who work here; null if nobody has a wage on that day. */
  labourRate(on: string): string | null {
    const active = this.draft.tables.employee.listRows().filter(({ values }) => values['isActive'] === true);
    const rates = groupBy(this.draft.tables.payRate.listRows(), ({ values }) => values['employeeId']);
    const valid = active.flatMap(({ id }) => this.findValid(rates.get(id) ?? [], on) ?? []);
    const average = computeAverageLoadedRate(
      valid.map(({ values }) => ({
        wagePerHour: toRate(String(values['wagePerHour'])),
        burdenPercent: toPercent(String(values['burdenPercent'])),
      })),
    );
    return average && average.toFixed(6);
  }

  /** A machine's rate of that day; null before its first. */
  machineHourRate(machineId: string, on: string): string | null {
    return this.findRate(
      'machineRate',
      'machineHourRate',
      on,
      ({ values }) => values['machineId'] === machineId,
    );
  }

  /** The overhead rate of that day; null before the first. */
  overheadRate(on: string): string | null {
    return this.findRate('overheadRate', 'ratePerLabourHour', on, () => true);
  }

  /** What a kilogram in stock is worth on that day, or was before it was used up; null if none ever came in. */
  pricePerKg(materialId: string, on: string): string | null {
    const ledger =
      this.ledgers.get(materialId) ?? computeMovingAverage(listStockMoves(this.draft, materialId));
    this.ledgers.set(materialId, ledger);
    if (!ledger.ok) return null;
    const last = ledger.moves.filter(({ move }) => move.movedOn <= on).at(-1);
    if (!last) return null;
    const average = last.balanceWeight.gt(0)
      ? toRate(roundFraction(last.balanceAmount, last.balanceWeight, 6))
      : last.averagePerKg;
    return average.toFixed(6);
  }

  private findRate(
    table: RegisterTable,
    column: string,
    on: string,
    isMeant: (row: RegisterRow) => boolean,
  ): string | null {
    const valid = this.findValid(this.draft.tables[table].listRows().filter(isMeant), on);
    return valid ? String(valid.values[column]) : null;
  }

  private findValid(rows: readonly RegisterRow[], on: string): RegisterRow | undefined {
    const dated = rows.map((row) => ({ validFrom: toLocalDate(String(row.values['validFrom'])), row }));
    return findValidOn(dated, toLocalDate(on))?.row;
  }
}
