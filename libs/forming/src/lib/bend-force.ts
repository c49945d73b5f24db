import { toForce } from '@brakeven/values';
import { assertNoIssues, checkFigure, checkThicknessOverOpening, type FormingIssue } from './forming-issue';
import { FORMING_RULES, FORMING_SOURCES } from './rules';

/** What the force of an air bend is computed from. */
export interface ForceInput {
  tensileMpa: number;
  thicknessMm: number;
  /** Length of the bend. */
  lengthMm: number;
  /** V, between the points where the shoulder arcs meet the die's top plane. */
  openingMm: number;
}

/** The force by one rule. */
export interface RuleForce {
  rule: 'shop-575' | 'oehler';
  forceKn: number;
  words: string;
  source: string;
}

/** The force of an air bend, as a band between two rules. */
export interface BendForce {
  lowKn: number;
  highKn: number;
  rules: RuleForce[];
}

// 575 US tons for t²·L/V of 1 in²·ft/in at 60 ksi, in pure SI: a number without a unit, so that F[N] = it · Rm · t²·L/V
// with MPa and mm. Both conversions are exact: 1 US ton-force = 2000 lbf, and 60 ksi = 60,000 lbf per square inch.
const SHOP_FACTOR = (575 * 2000) / (60_000 * 12);

/** Checks what a force is computed from: each figure in its range, and the sheet thinner than the opening. */
export function checkForceInput({
  tensileMpa,
  thicknessMm,
  lengthMm,
  openingMm,
}: ForceInput): FormingIssue[] {
  return [
    ...checkFigure('tensile', tensileMpa, 'tensileMpa'),
    ...checkFigure('thickness', thicknessMm, 'thicknessMm'),
    ...checkFigure('length', lengthMm, 'lengthMm'),
    ...checkFigure('opening', openingMm, 'openingMm'),
    ...checkThicknessOverOpening(thicknessMm, openingMm),
  ];
}

/**
 * Computes the force of an air bend by both rules, in kN, unrounded.
 * Rules in words: `FORMING_RULES.shopForce`, `.oehlerForce`, `.forceBand`.
 * @throws RangeError for what `checkForceInput` refuses
 */
export function computeBendForce(input: ForceInput): BendForce {
  assertNoIssues(checkForceInput(input));
  const rules = [toShopForce(input), toOehlerForce(input)];
  const forces = rules.map((rule) => rule.forceKn);
  return { lowKn: Math.min(...forces), highKn: Math.max(...forces), rules };
}

function toShopForce(input: ForceInput): RuleForce {
  return {
    rule: 'shop-575',
    forceKn: SHOP_FACTOR * plainForceKn(input),
    words: FORMING_RULES.shopForce,
    source: FORMING_SOURCES.shopForce ?? '',
  };
}

function toOehlerForce(input: ForceInput): RuleForce {
  return {
    rule: 'oehler',
    forceKn: (1 + (4 * input.thicknessMm) / input.openingMm) * plainForceKn(input),
    words: FORMING_RULES.oehlerForce,
    source: FORMING_SOURCES.oehlerForce ?? '',
  };
}

/** Rm · b · t² ÷ V, MPa and mm giving N, here in kN. */
function plainForceKn({ tensileMpa, thicknessMm, lengthMm, openingMm }: ForceInput): number {
  return (tensileMpa * lengthMm * thicknessMm ** 2) / openingMm / 1000;
}

const KN_PER_US_TON = toForce(1, 'US ton').toNumber();

/** A force in the unit that goes with a unit of length: US tons with inches, kN with millimetres. */
export function toForceUnit(forceKn: number, lengthUnit: 'in' | 'mm'): number {
  return lengthUnit === 'in' ? forceKn / KN_PER_US_TON : forceKn;
}
