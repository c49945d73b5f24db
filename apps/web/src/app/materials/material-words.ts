import { type Material, MATERIAL_FORMS, type MaterialForm } from '@brakeven/contract';
import { formatLength, toLength, type UnitSystem } from '@brakeven/values';
import { type FieldOption } from '../forms/form-field';

const FORM_WORDS: Readonly<Record<MaterialForm, string>> = {
  sheet: 'Sheet',
  plate: 'Plate',
  bar: 'Bar',
  tube: 'Tube',
  other: 'Other',
};

export const FORM_OPTIONS: readonly FieldOption[] = MATERIAL_FORMS.map((value) => ({
  value,
  label: FORM_WORDS[value],
}));

/** A material in a few words: 'Sheet · A1011 CS · 11 ga (0.1196 in)'. */
export function toMaterialFacts(material: Material, units: UnitSystem): string {
  return [FORM_WORDS[material.form], material.grade, toThicknessWords(material, units)]
    .filter((words) => words !== '')
    .join(' · ');
}

function toThicknessWords({ gauge, thicknessMm }: Material, units: UnitSystem): string {
  if (thicknessMm === null) return gauge ?? '';
  const length = formatLength(toLength(thicknessMm, 'mm'), units);
  return gauge === null ? length : `${gauge} (${length})`;
}
