import { FormControl, FormGroup, Validators } from '@angular/forms';
import { type PressRunInput } from '@brakeven/contract';
import { type BendForce, checkForceInput, computeBendForce } from '@brakeven/forming';
import { textControl } from '../../forms/text-control';
import { FieldReader } from '../field-reader';
import { readWith, toMmText } from '../field-validator';
import { findMaterialOf, type FitFacts } from '../fit/fit-question';

/** Reads a whole number of pieces or strokes; null if it is none. */
export function readCount(text: string): number | null {
  return /^\s*\d{1,7}\s*$/.test(text) ? Number(text) : null;
}

/** The fields of a run as they are typed. */
export function toRunForm(facts: FitFacts, today: string) {
  const reader = () => new FieldReader(facts.units, facts.gauges);
  const press = facts.presses.find(({ openings }) => openings.length > 0) ?? facts.presses[0];
  const materialCode = textControl('mild-steel');
  const count = (min: number, words: string) =>
    textControl('', Validators.required, ({ value }) => {
      const read = readCount(String(value));
      return String(value).trim() === '' || (read !== null && read >= min) ? null : { words };
    });
  return new FormGroup({
    jobId: textControl('', Validators.required),
    machine: textControl(press?.code, Validators.required),
    punchId: textControl(''),
    dieOpeningId: textControl('', Validators.required),
    materialCode,
    thickness: textControl(
      '',
      Validators.required,
      readWith(reader, (one, text) =>
        one.thickness('', text, findMaterialOf(materialCode.value, facts.materials)),
      ),
    ),
    bendLength: textControl(
      '',
      Validators.required,
      readWith(reader, (one, text) => one.lengthMm('', text, 'lengthMm')),
    ),
    strokes: count(1, 'Strokes are a whole number of 1 or more, such as 80.'),
    pieces: count(0, 'Pieces are a whole number of 0 or more, such as 40.'),
    highestForce: textControl(
      '',
      readWith(reader, (one, text) => one.forceKn('', text)),
    ),
    runOn: textControl(today, Validators.required),
    entryId: textControl(''),
    note: textControl('', Validators.maxLength(300)),
    isGood: new FormControl(true, { nonNullable: true }),
  });
}

export type RunForm = ReturnType<typeof toRunForm>;

/** What the server takes; only for a valid form. */
export function toRunInput(form: RunForm, facts: FitFacts): PressRunInput {
  const value = form.getRawValue();
  const reader = new FieldReader(facts.units, facts.gauges);
  const material = findMaterialOf(value.materialCode, facts.materials);
  const press = facts.presses.find(({ code }) => code === value.machine);
  const force = value.highestForce.trim();
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
    highestForceKn: force === '' ? null : toMmText(reader.forceKn('', force)),
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
