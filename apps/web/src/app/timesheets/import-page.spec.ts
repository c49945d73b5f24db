import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type SheetExcerpt, type TimesheetImportDetail } from '@brakeven/contract';
import { of, throwError } from 'rxjs';
import { HttpErrorResponse } from '@angular/common/http';
import { TimesheetsApi } from '../api/timesheets-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { render } from '../testing/rendered';
import { sampleProblem } from '../testing/sample-check';
import { ImportPage } from './import-page';

const detail: TimesheetImportDetail = {
  importId: 'i1',
  fileName: 'week 48.xlsx',
  sheet: 'Hours',
  importedAt: '2026-11-30T15:12:00Z',
  importedBy: 'Ines Halvorsen',
  status: 'committed',
  undoneAt: null,
  undoneBy: null,
  rowsRead: 60,
  entriesAdded: 59,
  alreadyThere: 0,
  refused: 1,
  hoursRead: '450.0000',
  hoursAdded: '442.5000',
  firstDay: '2026-11-23',
  lastDay: '2026-11-27',
  problems: [sampleProblem(16, { cell: 'F16' })],
};
const excerpt: SheetExcerpt = {
  fileName: 'week 48.xlsx',
  sheet: 'Hours',
  columns: ['F'],
  rows: [{ row: 16, cells: [{ address: 'F16', text: '7.5' }] }],
};

describe('ImportPage', () => {
  const api = {
    get: jest.fn(),
    getExcerpt: jest.fn(),
    list: jest.fn(),
    undo: jest.fn(),
    fileUrl: () => '/file',
  };

  beforeEach(() => {
    Element.prototype.scrollIntoView = jest.fn();
    jest.resetAllMocks();
    api.get.mockReturnValue(of(detail));
    api.getExcerpt.mockReturnValue(of(excerpt));
    api.list.mockReturnValue(of([]));
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: TimesheetsApi, useValue: api },
        { provide: RollupStore, useValue: { refresh: jest.fn() } },
      ],
    });
  });

  it('shows the cell that a figure came from, in the rows around it', async () => {
    const page = await render(ImportPage, { importId: 'i1', sheet: 'Hours', row: '16', cell: 'F16' });
    expect(api.getExcerpt).toHaveBeenCalledWith('i1', 'Hours', 16);
    expect(page.textsOf('[aria-current]')).toEqual(['Cell F16: 7.5']);
  });

  it('finds the row in the cell when the address names no row, and begins at the head of the import’s own sheet', async () => {
    await render(ImportPage, { importId: 'i1', sheet: 'Hours', cell: 'F31' });
    expect(api.getExcerpt).toHaveBeenLastCalledWith('i1', 'Hours', 31);
    await render(ImportPage, { importId: 'i1' });
    expect(api.getExcerpt).toHaveBeenLastCalledWith('i1', 'Hours', 1);
  });

  it('says what was refused, with the way to its cell', async () => {
    const page = await render(ImportPage, { importId: 'i1' });
    expect(page.text).toContain('1 row stayed out');
    expect(page.find('F16').getAttribute('href')).toContain('?sheet=Hours&row=16&cell=F16');
  });

  it('asks before it takes an import back, and says what was taken back', async () => {
    api.undo.mockReturnValue(of({ entriesVoided: 59, hoursVoided: '442.5000' }));
    const page = await render(ImportPage, { importId: 'i1' });
    await page.press('Undo this import');
    const dialog = document.querySelector('mat-dialog-container');
    expect(dialog?.textContent).toContain('59 entries with 442.50 hours');
    const confirm = [...(dialog?.querySelectorAll('button') ?? [])].at(-1);
    confirm?.click();
    await new Promise((resolve) => setTimeout(resolve, 300));
    expect(api.undo).toHaveBeenCalledWith('i1');
    expect(TestBed.inject(Notifier).notice()?.text).toBe('Took back 59 entries with 442.50 hours.');
    expect(api.get).toHaveBeenCalledTimes(2);
  });

  it('keeps the facts in sight when the rows cannot be fetched', async () => {
    api.getExcerpt.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    const page = await render(ImportPage, { importId: 'i1', sheet: 'Hours', row: '16' });
    expect(page.text).toContain('The server cannot be reached');
    expect(page.text).toContain('Hours added 442.50');
  });
});
