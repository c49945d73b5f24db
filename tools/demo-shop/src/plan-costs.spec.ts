import { sum, toLocalDate } from '@brakeven/values';
import { type MaterialCode, MATERIALS } from './cost-story';
import { planDemo } from './seed';
import { WEEKS } from './story';

const TODAY = toLocalDate('2026-06-17');
const { jobs, costs } = planDemo(TODAY);

it('tells the same story every time', () => {
  const again = planDemo(TODAY);
  expect(JSON.stringify(again.costs)).toBe(JSON.stringify(costs));
});

it('dates nothing before its job or in the week that is still to come in', () => {
  const rows = [...costs.issues, ...costs.services, ...costs.invoices];
  expect(rows.length).toBeGreaterThan(200);
  expect(rows.filter(({ day, job }) => day < job.openedWeek * 7 || day >= WEEKS * 7)).toEqual([]);
});

it.each(Object.keys(MATERIALS) as MaterialCode[])(
  'has the %s that jobs draw, even before late papers',
  (code) => {
    const lots = costs.lots.filter(({ material, isBackdated }) => material === code && !isBackdated);
    const drawn = costs.issues.filter(({ material, kind }) => material === code && kind === 'issue');
    expect(drawn.length).toBeGreaterThan(5);
    for (const { day } of drawn) {
      const [came, went] = [lots, drawn].map((moves) =>
        sum(moves.filter((move) => move.day <= day).map(({ weight }) => weight)),
      );
      expect(came?.gte(went ?? 0)).toBe(true);
    }
  },
);

it('invoices whole what is invoiced, less one credit note, and no more than a part of what is not', () => {
  const invoiced = (number: string) =>
    costs.invoices
      .filter(({ job }) => job.number === number)
      .reduce((total, { kind, dollars }) => total + (kind === 'invoice' ? dollars : -dollars), 0);
  const billable = jobs.filter(({ isBillable }) => isBillable);
  for (const { number, statusNow, quotedPrice, isBadLot } of billable) {
    const credit = isBadLot ? 640 : 0;
    if (statusNow === 'invoiced') expect(invoiced(number)).toBeCloseTo(Number(quotedPrice) - credit, 2);
    else expect(invoiced(number)).toBeLessThan(Number(quotedPrice) / 2);
  }
  expect(costs.invoices.filter(({ kind }) => kind === 'credit-note')).toHaveLength(1);
});
