import {
  checkFigure,
  checkForceInput,
  computeBendForce,
  FORMING_CAUTIONS,
  FORMING_RULES,
  FORMING_SOURCES,
  type FormingMaterial,
  insideRadiusMm,
  shortestFlangeMm,
  toForceUnit,
} from '@brakeven/forming';
import { stressIn, toStress } from '@brakeven/values';
import { FormingInput, type ResultUnit, round } from './forming-input';

/** What a force is asked for, as typed: gauges, fractions, inches, feet or millimetres. */
export interface ForceQuestion {
  material: string;
  thickness: string;
  /** Length of the bend. */
  length: string;
  opening: string;
  /** Nose radius of the punch; left out, the inside radius is the natural one. */
  punchRadius?: string;
  /** Tensile strength instead of the one shown for the material. */
  tensile?: string;
}

/** The force as a band, with what it came from. Lengths are in `lengthUnit`, forces in `unit`. */
export interface ForceEstimate {
  forceLow: number;
  forceHigh: number;
  unit: 'US ton' | 'kN';
  rules: { rule: string; force: number; words: string; source: string }[];
  openingOverThickness: number;
  insideRadius: number;
  /** Shortest outside flange at 90°. */
  shortestFlange: number;
  lengthUnit: ResultUnit;
  material: { code: string; name: string };
  tensile: { value: number; unit: 'ksi' | 'MPa'; source: string };
  thickness: number;
  length: number;
  opening: number;
  workings: { figure: string; rule: string; source: string | null }[];
  notes: string[];
  cautions: readonly string[];
}

/**
 * Estimates the force of an air bend. Results are in the unit of the first length of the question that has one, in the
 * order of its properties.
 * @throws AppError `invalid_input` naming each field, with the accepted range and an example
 */
export function estimateForce(question: ForceQuestion): ForceEstimate {
  const { material: _material, tensile: _tensile, ...lengths } = question;
  const input = new FormingInput(Object.values(lengths));
  const material = input.material('material', question.material);
  const sheet = input.thickness('thickness', question.thickness, material);
  const { punchRadius, tensile } = question;
  const figures = {
    tensileMpa:
      tensile === undefined
        ? (material?.tensileUsed.toNumber() ?? NaN)
        : input.tensileMpa('tensile', tensile),
    thicknessMm: sheet?.thickness.toNumber() ?? NaN,
    lengthMm: input.lengthMm('length', question.length),
    openingMm: input.lengthMm('opening', question.opening),
  };
  const noseMm = punchRadius === undefined ? 0 : input.lengthMm('punchRadius', punchRadius);
  if (material) input.addChecked(checkForceInput(figures));
  input.addChecked(checkFigure('punchRadius', noseMm, 'radiusMm'));
  input.refuseIssues();
  if (!material) throw new Error('A material that is not known has been refused above.');
  const tensileSource = tensile === undefined ? material.tensileSource : 'As given.';
  return toEstimate(input, figures, { material, noseMm, tensileSource, note: sheet?.note ?? null });
}

function toEstimate(
  input: FormingInput,
  figures: Parameters<typeof computeBendForce>[0],
  extra: { material: FormingMaterial; noseMm: number; tensileSource: string; note: string | null },
): ForceEstimate {
  const force = computeBendForce(figures);
  const { material } = extra;
  const outForce = (kn: number) => round(toForceUnit(kn, input.unit));
  const stressUnit = input.unit === 'in' ? 'ksi' : 'MPa';
  return {
    forceLow: outForce(force.lowKn),
    forceHigh: outForce(force.highKn),
    unit: input.unit === 'in' ? 'US ton' : 'kN',
    rules: force.rules.map(({ rule, forceKn, words, source }) => ({
      rule,
      force: outForce(forceKn),
      words,
      source,
    })),
    openingOverThickness: round(figures.openingMm / figures.thicknessMm),
    insideRadius: input.out(insideRadiusMm(material.radiusPerOpening, figures.openingMm, extra.noseMm)),
    shortestFlange: input.out(shortestFlangeMm(figures.openingMm)),
    lengthUnit: input.unit,
    material: { code: material.code, name: material.name },
    tensile: {
      value: round(stressIn(toStress(figures.tensileMpa, 'MPa'), stressUnit).toNumber()),
      unit: stressUnit,
      source: extra.tensileSource,
    },
    thickness: input.out(figures.thicknessMm),
    length: input.out(figures.lengthMm),
    opening: input.out(figures.openingMm),
    workings: [
      { figure: 'forceLow, forceHigh', rule: FORMING_RULES.forceBand, source: null },
      { figure: 'insideRadius', rule: FORMING_RULES.insideRadius, source: material.radiusSource },
      {
        figure: 'shortestFlange',
        rule: FORMING_RULES.shortestFlange,
        source: FORMING_SOURCES.shortestFlange ?? null,
      },
    ],
    notes: extra.note === null ? [] : [extra.note],
    cautions: FORMING_CAUTIONS,
  };
}
