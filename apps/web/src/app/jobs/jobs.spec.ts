import { type Job, type JobDetail } from '@brakeven/contract';
import { type ChartPalette } from '@brakeven/ui';
import { toCategorySummary, toCategoryTable, toWeekChartOption, toWeekTable } from './job-chart-options';
import { toJobColumns, toJobTotals, toStandardColumns } from './job-columns';
import { parsePieces, toJobForm, toJobInput } from './job-form';
import { isJobStatus, toStatusWord } from './job-status';
import { toLineColumns } from './line-columns';

const job: Job = {
  jobId: '0190c6e0-0000-7000-8000-000000002231',
  number: '2231',
  customerId: null,
  customer: null,
  title: 'Conveyor guards',
  quantity: 24,
  openedOn: null,
  dueOn: '2026-12-04',
  quotedPrice: '7059.50',
  isBillable: true,
  status: 'open',
  lastWorkedOn: '2026-11-24',
  entriesWithoutRate: 0,
  hours: '80.0000',
  machineHours: '32.0000',
  labour: '2662.40',
  machine: '1328.00',
  overhead: '1440.00',
  total: '5430.40',
};

describe('the columns of the jobs grid', () => {
  const idsOf = (withMoney: boolean) => toJobColumns(withMoney).map(({ id }) => id);

  it('hold money only for those who may see it', () => {
    expect(idsOf(true)).toEqual(expect.arrayContaining(['labour', 'total', 'quotedPrice']));
    const money = ['labour', 'machine', 'overhead', 'total', 'quotedPrice'];
    expect(idsOf(false).filter((id) => money.includes(id))).toEqual([]);
  });

  it('open each figure for its job', () => {
    const total = toJobColumns(true).find(({ id }) => id === 'total');
    expect(total?.figure?.(job)).toEqual({ figure: 'job.total', jobId: job.jobId });
  });

  it('mark a cost that is not the whole', () => {
    const total = toJobColumns(true).find(({ id }) => id === 'total');
    expect(total?.note?.(job)).toBeNull();
    expect(total?.note?.({ ...job, entriesWithoutRate: 2 })?.severity).toBe('warning');
  });

  it('call a margin a loss once a billable job is done and invoiced', () => {
    const margin = toJobColumns(true).find(({ id }) => id === 'margin');
    const done = {
      ...job,
      isBillable: true,
      margin: '-5.00',
      marginIsProvisional: false,
      isToInvoice: false,
    };
    expect(margin?.isLoss?.(done)).toBe(true);
    expect(margin?.isLoss?.({ ...done, margin: '5.00' })).toBe(false);
    expect(margin?.isLoss?.({ ...done, marginIsProvisional: true })).toBe(false);
    expect(margin?.isLoss?.({ ...done, isToInvoice: true })).toBe(false);
    expect(margin?.isLoss?.({ ...done, isBillable: false })).toBe(false);
  });
});

describe('toJobTotals', () => {
  it('open over the same filter as the rows', () => {
    const totals = toJobTotals(
      { jobs: 1, hours: '80.0000', machineHours: '32.0000', total: '5430.40' },
      { status: 'open' },
    );
    expect(totals['total']).toEqual({ value: '5430.40', figure: { figure: 'job.total', status: 'open' } });
    expect(totals['labour']?.value).toBeNull();
    expect(totals['title']?.value).toBe('1 job');
  });

  it('begin on a telephone with what came of a job, or with its hours', () => {
    expect(toStandardColumns(true, true).slice(0, 4)).toEqual(['number', 'title', 'margin', 'status']);
    expect(toStandardColumns(false, true).slice(0, 4)).toEqual(['number', 'title', 'hours', 'status']);
    expect([...toStandardColumns(true, true)].sort()).toEqual([...toStandardColumns(true)].sort());
  });

  it('say of how many jobs the variance is', () => {
    const wordsOf = (comparedJobs: number) =>
      toJobTotals({ jobs: 12, comparedJobs, hours: '80.0000', machineHours: '32.0000' }, {})['customer']
        ?.value;
    expect(wordsOf(7)).toBe('7 with variance');
    expect(wordsOf(12)).toBeNull();
  });
});

describe('toLineColumns', () => {
  it('lead each line to its cell', () => {
    const source = { importId: 'i', fileName: 'Week 47.xlsx', sheet: 'Hours', row: 7, cell: 'F7' };
    const line = { source } as Parameters<NonNullable<ReturnType<typeof toLineColumns>[number]['href']>>[0];
    const column = toLineColumns(false, { currency: 'USD', units: 'us', timeZone: 'UTC' }).at(-1);
    expect(column?.value(line)).toBe('F7 · Hours · Week 47.xlsx');
    expect(column?.href?.(line)).toBe('/timesheets/i?sheet=Hours&row=7&cell=F7');
    expect(column?.href?.({ ...line, source: null })).toBeNull();
  });
});

describe('the form of a job', () => {
  it('gives back what it was given', () => {
    expect(toJobInput(toJobForm(job))).toEqual({
      number: '2231',
      customer: null,
      title: 'Conveyor guards',
      quantity: 24,
      openedOn: null,
      dueOn: '2026-12-04',
      quotedPrice: '7059.50',
      isBillable: true,
      status: 'open',
    });
  });

  it('sends empty fields as absent, never as 0', () => {
    const form = toJobForm(null);
    form.patchValue({ number: ' 2260 ', title: 'Drip trays', customer: '  ' });
    expect(form.valid).toBe(true);
    expect(toJobInput(form)).toMatchObject({
      number: '2260',
      customer: null,
      quantity: null,
      quotedPrice: null,
      dueOn: null,
    });
  });

  it('refuses a price and a number of pieces that cannot be read', () => {
    const form = toJobForm(job);
    form.patchValue({ quotedPrice: '7,05', quantity: '2.5' });
    expect(form.controls.quotedPrice.invalid).toBe(true);
    expect(form.controls.quantity.errors?.['parsed']).toMatch(/whole number such as 24/);
    form.patchValue({ quotedPrice: '$7,059.50', quantity: '1,000' });
    expect(toJobInput(form)).toMatchObject({ quotedPrice: '7059.50', quantity: 1000 });
  });

  it('reads pieces from 1 to a million', () => {
    expect(parsePieces('1000000')).toEqual({ ok: true, value: 1_000_000 });
    for (const text of ['0', '-3', '1000001', 'a dozen', '']) expect(parsePieces(text).ok).toBe(false);
  });
});

describe('the picture of a job', () => {
  const detail: JobDetail = {
    ...job,
    byOperation: [],
    byWeek: [{ weekFrom: '2026-11-22', hours: '20.0000', total: '1357.60' }],
  };
  const palette = new Proxy({}, { get: (_, name) => String(name) }) as ChartPalette;

  it('says each category with its share', () => {
    expect(toCategorySummary(detail, 'USD')).toBe(
      'Labour $2,662.40 · 49 %, Machine $1,328.00 · 24 %, Overhead $1,440.00 · 27 %',
    );
    expect(toCategoryTable({ ...detail, total: '0.00' }).rows[0]).toEqual([
      'Labour',
      { value: '2662.40', ref: { figure: 'job.labour', jobId: detail.jobId } },
      '0 %',
    ]);
  });

  it('shows cost by week, or hours where money is not sent', () => {
    const valuesOf = (shown: JobDetail) => {
      const [series] = toWeekChartOption(shown, 'USD', palette)['series'] as [
        { name: string; data: number[] },
      ];
      return [series.name, series.data];
    };
    const withoutMoney = {
      ...detail,
      total: undefined,
      byWeek: [{ weekFrom: '2026-11-22', hours: '20.0000' }],
    };
    expect(valuesOf(detail)).toEqual(['Cost', [1357.6]]);
    expect(valuesOf(withoutMoney)).toEqual(['Hours', [20]]);
    const week = { jobId: detail.jobId, from: '2026-11-22', to: '2026-11-28' };
    expect(toWeekTable(withoutMoney)).toEqual({
      headers: ['Week from', 'Hours'],
      rows: [['Nov 22, 2026', { value: '20.0000', unit: 'hours', ref: { figure: 'job.hours', ...week } }]],
    });
  });
});

describe('statuses', () => {
  it('are known by name', () => {
    expect(isJobStatus('open')).toBe(true);
    expect(isJobStatus('opened')).toBe(false);
    expect(toStatusWord('quoted')).toBe('Quoted');
  });
});
