import { type CategoryVariance, type JobDetail } from '@brakeven/contract';
import { findStatusSteps } from './job-status';
import { type SentencePart, toJobVerdict } from './job-verdict';
import { toVarianceWords } from './variance-words';

const job = (change: Partial<JobDetail>): JobDetail => ({
  jobId: '0190c6e0-0000-7000-8000-000000002231',
  number: '2231',
  customerId: null,
  customer: null,
  title: 'Conveyor guards',
  quantity: 24,
  openedOn: null,
  dueOn: null,
  quotedPrice: null,
  isBillable: true,
  status: 'open',
  lastWorkedOn: null,
  entriesWithoutRate: 0,
  hours: '80.0000',
  machineHours: '32.0000',
  total: '5000.00',
  invoiced: '0.00',
  margin: '-5000.00',
  estimate: '4000.00',
  variance: '1000.00',
  byOperation: [],
  byWeek: [],
  ...change,
});

const textOf = (parts: readonly SentencePart[] | undefined) =>
  (parts ?? []).map((part) => (typeof part === 'string' ? part : part.value)).join('');
const saidOf = (change: Partial<JobDetail>) => {
  const verdict = toJobVerdict(job(change));
  return [verdict?.tone, textOf(verdict?.headline), textOf(verdict?.sentence)];
};

describe('the verdict on a job', () => {
  it('says what a finished job made or lost, and how that stands to the estimate', () => {
    expect(saidOf({ status: 'finished', invoiced: '6250.00', margin: '1250.00' })).toEqual([
      'good',
      'Made 1250.00',
      'That is 20 % of what was invoiced. It cost 1000.00 more than estimated.',
    ]);
    const lost = { status: 'invoiced', invoiced: '4500.00', margin: '-500.00', variance: '-10.00' } as const;
    expect(saidOf(lost)).toEqual([
      'loss',
      'Lost 500.00',
      'That is 11 % of what was invoiced. It cost 10.00 less than estimated.',
    ]);
    expect(saidOf({ ...lost, estimate: null, variance: null })[2]).toContain('It was not estimated.');
  });

  it('does not call a job lost that is not invoiced in full yet', () => {
    const part = { status: 'finished', invoiced: '2000.00', margin: '-3000.00', isToInvoice: true } as const;
    expect(saidOf({ ...part, quotedPrice: '6250.00' }).slice(0, 2)).toEqual([
      'plan',
      'Done, and 2000.00 of 6250.00 invoiced',
    ]);
    expect(saidOf({ status: 'finished' }).slice(0, 2)).toEqual(['plan', 'Done, and not invoiced']);
  });

  it('holds what is spent against the estimate while the job runs', () => {
    expect(saidOf({})).toEqual([
      'loss',
      '5000.00 spent so far',
      'It is already 1000.00 above its estimate. Nothing is invoiced yet.',
    ]);
    expect(saidOf({ total: '1000.00', variance: '-3000.00', invoiced: '500.00' })).toEqual([
      'blue',
      '1000.00 spent so far',
      'That is 25 % of the 4000.00 estimated. 500.00 is invoiced.',
    ]);
    expect(saidOf({ total: '0.00', estimate: null, variance: null })[2]).toMatch(/no estimate/);
  });

  it('says what a quote would leave, and what work on a lost job cost', () => {
    const quoted = { status: 'quoted', total: '0.00', quotedPrice: '5000.00' } as const;
    expect(saidOf(quoted)[2]).toBe('It is estimated to cost 4000.00, which would leave 20 % of the price.');
    expect(saidOf({ ...quoted, quotedPrice: '3000.00' })[0]).toBe('loss');
    expect(saidOf({ status: 'lost', total: '0.00' })[2]).toBe('Nothing had been spent on it.');
    expect(saidOf({ isBillable: false })[1]).toBe('The shop’s own work cost 5000.00');
  });

  it('says nothing where no money is sent', () => {
    expect(toJobVerdict(job({ total: undefined, margin: undefined }))).toBeNull();
  });
});

describe('the words of a variance', () => {
  const format = { currency: 'USD', units: 'us', timeZone: 'UTC' } as const;
  const one = (change: Partial<CategoryVariance>): CategoryVariance => ({
    category: 'labour',
    estimate: '330.00',
    actual: '420.00',
    variance: '90.00',
    ratePart: '24.00',
    quantityPart: '66.00',
    estimatedQuantity: '10',
    actualQuantity: '12',
    ...change,
  });

  it('name how much more was used, and how much dearer it was', () => {
    expect(toVarianceWords(one({}), format)).toBe('2.00\u00a0h more; $2.00 per hour dearer');
    const metal = {
      category: 'material',
      estimatedQuantity: '45.359237',
      actualQuantity: '22.6796185',
    } as const;
    expect(
      toVarianceWords(one({ ...metal, estimate: '100.00', actual: '45.00', variance: '-55.00' }), format),
    ).toBe('50\u00a0lb less; $0.10 per lb cheaper');
  });

  it('say where one side is missing', () => {
    expect(toVarianceWords(one({ estimate: '0.00' }), format)).toBe('not in the estimate');
    expect(toVarianceWords(one({ actual: '0.00' }), format)).toBe('nothing spent');
    expect(toVarianceWords(one({ variance: '0.00' }), format)).toBe('as estimated');
    expect(toVarianceWords(one({ category: 'overtime', estimate: '0.00' }), format)).toBe(
      'overtime is not estimated',
    );
    const outside = { category: 'outside', estimatedQuantity: null, actualQuantity: null } as const;
    expect(toVarianceWords(one(outside), format)).toBe('dearer');
  });
});

describe('the steps of a job', () => {
  const labels = (status: JobDetail['status'], invoiced = '0.00') =>
    findStatusSteps({ status, invoiced }).map(({ label }) => label);

  it('lead on from where it stands, and back', () => {
    expect(labels('quoted')).toEqual(['Start work', 'Lost', 'Cancel job']);
    expect(labels('finished', '10.00')).toEqual(['All invoiced', 'Reopen']);
    expect(labels('lost')).toEqual(['Back to quoted']);
  });

  it('call nothing invoiced that is not', () => {
    expect(labels('finished')).toEqual(['Reopen']);
  });
});
