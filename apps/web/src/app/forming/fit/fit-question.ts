import { type ShopGauge } from '@brakeven/contract';
import { checkFitInput, type FitInput, RANGES } from '@brakeven/forming';
import { parseLength, type UnitSystem } from '@brakeven/values';
import { type BendMaterial } from '../bend-material';
import { FieldReader } from '../field-reader';
import { LENGTH_UNIT_OF, toSizeWords } from '../forming-words';
import { type PressTooling, type RackOpening, type RackPunch } from '../press-tooling';
import { type FieldWords } from '../show-field-words';

/** What is asked, as typed; also the names in the address. */
export interface FitTexts {
  material: string;
  thickness: string;
  length: string;
  angle: string;
  flange: string;
  machine: string;
  punch: string;
  /** Rating of a press that is not in the register. */
  rating: string;
  /** Openings besides those that the shop owns, with commas between them. */
  openings: string;
  /** Code of the opening looked at; empty for the best. */
  opening: string;
}

/** What the shop knows: its materials, presses with tooling, and its line. */
export interface FitFacts {
  materials: readonly BendMaterial[];
  gauges: readonly ShopGauge[];
  presses: readonly PressTooling[];
  lineShare: number;
  units: UnitSystem;
}

/** The question read: what is computed with, or what is wrong with which field. */
export interface FitQuestion {
  /** Null while a field is wrong. */
  input: FitInput | null;
  material: BendMaterial;
  press: PressTooling | null;
  punch: RackPunch | null;
  openings: readonly RackOpening[];
  /** What a gauge leaves open. */
  note: string | null;
  issues: readonly FieldWords[];
}

/** A bend to begin with, so that the page shows at once what it does. */
export const FIT_DEFAULTS: Readonly<Record<UnitSystem, FitTexts>> = {
  us: toDefaults('10 ga', '48 in'),
  metric: toDefaults('3 mm', '1250 mm'),
};

/** Common openings, offered where a shop has entered no die. */
export const COMMON_OPENINGS: Readonly<Record<UnitSystem, string>> = {
  us: '3/4, 1, 1 1/4, 1 1/2, 2',
  metric: '16, 20, 24, 30, 40',
};

function toDefaults(thickness: string, length: string): FitTexts {
  const empty = { flange: '', machine: '', punch: '', rating: '', openings: '', opening: '' };
  return { material: 'mild-steel', thickness, length, angle: '90', ...empty };
}

const NAMES = { length: 'bend length', flange: 'shortest flange', openings: 'opening' };

/** Reads what was typed; bare numbers are in the shop's unit. */
export function readFitQuestion(texts: FitTexts, facts: FitFacts): FitQuestion {
  const reader = new FieldReader(facts.units, facts.gauges, NAMES);
  const material = findMaterialOf(texts.material, facts.materials);
  const press = facts.presses.find(({ code }) => code === texts.machine) ?? null;
  const punch = press?.punches.find(({ code }) => code === texts.punch) ?? press?.punches[0] ?? null;
  const typed = readOpenings(reader, texts.openings, facts.units);
  const openings = [...(press?.openings ?? []), ...typed].sort((a, b) => a.openingMm - b.openingMm);
  const { mm: thicknessMm, note } = reader.thickness('thickness', texts.thickness, material);
  const input: FitInput = {
    tensileMpa: material.tensileMpa,
    radiusPerOpening: material.radiusPerOpening,
    thicknessMm,
    lengthMm: reader.lengthMm('length', texts.length, 'lengthMm'),
    insideAngle: reader.angle('angle', texts.angle),
    flangeMm: isEmpty(texts.flange) ? null : reader.lengthMm('flange', texts.flange, 'flangeMm'),
    press: press ?? {
      ratedKn: isEmpty(texts.rating) ? null : reader.forceKn('rating', texts.rating),
      bedLengthMm: null,
    },
    punch,
    openings,
    lineShare: facts.lineShare,
  };
  if (reader.issues.length === 0) reader.addAll(checkFitInput(input));
  const { issues } = reader;
  return { input: issues.length === 0 ? input : null, material, press, punch, openings, note, issues };
}

/** The material of a code; the first where the code is unknown. */
export function findMaterialOf(code: string, materials: readonly BendMaterial[]): BendMaterial {
  const found = materials.find((material) => material.code === code) ?? materials[0];
  if (!found) throw new Error('A shop always has the materials that are shipped.');
  return found;
}

function readOpenings(reader: FieldReader, text: string, units: UnitSystem): RackOpening[] {
  const parts = text.split(/[,;]/).map((part) => part.trim());
  return parts.filter(Boolean).flatMap((part) => {
    const read = parseLength(part, LENGTH_UNIT_OF[units]);
    const openingMm = read.ok ? read.value.toNumber() : NaN;
    const isAccepted = openingMm >= RANGES.openingMm.min && openingMm <= RANGES.openingMm.max;
    if (isAccepted) return [toTypedOpening(openingMm, units)];
    const message = `'${part}' is not an opening. Accepted: ${RANGES.openingMm.words}; several with commas between, such as ${COMMON_OPENINGS[units]}.`;
    reader.add({ field: 'openings', message });
    return [];
  });
}

function toTypedOpening(openingMm: number, units: UnitSystem): RackOpening {
  const unknown = { dieAngle: null, lengthMm: null, ratedKnPerM: null, shoulderRadiusMm: null };
  return { code: `typed ${toSizeWords(openingMm, units)}`, dieName: 'typed', openingMm, ...unknown };
}

function isEmpty(text: string): boolean {
  return text.trim() === '';
}
