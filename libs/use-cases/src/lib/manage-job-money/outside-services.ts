import {
  AppError,
  type OutsideService,
  type outsideServiceInputSchema,
  type OutsideServiceList,
} from '@brakeven/contract';
import { listOutsideServiceRows, type OutsideServiceRow, type ShopTransaction } from '@brakeven/database';
import { moneyText, sum, toMoney } from '@brakeven/values';
import { type z } from 'zod';
import { changeDatedRows } from '../change-dated-rows';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';

type ServiceValues = z.output<typeof outsideServiceInputSchema>;

const changes = changeDatedRows({
  table: 'outsideService',
  idField: 'outsideServiceId',
  dateField: 'incurredOn',
  fields: { 'before-job': 'incurredOn' },
  conflicts: {},
  noun: 'outside service',
  getParent: getServiceRow,
  toValues: async (trx, { jobId }: { jobId: string }, body: ServiceValues) => {
    await getJobRow(trx, { jobId });
    return { jobId, ...body };
  },
  toItem: (context, outsideServiceId) =>
    inShopOf(context, async (trx) => toOutsideService(await getServiceRow(trx, outsideServiceId))),
});

/** Adds an outside service to a job; refuses a date before the job's or after today. */
export const createOutsideService = changes.create;

/** Corrects an outside service; as `createOutsideService`, and refuses one voided meanwhile. */
export const updateOutsideService = changes.correct;

/** Voids an outside service. */
export const voidOutsideService = changes.void;

/** Takes back the voiding of an outside service; refuses one before the job's opening of now. */
export const restoreOutsideService = changes.restore;

/**
 * Outside services on a job, latest first, those voided among them; the total is of those that count.
 * @throws AppError `not_found` (job)
 */
export function listOutsideServices(
  context: ShopContext,
  { jobId }: { jobId: string },
): Promise<OutsideServiceList> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const rows = await listOutsideServiceRows(trx, { jobId });
    const live = rows.filter(({ voidedAt }) => voidedAt === null);
    return {
      items: rows.map(toOutsideService),
      total: moneyText(sum(live.map(({ amount }) => toMoney(amount)))),
    };
  });
}

async function getServiceRow(trx: ShopTransaction, outsideServiceId: string): Promise<OutsideServiceRow> {
  const [row] = await listOutsideServiceRows(trx, { outsideServiceId });
  if (row) return row;
  throw new AppError('not_found', 'There is no such outside service. Load the page again.');
}

function toOutsideService({ voidedAt, amount, ...row }: OutsideServiceRow): OutsideService {
  return { ...row, amount: moneyText(toMoney(amount)), voidedAt: voidedAt?.toISOString() ?? null };
}
