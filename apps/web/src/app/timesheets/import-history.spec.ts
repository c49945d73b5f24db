import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type TimesheetImport } from '@brakeven/contract';
import { HttpErrorResponse } from '@angular/common/http';
import { of, throwError } from 'rxjs';
import { TimesheetsApi } from '../api/timesheets-api';
import { RollupStore } from '../shell/rollup-store';
import { render } from '../testing/rendered';
import { ImportHistory } from './import-history';
import { ImportHistoryStore } from './import-history-store';

const committed: TimesheetImport = {
  importId: 'i1',
  fileName: 'week 48.xlsx',
  sheet: 'Hours',
  importedAt: '2026-11-30T15:12:00Z',
  importedBy: 'Ines Halvorsen',
  status: 'committed',
  undoneAt: null,
  undoneBy: null,
  rowsRead: 60,
  entriesAdded: 1204,
  alreadyThere: 0,
  refused: 1,
  hoursRead: '450.0000',
  hoursAdded: '442.5000',
  firstDay: '2026-11-23',
  lastDay: '2026-11-27',
};
const undone: TimesheetImport = {
  ...committed,
  importId: 'i0',
  fileName: 'week 47.csv',
  status: 'undone',
  undoneAt: '2026-11-24T10:00:00Z',
  undoneBy: 'Mara Oduya',
};

describe('ImportHistory', () => {
  const api = { list: jest.fn(), fileUrl: (importId: string) => `/api/timesheets/${importId}/file` };

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        ImportHistoryStore,
        { provide: TimesheetsApi, useValue: api },
        { provide: RollupStore, useValue: { refresh: jest.fn() } },
      ],
    });
  });

  it('says what each import brought, and offers its file and the way back', async () => {
    api.list.mockReturnValue(of([committed, undone]));
    const page = await render(ImportHistory);
    expect(page.textsOf('tbody tr')[0]).toContain('1,204 0 1 442.50 in the books');
    expect(page.find('week 48.xlsx').getAttribute('href')).toBe('/timesheets/i1');
    expect(page.find('Download week 48.xlsx').getAttribute('href')).toBe('/api/timesheets/i1/file');
    expect(page.find('Undo week 48.xlsx')).toBeTruthy();
  });

  it('says who undid an import, and does not offer to undo it again', async () => {
    api.list.mockReturnValue(of([undone]));
    const page = await render(ImportHistory);
    expect(page.text).toContain('undone Mara Oduya, Nov 24, 2026');
    expect(() => page.find('Undo week 47.csv')).toThrow();
  });

  it('begins with the latest twelve', async () => {
    api.list.mockReturnValue(of(Array.from({ length: 43 }, (_, n) => ({ ...committed, importId: `i${n}` }))));
    const page = await render(ImportHistory);
    expect(page.all('tbody tr')).toHaveLength(12);
    await page.press('Show all 43');
    expect(page.all('tbody tr')).toHaveLength(43);
  });

  it('says what happened when the history cannot be fetched, and tries again', async () => {
    api.list
      .mockReturnValueOnce(throwError(() => new HttpErrorResponse({ status: 0 })))
      .mockReturnValue(of([committed]));
    const page = await render(ImportHistory);
    expect(page.text).toContain('The server cannot be reached');
    await page.press('Try again');
    expect(page.text).toContain('week 48.xlsx');
  });
});
