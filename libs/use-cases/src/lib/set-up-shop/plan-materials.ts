import { type RegisterValues } from '@brakeven/database';
import { findGaugeSystem, parseThickness } from '@brakeven/forming';
import { lengthText } from '@brakeven/values';
import { type SetupFile } from '@brakeven/workbook';
import { type SetupDraft } from './setup-draft';
import { type DecimalColumn, toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

type MaterialRow = SetupFile['materials'][number];

const NEW_MATERIAL = {
  grade: '',
  form: 'sheet',
  gauge: null,
  thicknessMm: null,
  densityKgM3: null,
  tensileStrengthMpa: null,
  recoveryPricePerKg: '0.000000',
} as const;

/** Materials; what a row leaves blank stays as the shop has it. Weights that are in the books stay as they are. */
export function planMaterials(draft: SetupDraft, rows: SetupFile['materials']): void {
  for (const row of rows) {
    if (draft.tables.material.hasStated(row.name)) {
      draft.refuseTwice('materials', row, 'name', `Material '${row.name}'`);
      continue;
    }
    const thickness = row.thickness === null ? {} : toThickness(draft, row, row.thickness);
    const decimal = (column: DecimalColumn['column'], form: DecimalColumn['form'], text: string | null) =>
      toStoredNumber(draft, row, { list: 'materials', column, form }, text);
    const stated = listStated({
      grade: row.grade,
      form: row.form,
      densityKgM3: decimal('densityKgM3', 'property', row.densityKgM3),
      tensileStrengthMpa: decimal('tensileStrengthMpa', 'property', row.tensileStrengthMpa),
      recoveryPricePerKg: decimal('recoveryPricePerKg', 'rate', row.recoveryPricePerKg),
    });
    const defaults = { ...NEW_MATERIAL, name: row.name };
    draft.count(
      'materials',
      draft.tables.material.state(row.name, { ...stated, ...thickness }, defaults).verdict,
    );
  }
}

/** Gauge and thickness as they are kept; neither if the text is refused. */
function toThickness(draft: SetupDraft, row: MaterialRow, text: string): RegisterValues {
  const stored = draft.tables.material.find(row.name)?.values['grade'];
  const system = findGaugeSystem([row.grade ?? String(stored ?? ''), row.name]);
  const parsed = parseThickness(text, system, 'in');
  if (!parsed.ok) {
    draft.refuse('materials', row, 'thickness', { code: parsed.code, message: parsed.message });
    return {};
  }
  const { gauge, thickness } = parsed.value;
  const quantity = { list: 'materials', column: 'thickness', form: 'quantity' } as const;
  const thicknessMm = toStoredNumber(draft, row, quantity, lengthText(thickness));
  return { gauge: gauge === null ? null : `${gauge} ga`, thicknessMm };
}
