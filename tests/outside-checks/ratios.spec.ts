import { computeIndicator, type IndicatorName } from '@brakeven/costing';

// Source: ISO 22400-2:2014, formulas as a university's published model of it states them; the shift behind the figures
// is made up (400 min busy of 480 planned, 300 of them making parts and 60 setting up; 180 pieces, 171 good and 5
// scrapped where 6 were planned) and the ratios were computed apart from this product.
it.each<[IndicatorName, number, number, string]>([
  ['workerEfficiency', 420, 450, '0.933333'],
  ['allocationRatio', 400, 600, '0.666667'],
  ['allocationEfficiency', 400, 480, '0.833333'],
  ['utilizationEfficiency', 300, 400, '0.750000'],
  ['setupRatio', 60, 360, '0.166667'],
  ['qualityRatio', 171, 180, '0.950000'],
  ['scrapRatio', 5, 180, '0.027778'],
  ['plannedScrapRatio', 5, 6, '0.833333'],
])('%s of %d to %d is %s', (name, part, whole, printed) => {
  expect(computeIndicator(name, part, whole)?.toFixed(6)).toBe(printed);
});
