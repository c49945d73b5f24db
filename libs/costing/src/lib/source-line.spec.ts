import { moneyText, toLocalDate, toMoney } from '@brakeven/values';
import { bookOf, entryOf } from '../../testing/example-shop';
import { computeEntryLines } from './entry-lines';
import { type SourceLine, toInvoiceLine, toOutsideLine, toSourceLine } from './source-line';

const on = toLocalDate('2026-03-02');
const figures = (line: SourceLine) => [line.quantity.toFixed(), line.rate.toFixed(), moneyText(line.amount)];

describe('lines of any row', () => {
  it('of a time entry are its own, known by the entry', () => {
    const [labour] = computeEntryLines(entryOf(), bookOf()).lines;
    if (!labour) throw new Error('Ana has a wage on that day.');
    const line = toSourceLine(labour);
    expect(line).toMatchObject({ sourceKind: 'time_entry', sourceId: 'entry-1', category: 'labour' });
    expect(line).toMatchObject({ jobId: 'job-1', rateId: 'pay-ana-1', amount: labour.amount });
    expect(line).not.toHaveProperty('entryId');
  });

  it('of outside work are its amount, once', () => {
    const service = {
      outsideServiceId: 'galvanizing',
      jobId: 'job-1',
      incurredOn: on,
      amount: toMoney('412.35'),
    };
    const line = toOutsideLine(service);
    expect(line).toMatchObject({
      sourceKind: 'outside_service',
      sourceId: 'galvanizing',
      category: 'outside',
    });
    expect(line).toMatchObject({ jobId: 'job-1', workedOn: on, rateId: null });
    expect(figures(line)).toEqual(['1', '412.35', '412.35']);
  });

  it('of a credit note count against the invoices', () => {
    const invoice = { invoiceId: 'i', jobId: 'job-1', invoicedOn: on, amount: toMoney('80') };
    expect(figures(toInvoiceLine({ ...invoice, kind: 'invoice' }))).toEqual(['1', '80', '80.00']);
    expect(figures(toInvoiceLine({ ...invoice, kind: 'credit-note' }))).toEqual(['-1', '80', '-80.00']);
  });
});
