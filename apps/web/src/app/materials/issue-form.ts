import { FormGroup, Validators } from '@angular/forms';
import { type IssueKind, type Material, type MaterialIssueInput } from '@brakeven/contract';
import { parseLength, parseMass, type UnitSystem } from '@brakeven/values';
import { moreThanNought } from '../forms/more-than-nought';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { parsePieces } from '../jobs/job-form';
import { LENGTH_UNITS, toLengthText, toMillimetres } from '../machines/quantity-text';
import { findFlatWeight } from './flat-weight';
import { MASS_UNITS, toKilograms, toMassFieldText } from './stock-text';

/** An issue or a return as the job's page and the ledger both know it. */
export interface IssueRow {
  issueId: string;
  jobId: string;
  materialId: string;
  kind: IssueKind;
  issuedOn: string;
  sheets: number | null;
  pieces: number | null;
  lengthMm: string | null;
  widthMm: string | null;
  /** Above 0 for both. */
  weightKg: string;
  note: string | null;
}

/** By what a movement is measured. */
export const MEASURES = ['pieces', 'sheets', 'weight'] as const;
export type Measure = (typeof MEASURES)[number];

/** What a dialog starts with. */
export interface IssueStart {
  /** Null for a new one. */
  issue: IssueRow | null;
  kind: IssueKind;
  jobId: string;
  materialId: string;
  today: string;
  units: UnitSystem;
}

/** The fields of an issue or a return as they are typed. */
export function toIssueForm({ issue, kind, jobId, materialId, today, units }: IssueStart) {
  const length = parsedBy(moreThanNought((text) => parseLength(text, LENGTH_UNITS[units])));
  return new FormGroup({
    kind: textControl(issue?.kind ?? kind, Validators.required),
    jobId: textControl(issue?.jobId ?? jobId, Validators.required),
    materialId: textControl(issue?.materialId ?? materialId, Validators.required),
    issuedOn: textControl(issue?.issuedOn ?? today, Validators.required),
    measure: textControl(findMeasure(issue), Validators.required),
    count: textControl((issue?.sheets ?? issue?.pieces)?.toString(), parsedBy(parsePieces)),
    blankLengthMm: textControl(toLengthText(issue?.lengthMm ?? null, units), length),
    blankWidthMm: textControl(toLengthText(issue?.widthMm ?? null, units), length),
    weightKg: textControl(
      findMeasure(issue) === 'weight' ? toMassFieldText(issue?.weightKg ?? null, units) : '',
      parsedBy(moreThanNought((text) => parseMass(text, MASS_UNITS[units]))),
    ),
    note: textControl(issue?.note, Validators.maxLength(300)),
  });
}

export type IssueForm = ReturnType<typeof toIssueForm>;

function findMeasure(issue: IssueRow | null): Measure {
  if (!issue) return 'pieces';
  if (issue.sheets !== null) return 'sheets';
  return issue.pieces === null ? 'weight' : 'pieces';
}

/** What the server takes: only what belongs to the way it is measured. */
export function toIssueInput(form: IssueForm, { issue, units }: IssueStart): MaterialIssueInput {
  const value = form.getRawValue();
  const measure = value.measure as Measure;
  const { count, lengthMm, widthMm } = readSize(form, issue, units);
  const isByWeight = measure === 'weight';
  return {
    jobId: value.jobId,
    materialId: value.materialId,
    kind: value.kind as IssueKind,
    issuedOn: value.issuedOn,
    sheets: measure === 'sheets' ? count : null,
    pieces: measure === 'pieces' ? count : null,
    blankLengthMm: isByWeight ? null : lengthMm,
    blankWidthMm: isByWeight ? null : widthMm,
    weightKg: isByWeight ? toKilograms(value.weightKg, units, issue?.weightKg ?? null) : null,
    note: value.note.trim() || null,
  };
}

/** The weight that would go in, kilograms; null as long as something is missing. */
export function previewIssueWeight(
  form: IssueForm,
  material: Material | undefined,
  { issue, units }: IssueStart,
): string | null {
  const { measure, weightKg } = form.getRawValue();
  if (measure === 'weight') return toKilograms(weightKg, units, issue?.weightKg ?? null);
  return findFlatWeight(material, readSize(form, issue, units));
}

function readSize(form: IssueForm, issue: IssueRow | null, units: UnitSystem) {
  const value = form.getRawValue();
  const count = parsePieces(value.count);
  return {
    count: count.ok ? count.value : null,
    lengthMm: toMillimetres(value.blankLengthMm, units, issue?.lengthMm ?? null),
    widthMm: toMillimetres(value.blankWidthMm, units, issue?.widthMm ?? null),
  };
}
