import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { type Role, type TimeEntry } from '@brakeven/contract';
import { Grid, type GridColumn, type GridOrder, type PageSource } from '@brakeven/ui';
import { of } from 'rxjs';
import { EntriesApi } from '../api/entries-api';
import { MonthsApi } from '../api/months-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { HoursPage } from './hours-page';

/** The grid's place, without the grid: what it is asked to show. */
@Component({
  selector: 'app-grid',
  template: '<ng-content select="[empty]" />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class FakeGrid {
  readonly label = input<string>();
  readonly stateKey = input<string>();
  readonly columns = input<readonly GridColumn<TimeEntry>[]>([]);
  readonly source = input<PageSource<TimeEntry>>();
  readonly rowId = input<(row: TimeEntry) => string>();
  readonly totals = input<unknown>();
  readonly order = input<GridOrder>();
  readonly orderChanged = output<GridOrder>();
  readonly linkFollowed = output<string>();
}

const entry = { entryId: 'e1', employee: 'Jo Alvarez', hours: '7.5000', workedOn: '2026-11-23' } as TimeEntry;

describe('HoursPage', () => {
  const api = {
    list: jest.fn(),
    getTotals: jest.fn(),
    getChoices: jest.fn(),
    void: jest.fn(),
    restore: jest.fn(),
  };

  const monthsApi = { list: jest.fn() };

  beforeEach(() => {
    jest.resetAllMocks();
    monthsApi.list.mockReturnValue(of({ closedThrough: null, latePostedOn: null, months: [], closings: [] }));
    window.matchMedia = jest.fn().mockReturnValue({ matches: false });
    api.list.mockReturnValue(of({ items: [], nextCursor: null }));
    api.getTotals.mockReturnValue(of({ entries: 12, hours: '81.2500', goodPieces: 90, scrapPieces: 1 }));
    api.getChoices.mockReturnValue(
      of({ employees: [{ id: 'p1', label: 'Jo' }], operations: [], machines: [] }),
    );
  });

  const open = async (role: Role, inputs: Parameters<typeof render<HoursPage>>[1] = {}) => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideSession(role),
        { provide: EntriesApi, useValue: api },
        { provide: MonthsApi, useValue: monthsApi },
        { provide: RollupStore, useValue: { refresh: jest.fn() } },
      ],
    });
    TestBed.overrideComponent(HoursPage, { remove: { imports: [Grid] }, add: { imports: [FakeGrid] } });
    const page = await render(HoursPage, inputs);
    const grid = page.fixture.debugElement.query((one) => one.componentInstance instanceof FakeGrid)
      .componentInstance as FakeGrid;
    return { page, grid };
  };

  it('asks the server for what the address asks, and sums it in words', async () => {
    const { page, grid } = await open('owner', {
      period: 'custom',
      from: '2026-11-01',
      search: 'jo',
      importId: 'i1',
    });
    grid.source()?.load({ cursor: 'c', sort: 'hours', direction: 'asc', limit: 100 }).subscribe();
    const filter = { from: '2026-11-01', search: 'jo', importId: 'i1' };
    expect(api.list).toHaveBeenCalledWith(
      expect.objectContaining({ ...filter, cursor: 'c', sort: 'hours', direction: 'asc', limit: 100 }),
    );
    expect(api.getTotals).toHaveBeenCalledWith(expect.objectContaining(filter));
    expect(page.text).toContain('81.25 h in 12 entries · Nov 1, 2026 and later');
  });

  it('says that changes in a closed month are posted late, where its days are shown', async () => {
    const closed = { closedThrough: '2026-10-31', latePostedOn: '2026-11-01', months: [], closings: [] };
    monthsApi.list.mockReturnValue(of(closed));
    const words = 'closed through Oct 31, 2026';
    const { page, grid } = await open('bookkeeper', { period: 'all' });
    expect(page.text).toContain(words);
    api.void.mockReturnValue(of(undefined));
    const late = { ...entry, workedOn: '2026-10-30' };
    const column = grid.columns().find(({ id }) => id === 'actions');
    column?.actions?.(late)[0]?.run();
    expect(TestBed.inject(Notifier).notice()?.text).toContain('it is taken back on Nov 1, 2026, late.');
    await page.set({ period: 'custom', from: '2026-11-01' });
    expect(page.text).not.toContain(words);
    TestBed.resetTestingModule();
    monthsApi.list.mockClear();
    await open('lead');
    expect(monthsApi.list).not.toHaveBeenCalled();
  });

  it('keeps what is chosen in the address', async () => {
    const { page } = await open('owner');
    const navigate = jest.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    await page.enter('select[aria-label=Employee]', 'p1');
    await page.press('This month');
    const params = navigate.mock.calls.map(([, extras]) => extras?.queryParams);
    expect(params).toEqual([{ employeeId: 'p1' }, { period: 'this-month', from: null, to: null }]);
  });

  it('voids an entry and offers to take that back', async () => {
    api.void.mockReturnValue(of(null));
    api.restore.mockReturnValue(of(null));
    const { grid } = await open('bookkeeper');
    Object.assign(grid, { refresh: jest.fn() });
    const actions = grid.columns().find(({ id }) => id === 'actions');
    actions?.actions?.(entry)[0]?.run();
    const notice = TestBed.inject(Notifier).notice();
    expect(notice?.text).toBe('Voided 7.50 h of Jo Alvarez, Nov 23, 2026.');
    notice?.action?.run();
    expect(api.restore).toHaveBeenCalledWith('e1');
  });

  it('shows an operator the own hours only, says so, and offers nothing to change', async () => {
    const { page, grid } = await open('operator');
    expect(page.text).toContain('You see your own hours.');
    expect(page.all('select[aria-label=Employee]')).toHaveLength(0);
    expect(grid.columns().map(({ id }) => id)).not.toContain('employee');
    expect(grid.columns().map(({ id }) => id)).not.toContain('actions');
  });

  it('says what to do when there are no hours at all, and how to see more when they are filtered away', async () => {
    const { page } = await open('bookkeeper', { period: 'all' });
    expect(page.text).toContain('No hours yet Drop the first week’s timesheet');
    await page.set({ period: 'this-month' });
    expect(page.text).toContain('No hours in this time');
    expect(page.find('Go to Timesheets')).toBeTruthy();
    await page.set({ search: 'nobody' });
    expect(page.text).toContain('No hours here');
    expect(page.find('Show all hours')).toBeTruthy();
  });
});
