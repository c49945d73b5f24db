import { AppError, type FigureRef, type Workings } from '@brakeven/contract';
import { RULES } from '@brakeven/costing';
import {
  type CostItemRow,
  findCostItem,
  listOutlayItemRows,
  type PaybackMachine,
  type ShopTransaction,
  sumOutlayItems,
} from '@brakeven/database';
import { formatLocalDate, todayIn, toLocalDate } from '@brakeven/values';
import { type ShopContext } from '../context';
import { readItemWorkings } from './item-workings';
import { type LinePaging, refused, toInput } from './workings-request';

/** What a machine cost, item by item; each of them opens. */
export function readOutlay(
  trx: ShopTransaction,
  { machineId, name }: PaybackMachine,
  paging: LinePaging,
): Promise<Workings> {
  return readItemWorkings(
    { figure: { figure: 'payback.outlay', machineId }, title: `Outlay for ${name}`, rule: RULES.outlay },
    {
      sum: () => sumOutlayItems(trx, machineId),
      list: (after, limit) => listOutlayItemRows(trx, machineId, after, limit),
      toFigure: ({ id }) => ({ figure: 'payback.costItem', machineId, costItemId: id }),
    },
    paging,
  );
}

/**
 * One cost item: what it was for, when it was paid, and who wrote it down.
 * @throws AppError `invalid_input` without an item, `not_found`
 */
export async function readCostItem(
  { shop }: ShopContext,
  trx: ShopTransaction,
  machine: PaybackMachine,
  ref: FigureRef,
): Promise<Workings> {
  const { costItemId } = ref;
  if (costItemId === undefined) throw refused('costItemId', 'Say which cost item is meant.');
  const item = await findCostItem(trx, machine.machineId, costItemId);
  if (!item) throw new AppError('not_found', 'There is no such cost item on this machine.');
  const head = {
    figure: { figure: 'payback.costItem' as const, machineId: machine.machineId, costItemId },
    title: `${toSentenceCase(item.kind)} of ${machine.name}`,
    rule: 'The amount paid, as entered on the machine.',
  };
  const rows = [toItemRow(item)];
  const workings = await readItemWorkings(
    head,
    { sum: async () => ({ lines: 1, amount: item.amount }), list: async () => rows },
    { list: 'workings.payback.costItem', cursor: undefined, limit: 1 },
  );
  return { ...workings, inputs: toInputs(item, shop.timeZone) };
}

function toItemRow({ machineCostItemId, incurredOn, kind, description, amount }: CostItemRow) {
  const label = description || kind;
  return { id: machineCostItemId, on: incurredOn, category: kind, label, job: null, amount };
}

function toInputs(item: CostItemRow, timeZone: string): Workings['inputs'] {
  const { kind, description, incurredOn, enteredAt, enteredBy } = item;
  const entered =
    enteredAt === null
      ? []
      : [`${enteredBy ?? 'somebody'}, ${formatLocalDate(todayIn(timeZone, enteredAt))}`];
  return [
    toInput('Kind', kind),
    ...(description === '' ? [] : [toInput('Description', description)]),
    toInput('Paid on', formatLocalDate(toLocalDate(incurredOn))),
    ...entered.map((words) => toInput('Entered by', words)),
  ];
}

function toSentenceCase(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}
