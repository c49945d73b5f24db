import { type RegisterRow, type RegisterValues } from '@brakeven/database';
import { type SetupFile } from '@brakeven/workbook';
import { v7 as newId } from 'uuid';
import { groupBy } from '../group-by';
import { checkJobDate } from './dated-rows';
import { type SetupDraft } from './setup-draft';
import { computeSheetWeight, type FlatSize, whyNoWeight } from './sheet-weight';
import { type DecimalColumn, toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

export type IssueRow = SetupFile['issues'][number];

/** A row with what it says; its weight may be worked out from a measure. */
interface StatedIssue {
  row: IssueRow;
  key: string;
  /** Columns whose cells hold something. */
  stated: RegisterValues;
  weightKg: string;
}

const NEW_ISSUE = {
  sheets: null,
  pieces: null,
  blankLengthMm: null,
  blankWidthMm: null,
  note: null,
} as const;
const MEASURE = ['sheets', 'pieces', 'blankLengthMm', 'blankWidthMm'] as const;

/**
 * Issues and returns. Two of one day, job, material and weight are two, so rows are paired with what is stored, those
 * that say the same first. A row without a weight stands for the one with its measure, whatever that weighed then.
 * Answers the rows by the ids of the issues that they stand for.
 */
export function planIssues(draft: SetupDraft, rows: SetupFile['issues']): Map<string, IssueRow> {
  const table = draft.tables.materialIssue;
  const toKey = ({ values }: RegisterRow) =>
    [values['jobId'], values['materialId'], values['issuedOn'], values['kind']].join('|');
  const stored = groupBy(table.listRows(), toKey);
  const planned = new Map<string, IssueRow>();
  const issues = rows.flatMap((row) => toStatedIssue(draft, row) ?? []);
  const pairs = pairIssues(issues, stored);
  for (const issue of issues) {
    const before = pairs.get(issue);
    const { id, verdict } = before
      ? table.change(before, issue.stated)
      : table.add({ id: newId(), values: { ...NEW_ISSUE, ...issue.stated, weightKg: issue.weightKg } });
    planned.set(id, issue.row);
    draft.count('issues', verdict);
  }
  return planned;
}

function pairIssues(
  issues: readonly StatedIssue[],
  stored: ReadonlyMap<string, readonly RegisterRow[]>,
): Map<StatedIssue, RegisterRow> {
  const pairs = new Map<StatedIssue, RegisterRow>();
  const taken = new Set<string>();
  const passes = [isSame, isSameMeasure, isSameWeight];
  for (const isLike of passes)
    for (const issue of issues) {
      if (pairs.has(issue)) continue;
      const like = stored.get(issue.key)?.find((one) => !taken.has(one.id) && isLike(issue, one.values));
      if (!like) continue;
      pairs.set(issue, like);
      taken.add(like.id);
    }
  return pairs;
}

function isSame({ stated }: StatedIssue, values: RegisterValues): boolean {
  return Object.entries(stated).every(([name, value]) => values[name] === value);
}

function isSameMeasure({ stated }: StatedIssue, values: RegisterValues): boolean {
  return !('weightKg' in stated) && MEASURE.every((name) => values[name] === (stated[name] ?? null));
}

function isSameWeight({ weightKg }: StatedIssue, values: RegisterValues): boolean {
  return values['weightKg'] === weightKg;
}

function toStatedIssue(draft: SetupDraft, row: IssueRow): StatedIssue | null {
  const jobId = draft.findJob('issues', row, row.job);
  const materialId = draft.findMaterial('issues', row, row.material);
  if (jobId === undefined || materialId === undefined) return null;
  const dated = { list: 'issues', column: 'date', table: 'material_issue', date: row.date } as const;
  if (!checkJobDate(draft, row, jobId, dated)) return null;
  const decimal = (column: DecimalColumn['column'], form: DecimalColumn['form'], text: string | null) =>
    toStoredNumber(draft, row, { list: 'issues', column, form }, text);
  const stated = listStated({
    jobId,
    materialId,
    issuedOn: row.date,
    kind: row.kind,
    sheets: row.sheets,
    pieces: row.pieces,
    blankLengthMm: decimal('blankLengthMm', 'quantity', row.blankLengthMm),
    blankWidthMm: decimal('blankWidthMm', 'quantity', row.blankWidthMm),
    weightKg: decimal('weightKg', 'weight', row.weightKg),
    note: row.note,
  });
  const weightKg = stated['weightKg'] ?? findWeight(draft, row, stated);
  if (typeof weightKg !== 'string') return null;
  return { row, key: [jobId, materialId, row.date, row.kind].join('|'), stated, weightKg };
}

function findWeight(draft: SetupDraft, row: IssueRow, stated: RegisterValues): string | null {
  if (row.sheets !== null && row.pieces !== null) {
    const message =
      'Sheets and Pieces are both filled in, so that it cannot be told which were weighed. Write the Weight, or empty one of them.';
    draft.refuse('issues', row, 'pieces', { code: 'measure_unclear', message });
    return null;
  }
  const material = draft.tables.material.get(String(stated['materialId']))?.values;
  const size = toSize(draft, row, stated);
  const weight = computeSheetWeight(material, size);
  if (weight !== null) {
    return toStoredNumber(draft, row, { list: 'issues', column: 'pieces', form: 'weight' }, weight);
  }
  const why = whyNoWeight(material, size, 'pieces with the length and width of a blank');
  const message = `This ${row.kind} has no weight. ${why}`;
  draft.refuse('issues', row, 'weightKg', { code: 'weight_missing', message });
  return null;
}

/** Blanks or sheets of the size stated; whole sheets without one are as those of the last lot that was there. */
function toSize(draft: SetupDraft, row: IssueRow, stated: RegisterValues): FlatSize {
  const size = {
    pieces: row.sheets ?? row.pieces,
    lengthMm: stated['blankLengthMm'],
    widthMm: stated['blankWidthMm'],
  };
  if (row.sheets === null || row.blankLengthMm !== null || row.blankWidthMm !== null) return size;
  const lots = draft.tables.sheetLot
    .listRows()
    .filter(({ values }) => values['materialId'] === stated['materialId'] && values['sheetLengthMm'] !== null)
    .filter(({ values }) => String(values['receivedOn']) <= row.date)
    .sort((a, b) => (toLotOrder(a) < toLotOrder(b) ? 1 : -1));
  const last = lots[0]?.values;
  return { ...size, lengthMm: last?.['sheetLengthMm'], widthMm: last?.['sheetWidthMm'] };
}

const toLotOrder = ({ id, values }: RegisterRow): string => `${values['receivedOn']} ${id}`;
