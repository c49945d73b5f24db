import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { JOB_COST_CATEGORIES, type FigureRef, type JobDetail, type JobLine } from '@brakeven/contract';
import { Chart, Grid, type GridColumn, WORKINGS_OPENER } from '@brakeven/ui';
import { NEVER, of } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { toCategoryTable, toComparisonTable, toWeekTable } from '../jobs/job-chart-options';
import { toJobColumns, toJobTotals } from '../jobs/job-columns';
import { JobPage } from '../jobs/job-page';
import { toLineColumns } from '../jobs/line-columns';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { findClosedFigures } from '../testing/closed-figures';

const jobId = '0190c6e0-0000-7000-8000-000000002231';
const COST = {
  hours: '80.0000',
  machineHours: '32.0000',
  labour: '2662.40',
  overtime: '41.15',
  machine: '1328.00',
  overhead: '1440.00',
  material: '612.08',
  outside: '310.00',
  total: '6393.63',
};
const VARIANCE = {
  estimate: '1000.00',
  actual: '1100.00',
  variance: '100.00',
  ratePart: '140.00',
  quantityPart: '-40.00',
};

const job: JobDetail = {
  ...COST,
  jobId,
  number: '2231',
  customerId: '0190c6e0-0000-7000-8000-00000000c001',
  customer: 'Coldwater Grain Co-op',
  title: 'Conveyor guards',
  quantity: 24,
  openedOn: null,
  dueOn: '2026-12-04',
  isBillable: true,
  status: 'finished',
  lastWorkedOn: '2026-11-24',
  entriesWithoutRate: 0,
  quotedPrice: '7059.50',
  invoiced: '7059.50',
  margin: '665.87',
  marginIsProvisional: false,
  workInProgress: '0.00',
  estimate: '6000.00',
  estimatedHours: '75.0000',
  variance: '393.63',
  byOperation: [{ operationId: 'op', operation: 'Form', estimatedHours: '75.0000', ...COST }],
  byWeek: [{ weekFrom: '2026-11-22', hours: '20.0000', total: '1357.60' }],
  comparison: {
    estimatedOn: '2026-10-01',
    categories: JOB_COST_CATEGORIES.map((category) => ({
      ...VARIANCE,
      category,
      estimatedQuantity: '70',
      actualQuantity: '80',
    })),
    total: VARIANCE,
  },
};

describe('every amount of money and hours', () => {
  const opened: FigureRef[] = [];

  const render = async (shown: JobDetail) => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: JobsApi, useValue: { getJob: () => of(shown), listJobLines: () => NEVER } },
        { provide: SessionStore, useValue: { can: () => false } },
        { provide: RollupStore, useValue: { rolledUp: NEVER } },
        { provide: WORKINGS_OPENER, useValue: { open: (ref: FigureRef) => opened.push(ref) } },
      ],
    });
    TestBed.overrideComponent(Chart, {
      set: { imports: [], providers: [], template: '', schemas: [NO_ERRORS_SCHEMA] },
    });
    TestBed.overrideComponent(JobPage, {
      remove: { imports: [Grid] },
      add: { schemas: [NO_ERRORS_SCHEMA] },
    });
    const fixture = TestBed.createComponent(JobPage);
    fixture.componentRef.setInput('jobId', jobId);
    await fixture.whenStable();
    return fixture.nativeElement as HTMLElement;
  };

  it.each(['finished', 'open', 'lost'] as const)('on the page of a job that is %s opens', async (status) => {
    const element = await render({ ...job, status });
    opened.length = 0;
    const figures = element.querySelectorAll<HTMLElement>('button.figure');
    figures.forEach((figure) => figure.click());
    expect(findClosedFigures(element, '.why')).toEqual([]);
    expect(opened).toHaveLength(figures.length);
    expect(new Set(opened.map(({ figure }) => figure)).size).toBeGreaterThan(15);
  });

  it('in the tables of a job’s charts opens', () => {
    for (const { rows } of [toCategoryTable(job), toWeekTable(job), toComparisonTable(job)]) {
      const words = rows.flat().filter((cell) => typeof cell === 'string');
      expect(words.filter((word) => /\$|\d\.\d/.test(word))).toEqual([]);
      expect(rows.flat().length).toBeGreaterThan(words.length);
    }
  });

  it('in the grid of jobs opens, in each row and in the totals', () => {
    const columns = toJobColumns(true);
    const numbers = columns.filter(isFigure);
    expect(numbers.length).toBeGreaterThan(14);
    expect(numbers.filter((column) => column.value(job) && !column.figure?.(job))).toEqual([]);
    const totals = toJobTotals(
      { ...job, jobs: 1, quotedPrice: '7059.50', entriesWithoutRate: 0 } as never,
      {},
    );
    for (const { id } of numbers) expect([id, Boolean(totals[id]?.figure)]).toEqual([id, true]);
  });

  it('in a job’s lines opens where it is no product of hours and a rate', () => {
    const amount = toLineColumns(true, { currency: 'USD', units: 'us', timeZone: 'UTC' }).find(
      ({ id }) => id === 'amount',
    );
    const figure: FigureRef = { figure: 'stock.issue', issueId: 'i' };
    expect(amount?.figure?.({ figure } as JobLine)).toBe(figure);
  });
});

function isFigure<T>({ kind }: GridColumn<T>): boolean {
  return kind === 'money' || kind === 'hours';
}
