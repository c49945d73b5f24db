import { hasPermission, type Job, type JobCostFigures, type JobFigures } from '@brakeven/contract';
import { type JobFigureColumns, type JobRow, type JobSums } from '@brakeven/database';
import { type ShopContext } from '../context';

/** Whether the actor sees money on jobs. */
export function seesMoney({ actor }: ShopContext): boolean {
  return hasPermission(actor.role, 'jobs.money');
}

/** What work has cost as it is sent: without money to who may not see it. */
export function toJobCost(context: ShopContext, sums: JobSums): JobCostFigures {
  const { hours, machineHours, labour, overtime, machine, overhead, material, outside, total } = sums;
  if (!seesMoney(context)) return { hours, machineHours };
  return { hours, machineHours, labour, overtime, machine, overhead, material, outside, total };
}

/** A job's cost, income and estimate as they are sent: without money to who may not see it. */
export function toJobFigures(context: ShopContext, row: JobFigureColumns): JobFigures {
  const cost = toJobCost(context, row);
  if (!seesMoney(context)) return cost;
  const { invoiced, margin, marginIsProvisional, isToInvoice, workInProgress } = row;
  const { estimate, estimatedHours, variance } = row;
  return {
    ...cost,
    invoiced,
    margin,
    marginIsProvisional,
    isToInvoice,
    workInProgress,
    estimate,
    estimatedHours,
    variance,
  };
}

/** A job as it is sent. */
export function toJob(context: ShopContext, row: JobRow): Job {
  const { jobId, number, customerId, customer, title, quantity, openedOn, dueOn, isBillable, status } = row;
  const { lastWorkedOn, entriesWithoutRate, quotedPrice } = row;
  return {
    jobId,
    number,
    customerId,
    customer,
    title,
    quantity,
    openedOn,
    dueOn,
    isBillable,
    status,
    lastWorkedOn,
    entriesWithoutRate,
    ...(seesMoney(context) ? { quotedPrice } : {}),
    ...toJobFigures(context, row),
  };
}
