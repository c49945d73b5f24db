import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router } from '@angular/router';
import { type Permission, type SavedView } from '@brakeven/contract';
import { EmptyState, Grid, type GridTotals, type PageSource } from '@brakeven/ui';
import { firstValueFrom, NEVER, of } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { SavedViewsApi } from '../api/saved-views-api';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { JobsPage } from './jobs-page';

interface GridInputs {
  columns: { id: string }[];
  order: object;
  source: PageSource<unknown>;
  totals: GridTotals | null;
}

describe('JobsPage', () => {
  const asked: object[] = [];
  const addresses: object[] = [];
  let savedViews: SavedView[] = [];

  const render = async (may: readonly Permission[], address: Record<string, string> = {}) => {
    window.matchMedia = jest.fn().mockReturnValue({ matches: false });
    const page = {
      items: [],
      nextCursor: null,
      totals: { jobs: 3, hours: '12.0000', machineHours: '4.0000' },
    };
    TestBed.configureTestingModule({
      providers: [
        {
          provide: JobsApi,
          useValue: {
            listJobs: (query: object) => (asked.push(query), of(page)),
            listCustomers: () => of([{ customerId: 'c1', name: 'Northgate Conveyors' }]),
          },
        },
        { provide: SavedViewsApi, useValue: { listSavedViews: () => of(savedViews) } },
        { provide: SessionStore, useValue: { can: (permission: Permission) => may.includes(permission) } },
        { provide: RollupStore, useValue: { rolledUp: NEVER } },
        {
          provide: Router,
          useValue: {
            navigate: (_: unknown, { queryParams }: { queryParams: object }) => addresses.push(queryParams),
          },
        },
      ],
    });
    // The grid has a spec of its own; here it is an element that keeps what it is given.
    TestBed.overrideComponent(JobsPage, {
      remove: { imports: [EmptyState, Grid] },
      add: { schemas: [NO_ERRORS_SCHEMA] },
    });
    const fixture = TestBed.createComponent(JobsPage);
    for (const [name, value] of Object.entries(address)) fixture.componentRef.setInput(name, value);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    const grid = () => element.querySelector('app-grid') as unknown as GridInputs;
    const chip = (word: string) =>
      [...element.querySelectorAll<HTMLElement>('.chip')].find(
        (button) => button.textContent?.trim() === word,
      );
    return { fixture, element, grid, chip };
  };

  beforeEach(() => {
    asked.length = addresses.length = 0;
    savedViews = [];
    localStorage.clear();
  });

  it('asks for what the address says, page by page, and shows totals over the same jobs', async () => {
    const { fixture, grid, chip, element } = await render(['jobs.money'], {
      search: 'trench',
      status: 'open',
    });
    const request = { cursor: 'c1', sort: 'total', direction: 'asc', limit: 100 } as const;
    await firstValueFrom(grid().source.load(request));
    await fixture.whenStable();
    expect(asked).toEqual([{ search: 'trench', status: 'open', ...request }]);
    expect(grid().totals?.['hours']?.figure).toEqual({
      figure: 'job.hours',
      search: 'trench',
      status: 'open',
    });
    expect(chip('Open')?.getAttribute('aria-pressed')).toBe('true');
    expect(element.querySelector<HTMLInputElement>('#job-search')?.value).toBe('trench');
  });

  it('ignores a status in the address that there is not', async () => {
    const { grid } = await render([], { status: 'opened' });
    await firstValueFrom(
      grid().source.load({ cursor: undefined, sort: undefined, direction: undefined, limit: 1 }),
    );
    expect(asked[0]).not.toHaveProperty('status');
  });

  it('puts search and status into the address, and takes them out again', async () => {
    const { element, chip } = await render([], { status: 'open' });
    chip('Lost')?.click();
    chip('Open')?.click();
    const box = element.querySelector<HTMLInputElement>('#job-search');
    if (!box) throw new Error('There is no search.');
    box.value = ' hopper ';
    box.dispatchEvent(new Event('input'));
    await new Promise((resolve) => setTimeout(resolve, 400));
    expect(addresses).toEqual([{ status: 'lost' }, { status: null }, { search: 'hopper' }]);
  });

  it('offers a new job only to those who may add one', async () => {
    expect((await render(['jobs.edit'])).element.textContent).toContain('New job');
    TestBed.resetTestingModule();
    expect((await render([])).element.textContent).not.toContain('New job');
  });

  const idsOf = (columns: { id: string }[]) => columns.map(({ id }) => id);
  const link = (element: HTMLElement, word: string) =>
    [...element.querySelectorAll('a')].find((one) => one.textContent?.trim() === word)?.getAttribute('href');

  it('shows jobs worked last first, and exports just what is shown', async () => {
    const { grid, element } = await render(['jobs.money'], { status: 'open', customerId: 'c1' });
    expect(grid().order).toEqual({ sort: 'lastWorkedOn', direction: 'desc' });
    expect(idsOf(grid().columns)).toEqual(expect.arrayContaining(['estimate', 'variance', 'margin']));
    const address = new URL(link(element, 'CSV') ?? '', 'http://shop.example');
    expect(Object.fromEntries(address.searchParams)).toEqual({
      status: 'open',
      customerId: 'c1',
      sort: 'lastWorkedOn',
      direction: 'desc',
      columns: idsOf(grid().columns).join(),
    });
    expect(link(element, 'Export to Excel')).toMatch(/^\/api\/exports\/jobs\.xlsx\?/);
  });

  it('opens with the own default view, without money that its owner may no longer see', async () => {
    const state = { columns: ['number', 'margin', 'hours'], sort: 'hours', direction: 'asc' } as const;
    const view = { savedViewId: 'v1', name: 'Mine', isDefault: true, savedAt: '2026-05-01T00:00:00Z' };
    savedViews = [{ ...view, state: { ...state, columns: [...state.columns], filter: { status: 'open' } } }];
    const { grid, element } = await render([]);
    expect(idsOf(grid().columns)).toEqual(['number', 'hours']);
    expect(grid().order).toEqual({ sort: 'hours', direction: 'asc' });
    expect(addresses).toEqual([{ search: null, status: 'open', customerId: null }]);
    expect(element.querySelector<HTMLSelectElement>('#job-view')?.value).toBe('v1');
  });

  it('takes another view with its columns', async () => {
    const { fixture, grid, element } = await render(['jobs.money']);
    const picker = element.querySelector<HTMLSelectElement>('#job-view');
    if (!picker) throw new Error('There are no views.');
    picker.value = 'cost';
    picker.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    expect(idsOf(grid().columns)).toEqual(expect.arrayContaining(['labour', 'material', 'outside']));
  });
});
