import { type SetupFile } from '@brakeven/workbook';
import { type RegisterRow } from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { groupBy } from '../group-by';
import { normaliseName } from '../import-timesheet/near-matches';
import { type SetupDraft } from './setup-draft';
import { type DecimalColumn, toStoredNumber } from './stored-number';
import { listStated, type TablePlan } from './table-plan';

/** Machines; what a row leaves blank stays as the shop has it. */
export function planMachines(draft: SetupDraft, rows: SetupFile['machines']): void {
  for (const row of rows) {
    if (draft.tables.machine.hasStated(row.code)) {
      draft.refuseTwice('machines', row, 'code', `Machine ${row.code}`);
      continue;
    }
    const stated = listStated({
      name: row.name,
      kind: row.kind,
      inServiceOn: row.inServiceOn,
      ratedForceKn: toQuantity(draft, row, 'ratedForceKn'),
      bedLengthMm: toQuantity(draft, row, 'bedLengthMm'),
    });
    const defaults = {
      code: row.code,
      kind: 'machine',
      inServiceOn: null,
      ratedForceKn: null,
      bedLengthMm: null,
    };
    draft.count('machines', draft.tables.machine.state(row.code, stated, defaults).verdict);
  }
}

/** Rates of machines, one for a machine and day. */
export function planMachineRates(draft: SetupDraft, rows: SetupFile['machineRates']): void {
  for (const row of rows) {
    const machineId = draft.findMachine('machineRates', row, row.machine);
    if (machineId === undefined) continue;
    const key = `${machineId}|${row.validFrom}`;
    if (draft.tables.machineRate.hasStated(key)) {
      draft.refuseTwice('machineRates', row, 'validFrom', `A rate of ${row.machine} from ${row.validFrom}`);
      continue;
    }
    const toRate = (column: 'machineHourRate' | 'chargeOutRate' | 'runningCostPerHour') =>
      toStoredNumber(draft, row, { list: 'machineRates', column, form: 'rate' }, row[column]);
    const values = {
      machineId,
      validFrom: row.validFrom,
      machineHourRate: toRate('machineHourRate'),
      chargeOutRate: toRate('chargeOutRate'),
      runningCostPerHour: toRate('runningCostPerHour'),
    };
    draft.count('machineRates', draft.tables.machineRate.state(key, values).verdict);
  }
}

/** An operation's machine is the default for entries that name none. */
export function planOperations(draft: SetupDraft, rows: SetupFile['operations']): void {
  for (const row of rows) {
    if (draft.tables.operation.hasStated(row.code)) {
      draft.refuseTwice('operations', row, 'code', `Operation ${row.code}`);
      continue;
    }
    const defaultMachineId = row.machine === null ? null : draft.findMachine('operations', row, row.machine);
    if (defaultMachineId === undefined) continue;
    const stated = listStated({ name: row.name, defaultMachineId });
    const defaults = { code: row.code, defaultMachineId: null };
    draft.count('operations', draft.tables.operation.state(row.code, stated, defaults).verdict);
  }
}

interface StatedCost {
  key: string;
  values: RegisterRow['values'];
}

/**
 * Costs of machines. Two payments of one day, kind and description are two costs, so rows are paired with what is
 * stored: those of equal amount first, then in order, where the amount has changed; what is left over is new.
 */
export function planMachineCosts(draft: SetupDraft, rows: SetupFile['machineCosts']): void {
  const table = draft.tables.machineCostItem;
  const stored = groupBy(table.listRows(), ({ values }) => toCostKey(values));
  const stated = rows.flatMap((row) => toStatedCost(draft, row) ?? []);
  for (const [key, costs] of groupBy(stated, (cost) => cost.key)) {
    planLikeCosts(draft, table, costs, [...(stored.get(key) ?? [])]);
  }
}

function planLikeCosts(
  draft: SetupDraft,
  table: TablePlan,
  costs: readonly StatedCost[],
  stored: RegisterRow[],
): void {
  const unpaired = costs.filter(({ values }) => {
    const index = stored.findIndex((one) => one.values['amount'] === values['amount']);
    if (index === -1) return true;
    stored.splice(index, 1);
    draft.count('machineCosts', 'alreadyThere');
    return false;
  });
  for (const { values } of unpaired) {
    const before = stored.shift();
    const { verdict } = before
      ? table.change(before, { amount: values['amount'] ?? null })
      : table.add({ id: newId(), values });
    draft.count('machineCosts', verdict);
  }
}

function toStatedCost(draft: SetupDraft, row: SetupFile['machineCosts'][number]): StatedCost | null {
  const machineId = draft.findMachine('machineCosts', row, row.machine);
  const money = { list: 'machineCosts', column: 'amount', form: 'money' } as const;
  const amount = toStoredNumber(draft, row, money, row.amount);
  if (machineId === undefined || amount === null) return null;
  const values = {
    machineId,
    incurredOn: row.date,
    kind: row.kind,
    description: row.description ?? '',
    amount,
  };
  return { key: toCostKey(values), values };
}

function toCostKey({ machineId, incurredOn, kind, description }: RegisterRow['values']): string {
  return [machineId, incurredOn, kind, normaliseName(String(description))].join('|');
}

function toQuantity(
  draft: SetupDraft,
  row: SetupFile['machines'][number],
  column: 'ratedForceKn' | 'bedLengthMm',
): string | null {
  const decimal: DecimalColumn = { list: 'machines', column, form: 'quantity' };
  return toStoredNumber(draft, row, decimal, row[column]);
}
