import { type Workings, type WorkingsLine } from '@brakeven/contract';
import { checkWorkings } from './check-workings';
import { toLineView } from './line-view';

const line = (lineId: string, amount: string): WorkingsLine => ({
  lineId,
  on: '2026-11-02',
  postedOn: '2026-11-02',
  isLate: false,
  takesBackOn: null,
  category: 'labour',
  label: 'Jon Reyes',
  detail: null,
  job: '2231',
  operation: 'Form',
  machine: null,
  quantity: '1.5000',
  unit: 'hours',
  rate: '26.00',
  rateFactor: '1.28',
  rateValidFrom: '2026-03-01',
  amount,
  figure: null,
  source: null,
});

const US = { currency: 'USD', units: 'us' } as const;

const workings = (part: Partial<Workings>): Workings => ({
  figure: { figure: 'job.labour' },
  title: 'Labour',
  unit: 'money',
  amount: '0.30',
  rule: '',
  inputs: [],
  parts: [],
  lineCount: 0,
  lines: [],
  nextCursor: null,
  ...part,
});

describe('checkWorkings', () => {
  it('adds rows up exactly where floating point would not', () => {
    const [check] = checkWorkings(
      workings({ lineCount: 3, lines: [line('1', '0.10'), line('2', '0.10'), line('3', '0.10')] }),
      'USD',
    );
    expect(check).toEqual({ state: 'agrees', text: 'The 3 rows add up to $0.30, exactly the figure.' });
  });

  it('says by how much they do not agree, were it a cent', () => {
    const [check] = checkWorkings(workings({ lineCount: 1, lines: [line('1', '0.29')] }), 'USD');
    expect(check?.state).toBe('disagrees');
    expect(check?.text).toMatch(/^The one row makes \$0\.29, not \$0\.30\./);
  });

  it('does not judge while rows are missing', () => {
    const [check] = checkWorkings(workings({ lineCount: 240, lines: [line('1', '0.30')] }), 'USD');
    expect(check).toEqual({ state: 'open', text: '1 of 240 rows shown; they make $0.30 so far.' });
  });

  it('holds signed parts against the figure', () => {
    const parts = [
      { label: 'Earned', amount: '10.00', figure: null },
      { label: 'Running cost', amount: '-9.70', figure: null },
    ];
    expect(checkWorkings(workings({ parts }), 'USD').map(({ state }) => state)).toEqual(['agrees']);
  });

  it('holds parts and rows against the figure each by itself', () => {
    const parts = [{ label: 'Labour', amount: '0.30', figure: null }];
    const checks = checkWorkings(workings({ parts, lineCount: 1, lines: [line('1', '0.31')] }), 'USD');
    expect(checks.map(({ state }) => state)).toEqual(['agrees', 'disagrees']);
  });

  it('has nothing to say about a figure without rows', () => {
    expect(checkWorkings(workings({ amount: '0.00' }), 'USD')).toEqual([]);
  });
});

describe('toLineView', () => {
  it('shows how a line was computed, and where it belongs', () => {
    const view = toLineView(line('1', '49.92'), 'money', US);
    expect(view.sum).toBe('1.50\u00a0h × $26.00 × 1.28');
    expect(view.where).toBe('2231 · Form');
    expect(view.amount).toBe('$49.92');
  });

  it('leaves out what a line does not have', () => {
    const cost = {
      ...line('1', '1860.00'),
      quantity: null,
      unit: null,
      rate: null,
      rateFactor: null,
      job: null,
      operation: null,
    };
    const view = toLineView(cost, 'money', US);
    expect([view.sum, view.where, view.note]).toEqual(['', '', '']);
  });

  it('weighs material in the unit of the shop, at a price for it', () => {
    const material = {
      ...line('1', '47.08'),
      quantity: '50.0000',
      unit: 'kg' as const,
      rate: '0.9416',
      rateFactor: null,
      detail: '2 sheets',
    };
    expect(toLineView(material, 'money', US).sum).toBe('110.23\u00a0lb × $0.4271 per lb');
    const metric = toLineView(material, 'money', { currency: 'EUR', units: 'metric' });
    expect(metric.sum).toBe('50\u00a0kg × €0.9416 per kg');
    expect(metric.where).toBe('2 sheets · 2231 · Form');
  });

  it('says what a line takes back', () => {
    const taken = { ...line('1', '-49.92'), postedOn: '2026-12-01', isLate: true, takesBackOn: '2026-11-02' };
    expect(toLineView(taken, 'money', US).note).toBe(
      'Posted Dec 1, 2026: takes back what was posted Nov 2, 2026, since the row was voided',
    );
  });
});
