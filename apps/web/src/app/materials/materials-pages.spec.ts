import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type Role } from '@brakeven/contract';
import { Grid, type GridColumn, WORKINGS_OPENER } from '@brakeven/ui';
import { type StockMove } from '@brakeven/contract';
import { By } from '@angular/platform-browser';
import { of, throwError } from 'rxjs';
import { MaterialsApi } from '../api/materials-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { toLedgerColumns, toSizeWords } from './ledger-columns';
import { MaterialPage } from './material-page';
import { MaterialsPage } from './materials-page';
import { BAR, ISSUE, LOT, STEEL, withoutMoney } from './sample-materials';

const api = {
  list: jest.fn(),
  get: jest.fn(),
  listMoves: jest.fn(),
  voidLot: jest.fn(),
  restoreLot: jest.fn(),
  voidIssue: jest.fn(),
};
const opener = { open: jest.fn() };

const signIn = (role: Role) =>
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      provideSession(role),
      { provide: MaterialsApi, useValue: api },
      { provide: RollupStore, useValue: { refresh: jest.fn() } },
      { provide: WORKINGS_OPENER, useValue: opener },
    ],
  });

beforeEach(() => {
  jest.resetAllMocks();
  api.listMoves.mockReturnValue(of({ items: [ISSUE, LOT], nextCursor: null }));
});

describe('MaterialsPage', () => {
  it('says what is in stock and what it is worth, each value a figure that opens', async () => {
    api.list.mockReturnValue(of([STEEL, BAR]));
    signIn('owner');
    const page = await render(MaterialsPage);
    expect(page.text).toContain('Value in stock $100.00');
    expect(page.text).toContain('Weight in stock 100 lb');
    expect(page.text).toContain('Materials in stock 1 of 2');
    const [steel, bar] = page.textsOf('tbody tr');
    expect(steel).toContain('Sheet · A1011 CS · 11 ga (0.1196 in) 100 lb $1.0000 $100.00');
    expect(bar).toContain('none – $0.00 none received');
    await page.press('Value of Mild steel 11 ga: $100.00');
    expect(opener.open).toHaveBeenCalledWith({ figure: 'stock.value', materialId: 'steel' });
  });

  it('shows a lead weights alone, and nothing to change', async () => {
    api.list.mockReturnValue(of([withoutMoney(STEEL)]));
    signIn('lead');
    const page = await render(MaterialsPage);
    expect(page.text).toContain('Weight in stock 100 lb');
    expect(page.text).not.toContain('$');
    expect(page.all('button')).toHaveLength(0);
  });

  it('says what to do first, and what went wrong', async () => {
    api.list.mockReturnValue(of([]));
    signIn('owner');
    expect((await render(MaterialsPage)).text).toContain('No material yet');
    TestBed.resetTestingModule();
    api.list.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    signIn('owner');
    expect((await render(MaterialsPage)).text).toContain('The server cannot be reached');
  });
});

describe('MaterialPage', () => {
  const open = (role: Role) => {
    signIn(role);
    return render(MaterialPage, { materialId: 'steel' });
  };

  it('shows stock, average and value, and asks for the moves that are chosen', async () => {
    api.get.mockReturnValue(of(STEEL));
    const page = await open('owner');
    expect(page.text).toContain('In stock 100 lb Average per lb $1.0000 Value $100.00');
    await page.press('Lots');
    const grid = page.fixture.debugElement.query(By.directive(Grid)).componentInstance as Grid<StockMove>;
    grid.source()?.load({ cursor: undefined, limit: 50, sort: undefined, direction: undefined });
    expect(api.listMoves).toHaveBeenLastCalledWith('steel', { show: 'lot', cursor: undefined, limit: 50 });
  });

  it('voids at one press, and puts back on undo; a refusal is told in the server’s words', async () => {
    api.get.mockReturnValue(of(STEEL));
    api.voidLot.mockReturnValue(of(undefined));
    api.restoreLot.mockReturnValue(of(undefined));
    const page = await open('owner');
    const grid = page.fixture.debugElement.query(By.directive(Grid)).componentInstance as Grid<StockMove>;
    const press = (move: StockMove, label: string) =>
      findActions(grid.columns(), move)
        .find((action) => action.label === label)
        ?.run();
    press(LOT, 'Void');
    expect(api.voidLot).toHaveBeenCalledWith('lot');
    TestBed.inject(Notifier).notice()?.action?.run();
    expect(api.restoreLot).toHaveBeenCalledWith('lot');
    const detail = 'On Mar 4, 2026 job 1042 takes 157.72 lb more.';
    const error = { code: 'conflict', detail, issues: [] };
    api.voidIssue.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 409, error })));
    press(ISSUE, 'Void');
    expect(TestBed.inject(Notifier).notice()?.text).toContain(detail);
  });

  it('says that it cannot be weighed by size', async () => {
    api.get.mockReturnValue(of({ ...STEEL, thicknessMm: null, gauge: null }));
    expect((await open('owner')).text).toContain('Cannot be weighed by size. It has no thickness');
  });

  it('shows a lead no money and no actions', async () => {
    api.get.mockReturnValue(of(withoutMoney(STEEL)));
    const page = await open('lead');
    expect(page.text).not.toContain('$');
    const grid = page.fixture.debugElement.query(By.directive(Grid)).componentInstance as Grid<StockMove>;
    expect(grid.columns().map(({ id }) => id)).toEqual([
      'movedOn',
      'kind',
      'of',
      'size',
      'weight',
      'balance',
    ]);
  });
});

function findActions(columns: readonly GridColumn<StockMove>[], move: StockMove) {
  return columns.find(({ id }) => id === 'actions')?.actions?.(move) ?? [];
}

describe('the columns of the ledger', () => {
  const view = { units: 'us', currency: 'USD', withMoney: true, isVoided: false, actionsOf: null } as const;
  const textsOf = (move: StockMove) =>
    Object.fromEntries(toLedgerColumns(view).map((column) => [column.id, column.value(move)]));

  it('say in the shop’s units what moved and what was left', () => {
    expect(textsOf(ISSUE)).toMatchObject({
      of: '1042 Rack shelves',
      weight: '−157.72\u00a0lb',
      average: '$0.8064',
      amount: '-127.19',
      value: '1448.31',
    });
    expect(textsOf(LOT)).toMatchObject({ of: 'L-7 · Millbrook Metals', kind: 'Received' });
    expect(toSizeWords(LOT, 'us')).toBe('10 sheets, 120\u00a0in × 48\u00a0in');
    expect(toSizeWords({ ...LOT, sheets: null }, 'us')).toBe('');
    expect(toSizeWords({ ...LOT, sheets: 1, lengthMm: null }, 'us')).toBe('1 sheet');
  });

  it('leave value and balance out where a move is voided', () => {
    const columns = toLedgerColumns({ ...view, isVoided: true }).map(({ id }) => id);
    expect(columns).toEqual(['movedOn', 'kind', 'of', 'size', 'weight', 'voidedBy']);
  });

  it('open the value of an issue', () => {
    const amount = toLedgerColumns(view).find(({ id }) => id === 'amount');
    expect(amount?.figure?.(ISSUE)).toEqual({ figure: 'stock.issue', issueId: 'issue' });
    expect(amount?.figure?.(LOT)).toBeNull();
  });
});
