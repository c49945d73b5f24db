import {
  AppError,
  type JobMaterialList,
  type MaterialIssue,
  type materialIssueInputSchema,
} from '@brakeven/contract';
import {
  type DatedRowValues,
  listMaterialIssueRows,
  type MaterialIssueRow,
  type ShopTransaction,
} from '@brakeven/database';
import { D, moneyText, rateText, sum, toMoney, toRate } from '@brakeven/values';
import { type z } from 'zod';
import { changeDatedRows, type ChangeTools } from '../change-dated-rows';
import { inShopOf, type ShopContext } from '../context';
import { toPlainText } from '../quantity-text';
import { getJobRow } from '../show-jobs/get-job';
import { getMaterialRow, seesMaterialMoney } from './materials';
import { computeStockWeight } from './stock-weight';

type IssueValues = z.output<typeof materialIssueInputSchema>;

const changes = changeDatedRows({
  table: 'materialIssue',
  idField: 'issueId',
  dateField: 'issuedOn',
  fields: { stock: 'weightKg', return: 'weightKg', 'before-job': 'issuedOn' },
  conflicts: {
    material_issue_shop_id_job_id_fkey: { field: 'jobId', message: 'There is no such job.' },
    material_issue_shop_id_material_id_fkey: { field: 'materialId', message: 'There is no such material.' },
    material_issue_weight_kg_check: { field: 'weightKg', message: 'Must be more than 0.' },
  },
  noun: 'issue',
  // Job and material stand in the body: a correction may name others.
  getParent: async () => null,
  toValues: (trx, _none: null, body: IssueValues) => toIssueValues(trx, body),
  toItem: readIssue,
});

/**
 * Issues material to a job, or takes it back; the job bears it at the average of its moment.
 * @throws AppError `invalid_input` (no such job or material, dated before the job, no weight), `conflict` (the stock
 *   does not cover it, more returned than drawn)
 */
export function createMaterialIssue(
  context: ShopContext,
  body: IssueValues,
  tools?: ChangeTools,
): Promise<MaterialIssue> {
  return changes.create(context, null, body, tools);
}

/** Corrects an issue or a return; as `createMaterialIssue`, and refuses one voided meanwhile. */
export const updateMaterialIssue = changes.correct;

/** Voids an issue or a return; refuses one that a later return gives back from, or a later issue draws from. */
export const voidMaterialIssue = changes.void;

/** Takes back the voiding of an issue or a return; refuses what the stock no longer covers. */
export const restoreMaterialIssue = changes.restore;

/**
 * What a job drew and gave back, latest first, those voided among them; weight and total of those that count.
 * @throws AppError `not_found` (job)
 */
export function listJobMaterial(
  context: ShopContext,
  { jobId }: { jobId: string },
): Promise<JobMaterialList> {
  return inShopOf(context, async (trx) => {
    await getJobRow(trx, { jobId });
    const rows = await listMaterialIssueRows(trx, { jobId });
    const live = rows.filter(({ voidedAt }) => voidedAt === null);
    const weights = live.map(({ kind, weightKg }) => D(weightKg).times(kind === 'return' ? -1 : 1));
    const total = moneyText(toMoney(sum(live.map(({ moveAmount }) => D(moveAmount ?? '0'))).negated()));
    return {
      items: rows.map((row) => toMaterialIssue(context, row)),
      weightKg: sum(weights).toFixed(),
      ...(seesMaterialMoney(context) ? { total } : {}),
    };
  });
}

function readIssue(context: ShopContext, issueId: string): Promise<MaterialIssue> {
  return inShopOf(context, async (trx) => {
    const [row] = await listMaterialIssueRows(trx, { issueId });
    if (!row) throw new AppError('not_found', 'There is no such issue. Load the page again.');
    return toMaterialIssue(context, row);
  });
}

async function toIssueValues(
  trx: ShopTransaction,
  body: IssueValues,
): Promise<DatedRowValues<'materialIssue'>> {
  const material = await getMaterialRow(trx, { materialId: body.materialId });
  const weightKg = computeStockWeight(material, {
    weightKg: body.weightKg,
    count: body.sheets ?? body.pieces,
    lengthMm: body.blankLengthMm,
    widthMm: body.blankWidthMm,
  });
  return { ...body, note: body.note === '' ? null : body.note, weightKg };
}

function toMaterialIssue(context: ShopContext, row: MaterialIssueRow): MaterialIssue {
  const { moveAmount, averagePerKg } = row;
  return {
    issueId: row.issueId,
    jobId: row.jobId,
    materialId: row.materialId,
    material: row.material,
    kind: row.kind,
    issuedOn: row.issuedOn,
    sheets: row.sheets,
    pieces: row.pieces,
    blankLengthMm: toPlainText(row.blankLengthMm),
    blankWidthMm: toPlainText(row.blankWidthMm),
    weightKg: toPlainText(row.weightKg),
    ...(seesMaterialMoney(context)
      ? {
          averagePerKg: averagePerKg && rateText(toRate(averagePerKg)),
          amount: moveAmount && moneyText(toMoney(D(moveAmount).negated())),
        }
      : {}),
    note: row.note,
    voidedAt: row.voidedAt?.toISOString() ?? null,
    voidedBy: row.voidedBy,
  };
}
