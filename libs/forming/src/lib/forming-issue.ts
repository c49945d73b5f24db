/** One thing wrong with one field of what was asked; the message says what is accepted, with an example. */
export interface FormingIssue {
  field: string;
  code: string;
  message: string;
}

/** What a figure may be: both ends included, unless `isAboveMin` leaves the lower one out. */
export interface FigureRange {
  min: number;
  max: number;
  isAboveMin?: boolean;
  /** The range and an example in words. */
  words: string;
}

/** What the rules of forming accept; lengths in mm, angles in degrees, strengths in MPa. */
export const RANGES = {
  thicknessMm: { min: 0.1, max: 50, words: '0.1 to 50 mm (0.004 to 2 in), such as 10 ga or 3 mm' },
  lengthMm: { min: 1, max: 20_000, words: '1 mm to 20 m (65 ft), such as 4 ft or 1200 mm' },
  openingMm: { min: 1, max: 1000, words: '1 to 1000 mm (0.04 to 39 in), such as 1 in or 24 mm' },
  insideAngle: {
    min: 20,
    max: 175,
    words: '20 to 175 degrees, the inside angle of the finished part (180 is flat), such as 90',
  },
  tensileMpa: { min: 50, max: 2000, words: '50 to 2000 MPa (7 to 290 ksi), such as 60 ksi' },
  radiusMm: { min: 0, max: 500, words: '0 to 500 mm (20 in), such as 1/16 in or 2 mm' },
  flangeMm: { min: 0, max: 20_000, isAboveMin: true, words: 'above 0, up to 20 m (65 ft), such as 1 1/2 in' },
  kFactor: { min: 0, max: 1, isAboveMin: true, words: 'above 0, up to 1, usually 0.3 to 0.5, such as 0.44' },
  share: { min: 0, max: 1, isAboveMin: true, words: 'above 0, up to 100 %, such as 80 %' },
  ratingKn: { min: 0, max: 100_000, isAboveMin: true, words: 'above 0, such as 60 US tons or 500 kN' },
  depthMm: {
    min: -5000,
    max: 5000,
    words: 'a reading of the ram between -5 and 5 m, growing as the ram goes down',
  },
} as const satisfies Record<string, FigureRange>;

/** The name of a range. */
export type RangeName = keyof typeof RANGES;

/**
 * Checks one figure against its range; a figure that is no number is out of every range.
 * @param subject what the message calls it, where several figures make up one field
 */
export function checkFigure(
  field: string,
  value: number,
  range: RangeName,
  subject: string = field,
): FormingIssue[] {
  const { min, max, words, isAboveMin = false }: FigureRange = RANGES[range];
  const isInside = isAboveMin ? value > min && value <= max : value >= min && value <= max;
  if (isInside) return [];
  return [{ field, code: 'out_of_range', message: `${subject} is outside what is accepted: ${words}.` }];
}

/** Checks that a sheet is thinner than the opening it is bent over. */
export function checkThicknessOverOpening(thicknessMm: number, openingMm: number): FormingIssue[] {
  if (!(thicknessMm >= openingMm)) return [];
  const message =
    'The sheet is as thick as the die opening or thicker, so it cannot be bent there. Usual is an opening of 6 to 12 thicknesses, such as 1 in for 1/8 in.';
  return [{ field: 'opening', code: 'thickness_over_opening', message }];
}

/** @throws RangeError naming each issue: the caller should have checked first, and nothing silently becomes NaN. */
export function assertNoIssues(issues: readonly FormingIssue[]): void {
  if (issues.length > 0) throw new RangeError(issues.map((issue) => issue.message).join(' '));
}
