import { D, type Decimal, moneyText, sum, toMoney } from '@brakeven/values';
import fc from 'fast-check';
import { compareWithEstimate, toCategoryFigures, type Variance } from './compare-with-estimate';
import { JOB_COST_CATEGORIES, type JobCostCategory } from './cost-categories';
import { type CategoryFigure, type CategoryFigures } from './estimate';
import { type JobCostLine } from './job-cost';

function figure(amount: string, quantity: string | null): CategoryFigure {
  return { amount: toMoney(amount), quantity: quantity === null ? null : D(quantity) };
}

function figuresOf(changes: Partial<CategoryFigures>): CategoryFigures {
  const none = JOB_COST_CATEGORIES.map((category) => [category, figure('0', null)]);
  return { ...(Object.fromEntries(none) as CategoryFigures), ...changes };
}

const textsOf = ({ variance, ratePart, quantityPart }: Variance) =>
  [variance, ratePart, quantityPart].map(moneyText);

describe('a variance', () => {
  it.each<[JobCostCategory, CategoryFigure, CategoryFigure, string[]]>([
    // 10 h at 30 estimated, 12 h at 31 spent: (31 − 30) × 12 and (12 − 10) × 30
    ['labour', figure('300', '10'), figure('372', '12'), ['72.00', '12.00', '60.00']],
    // less of it, but dearer: 100 kg at 1.50, 90 kg at 1.80
    ['material', figure('150', '100'), figure('162', '90'), ['12.00', '27.00', '-15.00']],
    // an uneven rate: 100 ÷ 3 × 4 = 133.333…, so the rate part is 16.666… of 50
    ['machine', figure('100', '3'), figure('150', '4'), ['50.00', '16.67', '33.33']],
    // overtime is estimated at 0 of the hours: all of it is rate
    ['overtime', figure('0', '10'), figure('18', '12'), ['18.00', '18.00', '0.00']],
    // nothing of it was estimated, or nothing of it came
    ['material', figure('0', null), figure('45', '20'), ['45.00', '0.00', '45.00']],
    ['machine', figure('80', '4'), figure('0', '0'), ['-80.00', '0.00', '-80.00']],
    // outside work has no quantity
    ['outside', figure('140', null), figure('150.50', null), ['10.50', '10.50', '0.00']],
  ])('of %s from %j to %j is %j', (category, estimate, actual, parts) => {
    const { categories, total } = compareWithEstimate(
      figuresOf({ [category]: estimate }),
      figuresOf({ [category]: actual }),
    );
    expect(textsOf(categories[category])).toEqual(parts);
    expect(textsOf(total)).toEqual(parts);
  });

  it('takes amounts and quantities from the lines of a job', () => {
    const line = (category: JobCostLine['category'], amount: string, quantity: string): JobCostLine => ({
      category,
      amount: toMoney(amount),
      quantity: D(quantity),
    });
    const figures = toCategoryFigures([
      line('labour', '200', '8'),
      line('labour', '-25', '-1'),
      line('material', '30', '12.5'),
      line('outside', '75', '1'),
      line('invoiced', '900', '1'),
    ]);
    const texts = JOB_COST_CATEGORIES.map((category) => {
      const { amount, quantity } = figures[category];
      return [category, moneyText(amount), quantity?.toFixed() ?? null];
    });
    expect(texts).toEqual([
      ['labour', '175.00', '7'],
      ['overtime', '0.00', '0'],
      ['machine', '0.00', '0'],
      ['overhead', '0.00', '0'],
      ['material', '30.00', '12.5'],
      ['outside', '75.00', null],
    ]);
  });

  it('is its two parts exactly, and each is its product to a cent', () => {
    const amounts = fc.integer({ min: 0, max: 90_000_000 }).map((cents) => toMoney(D(cents).div(100)));
    const quantities = fc.option(
      fc.integer({ min: 0, max: 90_000_000 }).map((parts) => D(parts).div(10_000)),
    );
    const figures = fc.record({ amount: amounts, quantity: quantities as fc.Arbitrary<Decimal | null> });
    const all = fc.record(Object.fromEntries(JOB_COST_CATEGORIES.map((category) => [category, figures])));
    fc.assert(
      fc.property(all, all, (estimate, actual) => {
        const [before, after] = [estimate as CategoryFigures, actual as CategoryFigures];
        const { categories, total } = compareWithEstimate(before, after);
        for (const { variance, ratePart, quantityPart, estimate: of, actual: is } of Object.values(
          categories,
        )) {
          expect(moneyText(sum([ratePart, quantityPart]))).toBe(moneyText(variance));
          expect(moneyText(sum([of, variance]))).toBe(moneyText(is));
        }
        expect(moneyText(sum([total.ratePart, total.quantityPart]))).toBe(moneyText(total.variance));
        const [est, act] = [before.labour, after.labour];
        if (!est.quantity?.gt(0) || !act.quantity?.gt(0)) return;
        const byQuantity = act.quantity.minus(est.quantity).times(est.amount).div(est.quantity);
        expect(byQuantity.minus(categories.labour.quantityPart).abs().lte('0.005')).toBe(true);
      }),
    );
  });
});
