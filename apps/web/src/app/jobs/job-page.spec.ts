import { HttpErrorResponse } from '@angular/common/http';
import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type FigureRef, type JobDetail, type JobLineQuery } from '@brakeven/contract';
import { Grid, type PageSource, WORKINGS_OPENER } from '@brakeven/ui';
import { firstValueFrom, NEVER, of, throwError } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { JobCharts } from './job-charts';
import { JobPage } from './job-page';

const jobId = '0190c6e0-0000-7000-8000-000000002231';
const hours = { hours: '80.0000', machineHours: '32.0000' };
const money = { labour: '2662.40', machine: '1328.00', overhead: '1440.00', total: '5430.40' };
const withoutMoney: JobDetail = {
  jobId,
  number: '2231',
  customerId: '0190c6e0-0000-7000-8000-00000000c001',
  customer: 'Coldwater Grain Co-op',
  title: 'Conveyor guards',
  quantity: 24,
  openedOn: null,
  dueOn: '2026-12-04',
  isBillable: false,
  status: 'open',
  lastWorkedOn: '2026-11-24',
  entriesWithoutRate: 2,
  ...hours,
  byOperation: [{ operationId: 'op', operation: 'Form', ...hours }],
  byWeek: [],
};
const withMoney: JobDetail = {
  ...withoutMoney,
  ...money,
  quotedPrice: '7059.50',
  byOperation: [{ operationId: 'op', operation: 'Form', ...hours, ...money }],
};

describe('JobPage', () => {
  const opened: FigureRef[] = [];
  const asked: Partial<JobLineQuery>[] = [];

  const render = async (job: JobDetail | HttpErrorResponse) => {
    const answer = job instanceof HttpErrorResponse ? throwError(() => job) : of(job);
    const listJobLines = (_: string, query: Partial<JobLineQuery>) => {
      asked.push(query);
      return of({ items: [], nextCursor: null });
    };
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: JobsApi, useValue: { getJob: () => answer, listJobLines } },
        { provide: SessionStore, useValue: { can: () => false } },
        { provide: RollupStore, useValue: { rolledUp: NEVER } },
        { provide: WORKINGS_OPENER, useValue: { open: (ref: FigureRef) => opened.push(ref) } },
      ],
    });
    TestBed.overrideComponent(JobPage, {
      remove: { imports: [Grid, JobCharts] },
      add: { schemas: [NO_ERRORS_SCHEMA] },
    });
    const fixture = TestBed.createComponent(JobPage);
    fixture.componentRef.setInput('jobId', jobId);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    const loadLines = async () => {
      const { source } = element.querySelector('app-grid') as unknown as { source: PageSource<unknown> };
      await firstValueFrom(source.load({ cursor: 'c', sort: undefined, direction: undefined, limit: 100 }));
    };
    return { fixture, element, loadLines };
  };

  beforeEach(() => (opened.length = asked.length = 0));

  it('opens every figure of the head and of each operation', async () => {
    const { element } = await render(withMoney);
    const press = (selector: string) =>
      element.querySelectorAll<HTMLElement>(selector).forEach((button) => button.click());
    press('.strip button');
    expect(opened.map(({ figure }) => figure)).toEqual([
      'job.total',
      'job.invoiced',
      'job.margin',
      'job.workInProgress',
      'job.hours',
      'job.machineHours',
      'job.labour',
      'job.overtime',
      'job.machine',
      'job.overhead',
      'job.material',
      'job.outside',
    ]);
    opened.length = 0;
    press('app-operation-table button');
    expect(opened).toHaveLength(6);
    expect(opened.at(-1)).toEqual({ figure: 'job.total', jobId, operationId: 'op' });
  });

  it('says that a cost is not complete', async () => {
    const { element } = await render(withMoney);
    expect(element.querySelector('.remark')?.textContent?.replace(/\s+/g, ' ')).toContain(
      '2 entries have no rate',
    );
  });

  it('lists the lines of one category when asked', async () => {
    const { fixture, element, loadLines } = await render(withMoney);
    await loadLines();
    [...element.querySelectorAll<HTMLElement>('.chip')]
      .find((chip) => chip.textContent?.trim() === 'Machine')
      ?.click();
    await fixture.whenStable();
    await loadLines();
    expect(asked.map(({ category }) => category)).toEqual([undefined, 'machine']);
  });

  it('shows no money to a role to which none is sent, and each entry once', async () => {
    const { element, loadLines } = await render(withoutMoney);
    await loadLines();
    expect(element.textContent).not.toContain('$');
    expect(element.querySelector('.strip')?.textContent).toContain('Hours so far');
    expect(asked).toEqual([{ cursor: 'c', limit: 100, category: 'labour' }]);
  });

  it('says what to do while no time is on the job', async () => {
    const { element } = await render({ ...withMoney, total: '0.00', lastWorkedOn: null });
    expect(element.querySelector('app-empty-state')?.textContent).toContain('No time on this job yet');
    // Nor is anybody led to a page that is not for their role.
    expect(element.querySelector('app-empty-state a')).toBeNull();
    expect(element.querySelector('app-grid')).toBeNull();
  });

  it('says that there is no such job, with a way back', async () => {
    const error = { code: 'not_found', detail: 'There is no such job.', issues: [] };
    const { element } = await render(new HttpErrorResponse({ status: 404, error }));
    expect(element.querySelector('[role=alert]')?.textContent).toContain('There is no such job.');
    expect(element.querySelector('[role=alert] a')?.getAttribute('href')).toBe('/jobs');
  });
});
