import { type SetupSheet } from '@brakeven/contract';
import { type DatedTable } from '@brakeven/database';
import { formatLocalDate, type LocalDate } from '@brakeven/values';
import { type SetupFile, type SetupRowSource } from '@brakeven/workbook';
import { toRefusalWords } from '../refuse-rows';
import { type SetupDraft } from './setup-draft';

/** The date of a row: in which column it stands, and in which table it is kept. */
export interface DatedCell {
  list: SetupSheet;
  column: string;
  table: Exclude<DatedTable, 'job'>;
  date: LocalDate;
}

/** Whether a row on a job may have its date: not to come, and not before the job was opened; else refused in words. */
export function checkJobDate(
  draft: SetupDraft,
  row: SetupRowSource,
  jobId: string,
  { list, column, table, date }: DatedCell,
): boolean {
  if (!checkPast(draft, row, { list, column, date })) return false;
  const job = draft.tables.job.get(jobId)?.values;
  const openedOn = job?.['openedOn'];
  if (!job || typeof openedOn !== 'string' || date >= openedOn) return true;
  const refusal = { kind: 'before-job', job: String(job['number']), openedOn, on: date, table } as const;
  const message = toRefusalWords(refusal, draft.surroundings.units);
  draft.refuse(list, row, column, { code: 'before_job', message });
  return false;
}

/** Whether a date is not still to come; else refused in words. */
export function checkPast(
  draft: SetupDraft,
  row: SetupRowSource,
  { list, column, date }: Pick<DatedCell, 'list' | 'column' | 'date'>,
): boolean {
  const { today } = draft.surroundings;
  if (date <= today) return true;
  const message = `${formatLocalDate(date)} is still to come. Date this today, ${formatLocalDate(today)}, or before.`;
  draft.refuse(list, row, column, { code: 'after_today', message });
  return false;
}

const DATED = [
  ['materialIssue', 'issuedOn'],
  ['outsideService', 'incurredOn'],
  ['invoice', 'invoicedOn'],
] as const;

/** Refuses that a job is opened after rows that the shop has on it. To be asked before new rows are planned. */
export function checkOpenings(draft: SetupDraft, rows: SetupFile['jobs']): void {
  const earliest = new Map<string, string>();
  for (const [table, column] of DATED)
    for (const { values } of draft.tables[table].listRows()) {
      const jobId = String(values['jobId']);
      const date = String(values[column]);
      if (date < (earliest.get(jobId) ?? '9999')) earliest.set(jobId, date);
    }
  for (const row of rows) {
    const on = earliest.get(draft.tables.job.findId(row.number) ?? '');
    if (row.openedOn === null || on === undefined || on >= row.openedOn) continue;
    const refusal = {
      kind: 'before-job',
      job: row.number,
      openedOn: row.openedOn,
      on,
      table: 'job',
    } as const;
    const message = toRefusalWords(refusal, draft.surroundings.units);
    draft.refuse('jobs', row, 'openedOn', { code: 'before_job', message });
  }
}
