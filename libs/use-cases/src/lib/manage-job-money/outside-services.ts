import {
  AppError,
  type OutsideService,
  type outsideServiceInputSchema,
  type OutsideServiceList,
} from '@brakeven/contract';
import { listOutsideServiceRows, type OutsideServiceRow, type ShopTransaction } from '@brakeven/database';
import { moneyText, sum, toMoney } from '@brakeven/values';
import { type z } from 'zod';
import {
  addDatedRow,
  type ChangeTools,
  correctDatedRow,
  type DatedRows,
  setVoided,
} from '../change-dated-rows';
import { inShopOf, type ShopContext } from '../context';
import { getJobRow } from '../show-jobs/get-job';

type ServiceValues = z.output<typeof outsideServiceInputSchema>;

const SERVICES: DatedRows<'outsideService'> = {
  table: 'outsideService',
  dateField: 'incurredOn',
  fields: { 'before-job': 'incurredOn' },
  conflicts: {},
  noun: 'outside service',
};

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

/**
 * Adds an outside service to a job.
 * @throws AppError `not_found` (job), `invalid_input` (dated before the job or after today)
 */
export async function createOutsideService(
  context: ShopContext,
  { jobId }: { jobId: string },
  body: ServiceValues,
  tools: ChangeTools = {},
): Promise<OutsideService> {
  const toValues = async (trx: ShopTransaction) => {
    await getJobRow(trx, { jobId });
    return { jobId, ...body };
  };
  return readService(context, await addDatedRow(context, SERVICES, toValues, tools));
}

/**
 * Corrects an outside service: it is voided and another takes its place.
 * @throws AppError `not_found`, `conflict` (voided meanwhile), `invalid_input`
 */
export async function updateOutsideService(
  context: ShopContext,
  { outsideServiceId }: { outsideServiceId: string },
  body: ServiceValues,
  tools: ChangeTools = {},
): Promise<OutsideService> {
  const toValues = async (trx: ShopTransaction) => {
    const { jobId } = await getServiceRow(trx, outsideServiceId);
    return { jobId, ...body };
  };
  return readService(context, await correctDatedRow(context, SERVICES, outsideServiceId, toValues, tools));
}

/**
 * Voids an outside service.
 * @throws AppError `not_found`
 */
export function voidOutsideService(
  context: ShopContext,
  { outsideServiceId }: { outsideServiceId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, SERVICES, { id: outsideServiceId, isVoided: true }, tools);
}

/**
 * Takes back the voiding of an outside service.
 * @throws AppError `not_found`, `invalid_input` (the job is opened after it by now)
 */
export function restoreOutsideService(
  context: ShopContext,
  { outsideServiceId }: { outsideServiceId: string },
  tools: ChangeTools = {},
): Promise<void> {
  return setVoided(context, SERVICES, { id: outsideServiceId, isVoided: false }, tools);
}

function readService(context: ShopContext, outsideServiceId: string): Promise<OutsideService> {
  return inShopOf(context, async (trx) => toOutsideService(await getServiceRow(trx, outsideServiceId)));
}

async function getServiceRow(trx: ShopTransaction, outsideServiceId: string): Promise<OutsideServiceRow> {
  const [row] = await listOutsideServiceRows(trx, { outsideServiceId });
  if (row) return row;
  throw new AppError('not_found', 'There is no such outside service. Load the page again.');
}

function toOutsideService({ voidedAt, amount, ...row }: OutsideServiceRow): OutsideService {
  return { ...row, amount: moneyText(toMoney(amount)), voidedAt: voidedAt?.toISOString() ?? null };
}
