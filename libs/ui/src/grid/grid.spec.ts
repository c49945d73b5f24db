import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { of, throwError } from 'rxjs';
import { PROBLEM_WORDS } from '../problem-words';
import { WORKINGS_OPENER } from '../workings-opener';
import { Grid } from './grid';
import { type GridColumn, type GridTotals } from './grid-column';
import { type PageSource } from './page-source';

interface Row {
  id: string;
  job: string;
  cost: string;
}

const columns: GridColumn<Row>[] = [
  { id: 'job', header: 'Job', value: (row) => row.job, href: (row) => `/jobs/${row.id}` },
  {
    id: 'cost',
    header: 'Cost',
    kind: 'money',
    value: (row) => row.cost,
    figure: () => ({ figure: 'job.total' }),
  },
];

@Component({
  imports: [Grid],
  template: `
    <app-grid
      label="Jobs"
      [columns]="columns"
      [source]="source()"
      [rowId]="rowId"
      [totals]="totals()"
      (linkFollowed)="followed.push($event)"
    >
      <p empty>No jobs yet</p>
    </app-grid>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Host {
  readonly columns = columns;
  readonly rowId = (row: Row) => row.id;
  readonly source = signal<PageSource<Row>>({
    load: () => of({ items: [{ id: '1', job: '2231', cost: '1204.00' }], nextCursor: null }),
  });
  readonly totals = signal<GridTotals | null>({ cost: { value: '1204.00' } });
  readonly followed: string[] = [];
}

describe('Grid', () => {
  const opened: unknown[] = [];

  const render = async (awaited: string | string[], source?: PageSource<Row>) => {
    const fixture = TestBed.createComponent(Host);
    if (source) fixture.componentInstance.source.set(source);
    const element = fixture.nativeElement as HTMLElement;
    document.body.append(element);
    const deadline = Date.now() + 8_000;
    const isShown = () => [awaited].flat().every((part) => element.querySelector(part) !== null);
    while (!isShown() && Date.now() < deadline) {
      await fixture.whenStable();
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
    return { element, host: fixture.componentInstance };
  };

  beforeEach(() => {
    opened.length = 0;
    TestBed.configureTestingModule({
      providers: [
        { provide: WORKINGS_OPENER, useValue: { open: (ref: unknown) => opened.push(ref) } },
        { provide: PROBLEM_WORDS, useValue: () => ({ title: 'Not there', text: 'Nothing was changed.' }) },
      ],
    });
  });

  it('shows rows of the source with their figures and links, and the totals', async () => {
    const { element, host } = await render([
      'a[href="/jobs/1"]',
      '[row-index="0"] .figure',
      '[row-index="b-0"]',
    ]);
    element.querySelector<HTMLElement>('.figure')?.click();
    element.querySelector<HTMLElement>('a')?.click();
    expect(opened).toEqual([{ figure: 'job.total' }]);
    expect(host.followed).toEqual(['/jobs/1']);
    expect(element.querySelector('[row-index="b-0"]')?.textContent).toContain('$1,204.00');
  });

  it('shows what to do when there is no row', async () => {
    const { element } = await render('.empty', { load: () => of({ items: [], nextCursor: null }) });
    expect(element.querySelector('.empty')?.textContent).toContain('No jobs yet');
  });

  it('says what happened when rows cannot be loaded', async () => {
    const { element } = await render('[role=alert]', { load: () => throwError(() => new Error('down')) });
    expect(element.querySelector('[role=alert]')?.textContent).toContain('Not there');
  });
});
