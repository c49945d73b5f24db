import { type RegisterRow, type RegisterValue, type RegisterValues } from '@brakeven/database';
import { D } from '@brakeven/values';
import { type SetupFile } from '@brakeven/workbook';
import { v7 as newId } from 'uuid';
import { groupBy } from '../group-by';
import { EstimateDefaults } from './estimate-defaults';
import { type EstimateRow, toEstimateLine } from './estimate-line';
import { type SetupDraft } from './setup-draft';
import { toStoredNumber } from './stored-number';
import { type Verdict } from './table-plan';

/**
 * Estimates, one a job: the rows of a job are the lines of its estimate, in their order. One that differs from the
 * shop's is replaced whole.
 */
export function planEstimates(draft: SetupDraft, rows: SetupFile['estimates']): void {
  const defaults = new EstimateDefaults(draft);
  const placed = rows.map((row) => ({ row, jobId: draft.findJob('estimates', row, row.job) }));
  for (const [jobId, ofJob] of groupBy(placed, (one) => one.jobId)) {
    const lines = ofJob.map(({ row }) => row);
    const verdict = jobId === undefined ? null : planEstimate(draft, defaults, jobId, lines);
    if (verdict) lines.forEach(() => draft.count('estimates', verdict));
  }
}

/** Null if something of the estimate is refused. */
function planEstimate(
  draft: SetupDraft,
  defaults: EstimateDefaults,
  jobId: string,
  rows: readonly EstimateRow[],
): Verdict | null {
  const { estimate, estimateLine } = draft.tables;
  const before = estimate.get(jobId);
  const head = toHead(draft, rows, before?.values);
  if (!head) return null;
  const stored = estimateLine
    .listRows()
    .filter(({ values }) => values['jobId'] === jobId)
    .sort((a, b) => Number(a.values['position']) - Number(b.values['position']));
  const job = draft.tables.job.get(jobId)?.values;
  const lines = rows.map((row, index) => {
    const kept = stored[index]?.values;
    const isSameDay = before?.values['estimatedOn'] === head['estimatedOn'];
    const on = String(head['estimatedOn']);
    const values = toEstimateLine(draft, row, { defaults, on, job, kept: isSameDay ? kept : undefined });
    return values && { ...values, jobId, position: index + 1 };
  });
  if (lines.some((line) => line === null)) return null;
  const areLinesSame = lines.length === stored.length && lines.every((line, at) => isSame(line, stored[at]));
  if (!areLinesSame) {
    stored.forEach((line) => estimateLine.remove(line));
    lines.forEach((values) => values && estimateLine.add({ id: newId(), values }));
  }
  const { verdict } = before ? estimate.change(before, head) : estimate.add({ id: jobId, values: head });
  return verdict === 'alreadyThere' && !areLinesSame ? 'changed' : verdict;
}

function isSame(line: RegisterValues | null, stored: RegisterRow | undefined): boolean {
  return Object.entries(line ?? {}).every(([name, value]) => stored?.values[name] === value);
}

/** What stands once for the whole estimate, on whichever of its rows; what none states stays as the shop has it. */
function toHead(
  draft: SetupDraft,
  rows: readonly EstimateRow[],
  before: RegisterValues | undefined,
): RegisterValues | null {
  const estimatedOn = findAgreed(draft, rows, 'estimatedOn', ({ estimatedOn }) => estimatedOn);
  const scrapAllowancePercent = findPercent(draft, rows, 'scrapAllowancePercent', 'at most 100', (percent) =>
    D(percent).lte(100),
  );
  const marginPercent = findPercent(draft, rows, 'marginPercent', 'below 100', (percent) =>
    D(percent).lt(100),
  );
  if (estimatedOn === undefined || scrapAllowancePercent === undefined || marginPercent === undefined)
    return null;
  const [first] = rows;
  const day = estimatedOn ?? before?.['estimatedOn'] ?? null;
  if (day === null && first) {
    const message = `The estimate of job ${first.job} has no day. Write it under Estimated on, on one of its rows.`;
    draft.refuse('estimates', first, 'estimatedOn', { code: 'cell_missing', message });
    return null;
  }
  return {
    estimatedOn: day,
    scrapAllowancePercent: scrapAllowancePercent ?? before?.['scrapAllowancePercent'] ?? '0.0000',
    marginPercent: marginPercent ?? before?.['marginPercent'] ?? '0.0000',
  };
}

const HEADERS = {
  estimatedOn: 'Estimated on',
  scrapAllowancePercent: 'Scrap allowance %',
  marginPercent: 'Wanted margin %',
} as const;

/** Undefined if refused. */
function findPercent(
  draft: SetupDraft,
  rows: readonly EstimateRow[],
  column: 'scrapAllowancePercent' | 'marginPercent',
  limit: string,
  isWithin: (percent: string) => boolean,
): RegisterValue | undefined {
  const percent = findAgreed(draft, rows, column, (row) =>
    toStoredNumber(draft, row, { list: 'estimates', column, form: 'percent' }, row[column]),
  );
  if (typeof percent !== 'string' || isWithin(percent)) return percent;
  const row = rows.find((one) => one[column] !== null);
  const message = `${HEADERS[column]} must be ${limit}, but ${row?.[column]} stands here.`;
  if (row) draft.refuse('estimates', row, column, { code: 'percent_too_large', message });
  return undefined;
}

/** What the rows state in a column, null if none states anything; undefined if two differ, which is refused. */
function findAgreed(
  draft: SetupDraft,
  rows: readonly EstimateRow[],
  column: keyof typeof HEADERS,
  read: (row: EstimateRow) => string | null,
): string | null | undefined {
  const stated = rows.map((row) => ({ row, value: read(row) })).filter(({ value }) => value !== null);
  const [first] = stated;
  const other = stated.find(({ value }) => value !== first?.value);
  if (!other || !first) return first?.value ?? null;
  const message = `The rows of job ${other.row.job} state two of ${HEADERS[column]}: row ${first.row.row} another than this one. Write it once.`;
  draft.refuse('estimates', other.row, column, { code: 'value_differs', message });
  return undefined;
}
