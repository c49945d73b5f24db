import { type FigureRef } from '@brakeven/contract';
import { endOfMonth, startOfMonth, toLocalDate } from '@brakeven/values';

/** A figure of a machine's payback, over all its days. */
export function toPaybackRef(figure: FigureRef['figure'], machineId: string): FigureRef {
  return { figure, machineId };
}

/** The same figure, of one month. */
export function toMonthRef(figure: FigureRef['figure'], machineId: string, month: string): FigureRef {
  const first = toLocalDate(`${month}-01`);
  return { figure, machineId, from: startOfMonth(first), to: endOfMonth(first) };
}

/** The net cash that a machine's curve has on a day. */
export function toNetCashRef(machineId: string, to: string): FigureRef {
  return { figure: 'payback.netCash', machineId, to };
}

/** One of the items that a machine's outlay is made of. */
export function toCostItemRef(machineId: string, costItemId: string): FigureRef {
  return { figure: 'payback.costItem', machineId, costItemId };
}

/** What one job has added to the payback. */
export function toJobShareRef(machineId: string, jobId: string): FigureRef {
  return { figure: 'payback.earnedBack', machineId, jobId };
}
