import { type CategoryFigures, compareWithEstimate, JOB_COST_CATEGORIES } from '@brakeven/costing';
import { D, moneyText, toMoney } from '@brakeven/values';

function labourAt(amount: number, hours: number): CategoryFigures {
  const figures = JOB_COST_CATEGORIES.map((category) => [category, { amount: toMoney(0), quantity: null }]);
  return {
    ...(Object.fromEntries(figures) as CategoryFigures),
    labour: { amount: toMoney(amount), quantity: D(hours) },
  };
}

// Source: standard-costing course notes: rate variance = (actual − standard rate) × actual hours, efficiency variance
// = (actual − standard hours) × standard rate. Inputs printed there: 2800 h at 6.50 against 3000 h at 6.00; 16,250 h
// for 247,000 against 5600 units of 3 h at 15.00. Results computed from those formulas apart from this product.
it.each([
  [18_000, 3000, 18_200, 2800, ['200.00', '1400.00', '-1200.00']],
  [252_000, 16_800, 247_000, 16_250, ['-5000.00', '3250.00', '-8250.00']],
])('parts %d of %d h against %d of %d h as the textbooks do', (standard, hours, spent, worked, printed) => {
  const { labour } = compareWithEstimate(labourAt(standard, hours), labourAt(spent, worked)).categories;
  expect([labour.variance, labour.ratePart, labour.quantityPart].map(moneyText)).toEqual(printed);
});
