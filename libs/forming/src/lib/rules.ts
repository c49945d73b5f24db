/** The rules of forming in words, shown in the workings of each figure. */
export const FORMING_RULES = {
  shopForce:
    'F = 575 · t² · L ÷ V in US tons (t and V in inches, L in feet) for steel of 60 ksi, scaled by tensile strength ÷ 60 ksi.',
  oehlerForce: 'F = C · Rm · b · t² ÷ V with C = 1 + 4t ÷ V.',
  forceBand: 'The lower and the higher of the two rules; a verdict uses the higher.',
  insideRadius:
    "A share of the die opening that depends on the material, and at least the punch's nose radius.",
  shortestFlange:
    'V ÷ 2 ÷ cos(half the angle turned): the slant from the bottom line of the V to its shoulder, about 0.7 V at 90°.',
  preferredOpening: 'Opening ÷ thickness of 8 to 10, and of 10 to 12 for plate above 13 mm (1/2 in).',
  bendAllowance: 'BA = turned in radians · (R + K · t): the length of the neutral line in the bend.',
  bendDeduction:
    'BD = 2 · (R + t) · tan(turned ÷ 2) − BA for inside angles of 90° or more, flanges measured outside to the virtual sharp corner.',
  acuteDeduction:
    'BD = 2 · (R + t) − BA for inside angles below 90°, flanges measured outside to the tangent of the bend (as in DIN 6935), since the virtual sharp corner runs away.',
  kByRadius:
    'K = k ÷ 2 with k = 0.65 + 0.5 · log10(R ÷ t), and k = 1 above R ÷ t = 5 (DIN 6935 refers k to half the thickness).',
  kGiven: 'K as given.',
  kFromTrials:
    'K = (BA ÷ turned − R) ÷ t with BA from trial pieces: what the outside flanges measure together, less the blank, shared by the bends.',
  backGauge:
    'Flange behind the die − half the bend deduction: the flange up to this bend lies against the stop, on the outside of the bend before it.',
  ramDepth:
    'Tip below the die top = a · tan α − (Ri + t + rd) · (1 ÷ cos α − 1) − t with a = V ÷ 2 and α half the loaded angle turned; the reading is that plus the datum, and the loaded angle turned is the finished one plus springback.',
  ramDepthFit:
    'Datum and springback are the pair for which the squares of the errors in angle add up to least (Levenberg-Marquardt); the band holds 9 of 10 single bends (Student t).',
  transfer:
    'The same datum and springback on another sheet or opening by geometry alone: a guess, its band doubled and widened by an inside radius that may be 20 % off.',
} as const;

/** The name of a rule. */
export type FormingRuleName = keyof typeof FORMING_RULES;

/** Where each rule comes from. */
export const FORMING_SOURCES: Readonly<Partial<Record<FormingRuleName, string>>> = {
  shopForce: 'Common practice, no published standard; constants in use differ by about 10 %.',
  oehlerForce:
    'K. Lange, Umformtechnik, vol. 3, 2nd ed. 1990, after Oehler; stated for sheets of 0.5 to 10 mm and openings of 5 to 20 thicknesses.',
  insideRadius: 'Common practice, no published source.',
  preferredOpening: 'Common practice, no published source.',
  kByRadius: 'DIN 6935.',
  acuteDeduction: 'DIN 6935.',
  ramDepth: 'Own derivation from the contact of a straight leg with the shoulder arcs.',
};

/** What must be said wherever something is decided by these figures. */
export const FORMING_CAUTIONS = [
  'These are estimates only. The rating plates of the press, the punch and the die decide.',
  'Keep hands out of the tooling and guards on.',
  'Follow the rules of your place; only trained people set up and run a press.',
] as const;

/** What else to look at before a bend, as the computation cannot see it. */
export const FIT_NOTES = {
  offCentre:
    'Ratings are for work in the middle of the bed. Off the middle one side takes more: read what the press allows there, and bend in the middle where you can.',
  segmentedPunch:
    'A segmented punch carries its rating only over the length of the segments that touch the sheet; gaps carry nothing.',
  narrowDie:
    'A force over a short length is a high force per length: compare it with the rating of punch and die.',
} as const;
