import { type MaterialIssue, type StockMove } from '@brakeven/contract';
import { D } from '@brakeven/values';
import { type IssueRow } from './issue-form';

/** A row of the ledger as the dialog takes it; null for a lot. */
export function toIssueRow(move: StockMove, materialId: string): IssueRow | null {
  const { moveId, kind, job, movedOn, sheets, pieces, lengthMm, widthMm, weightKg, note } = move;
  if (kind === 'lot' || job === null) return null;
  return {
    issueId: moveId,
    jobId: job.jobId,
    materialId,
    kind,
    issuedOn: movedOn,
    sheets,
    pieces,
    lengthMm,
    widthMm,
    weightKg: D(weightKg).abs().toFixed(),
    note,
  };
}

/** A row of the job's page likewise. */
export function fromJobIssue({ blankLengthMm, blankWidthMm, ...issue }: MaterialIssue): IssueRow {
  return { ...issue, lengthMm: blankLengthMm, widthMm: blankWidthMm };
}
