import { D, hoursText, moneyText, toMoney } from '@brakeven/values';
import { bookOf, entryOf } from '../../testing/example-shop';
import { computeLines, type CostedEntry } from './entry-lines';
import { computeJobCost, JOB_STATUSES, type JobCostLine, type JobStanding, type JobStatus } from './job-cost';

function costOf(entries: CostedEntry[], book = bookOf()) {
  const { lines, gaps } = computeLines(entries, book);
  const cost = computeJobCost(lines, gaps);
  return {
    hours: hoursText(cost.hours),
    machineHours: hoursText(cost.machineHours),
    labour: moneyText(cost.labour),
    machine: moneyText(cost.machine),
    overhead: moneyText(cost.overhead),
    total: moneyText(cost.total),
    earned: moneyText(cost.earned),
    gapCount: cost.gapCount,
  };
}

describe('the cost of a job', () => {
  it('is the sum of its lines, hours counted once for each entry', () => {
    // labour 234.00 + 2.25 × 19.75 × 1.2825 = 56.99; machine 138.00; overhead 96.00 + 28.80; earned 712.50
    const entries = [
      entryOf({ entryId: 'a' }),
      entryOf({ entryId: 'b', employeeId: 'ben', machineId: null, hours: '2.25' }),
    ];
    expect(costOf(entries)).toEqual({
      hours: '9.7500',
      machineHours: '7.5000',
      labour: '290.99',
      machine: '138.00',
      overhead: '124.80',
      total: '553.79',
      earned: '712.50',
      gapCount: 0,
    });
  });

  it('adds rounded lines: three thirds of an hour are three lines of a third', () => {
    // 0.3333 × 24 × 1.30 = 10.39896 → 10.40, three times 31.20; the hours together would be 31.19688
    const entries = ['a', 'b', 'c'].map((entryId) => entryOf({ entryId, hours: '0.3333', machineId: null }));
    expect(costOf(entries)).toMatchObject({ hours: '0.9999', labour: '31.20' });
  });

  it('says how many lines are missing, and still counts the hours', () => {
    const book = bookOf({ overheadRates: [], machineRates: new Map() });
    expect(costOf([entryOf({ employeeId: 'newcomer' })], book)).toMatchObject({
      hours: '7.5000',
      machineHours: '7.5000',
      total: '0.00',
      gapCount: 5,
    });
  });

  it('of no entries is nought', () => {
    expect(costOf([])).toMatchObject({ hours: '0.0000', total: '0.00', gapCount: 0 });
  });
});

describe('the cost of a job in every category', () => {
  const line = (category: JobCostLine['category'], amount: string, quantity = '1'): JobCostLine => ({
    category,
    amount: toMoney(amount),
    quantity: D(quantity),
  });
  const lines = [
    line('labour', '200.00', '8'),
    line('overtime', '12.50', '8'),
    line('machine', '90.00', '5'),
    line('overhead', '60.00', '8'),
    line('material', '310.20', '120.5'),
    line('material', '-18.10', '-7'),
    line('outside', '75.00'),
    line('invoiced', '900.00'),
    line('invoiced', '-100.00', '-1'),
    line('earned', '475.00', '5'),
    line('running', '30.00', '5'),
  ];
  const costIn = (status: JobStatus, of = lines, standing: Partial<JobStanding> = {}) =>
    computeJobCost(of, [], { status, isBillable: true, quotedPrice: null, ...standing });

  it('adds up what it is made of, and leaves income and payback out of it', () => {
    // 200 + 12.50 + 90 + 60 + 292.10 + 75 = 729.60; 800 − 729.60 = 70.40
    const cost = costIn('finished');
    const texts = Object.entries(cost).flatMap(([key, value]) =>
      typeof value === 'object' ? [[key, moneyText(toMoney(value))]] : [],
    );
    expect(Object.fromEntries(texts)).toEqual({
      hours: '8.00',
      machineHours: '5.00',
      labour: '200.00',
      overtime: '12.50',
      machine: '90.00',
      overhead: '60.00',
      material: '292.10',
      outside: '75.00',
      total: '729.60',
      invoiced: '800.00',
      margin: '70.40',
      workInProgress: '0.00',
      earned: '475.00',
    });
  });

  it('has a margin that is provisional until the job is finished or invoiced', () => {
    const provisional = JOB_STATUSES.filter((status) => costIn(status).marginIsProvisional);
    expect(provisional).toEqual(['quoted', 'open', 'lost', 'cancelled']);
  });

  it('is work in progress as far as it is not invoiced, while the job is open or finished', () => {
    const uninvoiced = lines.filter((of) => of.category !== 'invoiced' || of.quantity.lt(0));
    const inProgress = JOB_STATUSES.map((status) => moneyText(costIn(status, uninvoiced).workInProgress));
    expect(inProgress).toEqual(['0.00', '829.60', '829.60', '0.00', '0.00', '0.00']);
  });

  it('is no work in progress where nobody will be invoiced', () => {
    const ownWork = costIn('open', lines.slice(0, 1), { isBillable: false });
    expect(moneyText(ownWork.workInProgress)).toBe('0.00');
  });

  it('is to be invoiced once it is finished, until invoices come to the quoted price', () => {
    const quotedPrice = toMoney('800.01');
    const waiting = JOB_STATUSES.filter((status) => costIn(status, lines, { quotedPrice }).isToInvoice);
    expect(waiting).toEqual(['finished']);
    const isToInvoice = (of: typeof lines, standing: Partial<JobStanding>) =>
      costIn('finished', of, standing).isToInvoice;
    expect(isToInvoice(lines, { quotedPrice: toMoney('800') })).toBe(false);
    expect(isToInvoice(lines, {})).toBe(false);
    expect(isToInvoice([], {})).toBe(true);
    expect(isToInvoice([], { isBillable: false })).toBe(false);
  });

  it('counts what is taken back against cost and hours', () => {
    const back = lines.map(({ category, amount, quantity }) =>
      line(category, `${amount.negated()}`, `${quantity.negated()}`),
    );
    const cost = costIn('open', [...lines, ...back]);
    expect([hoursText(cost.hours), hoursText(cost.machineHours)]).toEqual(['0.0000', '0.0000']);
    expect([moneyText(cost.total), moneyText(cost.invoiced), moneyText(cost.margin)]).toEqual([
      '0.00',
      '0.00',
      '0.00',
    ]);
  });
});
