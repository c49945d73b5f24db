import { type EstimateChoices } from '@brakeven/contract';
import { computeAverageLoadedRate, roundFraction } from '@brakeven/costing';
import {
  findOverheadRateOn,
  listMachineHourRates,
  listOperationRows,
  listStockOn,
  listWagesOn,
  type ShopTransaction,
  type StockRow,
} from '@brakeven/database';
import { D, rateText, toPercent, toRate } from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';

/** What an estimate chooses from, with the rates that hold on a day. */
export function getEstimateChoices(context: ShopContext, { on }: { on: string }): Promise<EstimateChoices> {
  return inShopOf(context, (trx) => readChoices(trx, on));
}

/** Reads the choices of a day; a rate that does not hold then is null, never 0. */
export async function readChoices(trx: ShopTransaction, on: string): Promise<EstimateChoices> {
  const operations = await listOperationRows(trx);
  const machines = await listMachineHourRates(trx, on);
  const materials = await listStockOn(trx, on);
  const wages = await listWagesOn(trx, on);
  const labourRate = computeAverageLoadedRate(
    wages.map((wage) => ({
      wagePerHour: toRate(wage.wagePerHour),
      burdenPercent: toPercent(wage.burdenPercent),
    })),
  );
  return {
    on,
    operations: operations.map(({ operationId, name, defaultMachineId }) => ({
      id: operationId,
      name,
      defaultMachineId,
    })),
    machines: machines.map((machine) => ({ ...machine, machineHourRate: toText(machine.machineHourRate) })),
    materials: materials.map((stock) => ({ id: stock.id, name: stock.name, averagePerKg: toAverage(stock) })),
    labourRate: labourRate && rateText(labourRate),
    overheadRate: toText(await findOverheadRateOn(trx, on)),
  };
}

/** Value ÷ weight in stock, or the last average of what is used up; null if nothing ever came in. */
function toAverage({ balanceKg, balanceAmount, averagePerKg }: StockRow): string | null {
  if (balanceKg === null || balanceAmount === null) return null;
  if (!D(balanceKg).gt(0)) return toText(averagePerKg);
  return rateText(toRate(roundFraction(D(balanceAmount), D(balanceKg), 6)));
}

function toText(rate: string | null): string | null {
  return rate === null ? null : rateText(toRate(rate));
}
