import { computePayback, PACE_DAYS_MAX, type PaybackDay } from '@brakeven/costing';
import {
  findReachedOn,
  listMachineCostItemRows,
  listMachineRows,
  listRecentMachineDays,
  type MachineDayRow,
  replacePaybackSnapshots,
  type ShopTransaction,
} from '@brakeven/database';
import { addDays, D, type LocalDate, moneyText, sum, toLocalDate, toMoney } from '@brakeven/values';

interface SnapshotRun {
  shopId: string;
  runId: string;
  through: string;
}

/** Keeps how far each machine in service had paid itself back through the day that this run reached. */
export async function writeSnapshots(trx: ShopTransaction, run: SnapshotRun): Promise<void> {
  const asOf = toLocalDate(run.through);
  const paceFrom = addDays(asOf, 1 - PACE_DAYS_MAX);
  const machines = await listMachineRows(trx);
  const costItems = await listMachineCostItemRows(trx);
  const days = await listRecentMachineDays(trx, paceFrom, run.through);
  const rows = [];
  for (const { machineId, inServiceOn } of machines) {
    if (inServiceOn === null || inServiceOn > asOf) continue;
    const amounts = costItems.filter((item) => item.machineId === machineId).map((item) => D(item.amount));
    const outlay = toMoney(sum(amounts));
    const payback = computePayback({
      outlay,
      days: days.filter((day) => day.machineId === machineId).map(toPaybackDay),
      asOf,
      inServiceOn: toLocalDate(inServiceOn),
    });
    rows.push({
      shopId: run.shopId,
      machineId,
      asOf,
      basis: 'charge-out',
      outlay: moneyText(outlay),
      earned: moneyText(payback.earned),
      operatorLabour: moneyText(payback.operatorLabour),
      running: moneyText(payback.running),
      breakEvenOn: await refineDate(trx, machineId, payback, paceFrom),
      breakEvenMethod: payback.breakEven.method,
      runId: run.runId,
    });
  }
  await replacePaybackSnapshots(trx, asOf, rows);
}

/** A row of sums as costing takes it. */
export function toPaybackDay(row: Omit<MachineDayRow, 'machineId'>): PaybackDay {
  return {
    workedOn: toLocalDate(row.postedOn),
    earned: toMoney(row.earned),
    operatorLabour: toMoney(row.operatorLabour),
    running: toMoney(row.running),
  };
}

/** Days before the pace window came as one; if the outlay was reached among them, the day itself is looked up. */
async function refineDate(
  trx: ShopTransaction,
  machineId: string,
  { breakEven, outlay }: ReturnType<typeof computePayback>,
  paceFrom: LocalDate,
): Promise<string | null> {
  if (breakEven.date === null || breakEven.method !== 'reached') return breakEven.date;
  return breakEven.date < paceFrom ? findReachedOn(trx, machineId, moneyText(outlay)) : breakEven.date;
}
