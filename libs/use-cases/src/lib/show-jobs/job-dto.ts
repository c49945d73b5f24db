import { hasPermission, type Job, type JobFigures } from '@brakeven/contract';
import { type JobRow, type JobSums } from '@brakeven/database';
import { type ShopContext } from '../context';

/** Whether the actor sees money on jobs. */
export function seesMoney({ actor }: ShopContext): boolean {
  return hasPermission(actor.role, 'jobs.money');
}

/** A job's sums as they are sent: without money to who may not see it. */
export function toJobFigures(context: ShopContext, sums: JobSums): JobFigures {
  const { hours, machineHours, labour, machine, overhead, total } = sums;
  if (!seesMoney(context)) return { hours, machineHours };
  return { hours, machineHours, labour, machine, overhead, total };
}

/** A job as it is sent. */
export function toJob(context: ShopContext, row: JobRow): Job {
  const { jobId, number, customer, title, quantity, openedOn, dueOn, isBillable, status } = row;
  const { lastWorkedOn, entriesWithoutRate, quotedPrice } = row;
  return {
    jobId,
    number,
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
