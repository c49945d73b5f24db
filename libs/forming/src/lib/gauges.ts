/** The four number systems of sheet gauges; the same number is another thickness in each. */
export const GAUGE_SYSTEMS = ['steel', 'galvanized', 'stainless', 'aluminium'] as const;

/** One of the gauge systems. */
export type GaugeSystem = (typeof GAUGE_SYSTEMS)[number];

/** The thinnest and thickest gauge of the tables. */
export const GAUGE_RANGE = { thickest: 3, thinnest: 30 } as const;

/** Where the thicknesses of each gauge system come from, in words for the workings. */
export const GAUGE_SOURCES: Readonly<Record<GaugeSystem, string>> = {
  steel: "Manufacturers' Standard Gauge for uncoated sheet steel: ounces per square foot ÷ 16 ÷ 41.82 in.",
  galvanized:
    'Galvanized sheet gauge: the weight of the steel gauge plus 2.5 oz per square foot of zinc, ÷ 16 ÷ 41.82 in.',
  stainless: 'U.S. Standard Gauge (15 U.S.C. 206), approximate thickness: ounces per square foot ÷ 640 in.',
  aluminium: 'Brown & Sharpe (American Wire Gauge, ASTM B258): 0.005 in × 92^((36 − gauge)/39).',
};

/** What a gauge number cannot say, shown beside thicknesses that were given as a gauge. */
export const GAUGE_NOTES: Readonly<Record<GaugeSystem, string>> = {
  steel: 'A gauge is a nominal thickness; measure the sheet where the bend matters.',
  galvanized:
    'Some duct tables give the uncoated thickness for galvanized gauges. Measure the sheet, or type its thickness.',
  stainless:
    'Many sellers give stainless in decimals near the steel gauge (10 ga about 0.134 in). Type the thickness ordered if it is known (common practice, no published source).',
  aluminium: 'Aluminium is mostly ordered by decimal thickness; type it if it is known.',
};

/** Inches, gauges 3 to 30. */
type GaugeColumn = readonly (number | null)[];

// The printed four-place tables that follow from the rules of GAUGE_SOURCES (stainless is exact). Galvanized gauges
// begin at 8. They are kept as printed, since a shop compares them with its chart on the wall.
const TABLES: Readonly<Record<GaugeSystem, GaugeColumn>> = {
  steel: [
    0.2391, 0.2242, 0.2092, 0.1943, 0.1793, 0.1644, 0.1495, 0.1345, 0.1196, 0.1046, 0.0897, 0.0747, 0.0673,
    0.0598, 0.0538, 0.0478, 0.0418, 0.0359, 0.0329, 0.0299, 0.0269, 0.0239, 0.0209, 0.0179, 0.0164, 0.0149,
    0.0135, 0.012,
  ],
  galvanized: [
    null,
    null,
    null,
    null,
    null,
    0.1681,
    0.1532,
    0.1382,
    0.1233,
    0.1084,
    0.0934,
    0.0785,
    0.071,
    0.0635,
    0.0575,
    0.0516,
    0.0456,
    0.0396,
    0.0366,
    0.0336,
    0.0306,
    0.0276,
    0.0247,
    0.0217,
    0.0202,
    0.0187,
    0.0172,
    0.0157,
  ],
  stainless: [
    0.25, 0.234375, 0.21875, 0.203125, 0.1875, 0.171875, 0.15625, 0.140625, 0.125, 0.109375, 0.09375,
    0.078125, 0.0703125, 0.0625, 0.05625, 0.05, 0.04375, 0.0375, 0.034375, 0.03125, 0.028125, 0.025, 0.021875,
    0.01875, 0.0171875, 0.015625, 0.0140625, 0.0125,
  ],
  aluminium: [
    0.2294, 0.2043, 0.1819, 0.162, 0.1443, 0.1285, 0.1144, 0.1019, 0.0907, 0.0808, 0.072, 0.0641, 0.0571,
    0.0508, 0.0453, 0.0403, 0.0359, 0.032, 0.0285, 0.0253, 0.0226, 0.0201, 0.0179, 0.0159, 0.0142, 0.0126,
    0.0113, 0.01,
  ],
};

/** Thickness in inches of a gauge, as the table prints it; undefined if the system has no such gauge. */
export function findGaugeInches(system: GaugeSystem, gauge: number): number | undefined {
  return TABLES[system][gauge - GAUGE_RANGE.thickest] ?? undefined;
}

/** One row of a gauge table. */
export interface GaugeRow {
  gauge: number;
  thicknessIn: number;
}

/** The gauges of a system with their thickness in inches, thickest first. */
export function listGauges(system: GaugeSystem): GaugeRow[] {
  return TABLES[system].flatMap((thicknessIn, index) =>
    thicknessIn === null ? [] : [{ gauge: GAUGE_RANGE.thickest + index, thicknessIn }],
  );
}

/** Usual plate thicknesses, as fractions of an inch; a fraction is exact by definition. */
export const PLATE_FRACTIONS = [
  '3/16',
  '1/4',
  '5/16',
  '3/8',
  '7/16',
  '1/2',
  '5/8',
  '3/4',
  '7/8',
  '1',
] as const;
