import { FormControl, FormGroup, Validators } from '@angular/forms';
import { type PressRun, type PressRunInput } from '@brakeven/contract';
import { type BendForce, checkForceInput, computeBendForce } from '@brakeven/forming';
import { textControl } from '../../forms/text-control';
import { toForceText, toKilonewtons } from '../../machines/quantity-text';
import { FieldReader } from '../field-reader';
import { readWith, toMmText } from '../field-validator';
import { findMaterialOf, type FitFacts } from '../fit/fit-question';
import { toSizeText } from '../forming-words';

/** Reads a whole number of pieces or strokes; null if it is none. */
export function readCount(text: string): number | null {
  return /^\s*\d{1,7}\s*$/.test(text) ? Number(text) : null;
}

/** The fields of a run as they are typed: empty for a new one, filled with the run that is to be corrected. */
export function toRunForm(facts: FitFacts, today: string, run: PressRun | null) {
  const reader = () => new FieldReader(facts.units, facts.gauges);
  const first = facts.presses.find(({ openings }) => openings.length > 0) ?? facts.presses[0];
  const press = run ? facts.presses.find(({ machineId }) => machineId === run.machineId) : first;
  const materialCode = textControl(run?.materialCode ?? 'mild-steel');
  const size = (millimetres?: string) => millimetres && toSizeText(millimetres, facts.units);
  const length = readWith(reader, (one, text) => one.lengthMm('', text, 'lengthMm'));
  const thickness = readWith(reader, (one, text) =>
    one.thickness('', text, findMaterialOf(materialCode.value, facts.materials)),
  );
  const force = readWith(reader, (one, text) => one.forceKn('', text));
  return new FormGroup({
    jobId: textControl(run?.jobId, Validators.required),
    machine: textControl(press?.code, Validators.required),
    punchId: textControl(run?.punchId),
    dieOpeningId: textControl(run?.dieOpeningId, Validators.required),
    materialCode,
    thickness: textControl(size(run?.thicknessMm), Validators.required, thickness),
    bendLength: textControl(size(run?.bendLengthMm), Validators.required, length),
    strokes: countControl(run?.strokes, 1, 'Strokes are a whole number of 1 or more, such as 80.'),
    pieces: countControl(run?.pieces, 0, 'Pieces are a whole number of 0 or more, such as 40.'),
    highestForce: textControl(toForceText(run?.highestForceKn ?? null, facts.units), force),
    runOn: textControl(run?.runOn ?? today, Validators.required),
    entryId: textControl(run?.entryId),
    note: textControl(run?.note, Validators.maxLength(300)),
    isGood: new FormControl(run?.isGood ?? true, { nonNullable: true }),
  });
}

function countControl(count: number | undefined, min: number, words: string) {
  return textControl(count?.toString(), Validators.required, ({ value }) => {
    const read = readCount(String(value));
    return String(value).trim() === '' || (read !== null && read >= min) ? null : { words };
  });
}

export type RunForm = ReturnType<typeof toRunForm>;

/** What the server takes; only for a valid form. A force shown as it was kept stays to the last digit. */
export function toRunInput(form: RunForm, facts: FitFacts, run: PressRun | null): PressRunInput {
  const value = form.getRawValue();
  const reader = new FieldReader(facts.units, facts.gauges);
  const material = findMaterialOf(value.materialCode, facts.materials);
  const press = facts.presses.find(({ code }) => code === value.machine);
  return {
    jobId: value.jobId,
    machineId: press?.machineId ?? '',
    punchId: value.punchId || null,
    dieOpeningId: value.dieOpeningId,
    materialCode: material.code,
    thicknessMm: toMmText(reader.thickness('', value.thickness, material).mm),
    bendLengthMm: toMmText(reader.lengthMm('', value.bendLength, 'lengthMm')),
    strokes: readCount(value.strokes) ?? 0,
    pieces: readCount(value.pieces) ?? 0,
    highestForceKn: toKilonewtons(value.highestForce, facts.units, run?.highestForceKn ?? null),
    runOn: value.runOn,
    isGood: value.isGood,
    note: value.note.trim() || null,
    entryId: value.entryId || null,
  };
}

/** The force that the rules expect of what is typed so far; null as long as it cannot be said. */
export function previewForce(form: RunForm, facts: FitFacts): BendForce | null {
  const value = form.getRawValue();
  const reader = new FieldReader(facts.units, facts.gauges);
  const material = findMaterialOf(value.materialCode, facts.materials);
  const opening = facts.presses
    .flatMap(({ openings }) => openings)
    .find(({ code }) => code === value.dieOpeningId);
  const input = {
    tensileMpa: material.tensileMpa,
    thicknessMm: reader.thickness('', value.thickness, material).mm,
    lengthMm: reader.lengthMm('', value.bendLength, 'lengthMm'),
    openingMm: opening?.openingMm ?? NaN,
  };
  return checkForceInput(input).length === 0 ? computeBendForce(input) : null;
}
