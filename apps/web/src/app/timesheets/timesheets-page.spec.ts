import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type TimesheetCheck } from '@brakeven/contract';
import { NEVER, of, throwError } from 'rxjs';
import { HttpErrorResponse } from '@angular/common/http';
import { EntriesApi } from '../api/entries-api';
import { JobsApi } from '../api/jobs-api';
import { PeopleApi } from '../api/people-api';
import { ProgressApi } from '../api/progress-api';
import { ShopApi } from '../api/shop-api';
import { TimesheetsApi } from '../api/timesheets-api';
import { RollupStore } from '../shell/rollup-store';
import { render } from '../testing/rendered';
import { sampleCheck, sampleProblem, sampleRow } from '../testing/sample-check';
import { TimesheetsPage } from './timesheets-page';

const refused = sampleCheck({
  rowsRead: 3,
  entriesReady: 2,
  refused: 1,
  hoursReady: '15.0000',
  hoursRefused: '7.5000',
  rows: [sampleRow(5), sampleRow(6), sampleRow(7, { state: 'refused' })],
  problems: [sampleProblem(7)],
});
const inDialog = () => document.querySelector<HTMLElement>('mat-dialog-container');
const pressInDialog = (words: string) =>
  [...(inDialog()?.querySelectorAll('button') ?? [])]
    .find((one) => one.textContent?.trim() === words)
    ?.click();

describe('TimesheetsPage', () => {
  const api = {
    check: jest.fn(),
    commit: jest.fn(),
    list: jest.fn(),
    undo: jest.fn(),
    fileUrl: () => '/file',
  };
  const rollup = { refresh: jest.fn() };

  beforeEach(() => {
    jest.resetAllMocks();
    Element.prototype.scrollIntoView = jest.fn();
    api.list.mockReturnValue(of([]));
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: TimesheetsApi, useValue: api },
        { provide: ProgressApi, useValue: { watch: () => NEVER } },
        { provide: RollupStore, useValue: rollup },
        { provide: EntriesApi, useValue: {} },
        { provide: JobsApi, useValue: {} },
        { provide: PeopleApi, useValue: {} },
        { provide: ShopApi, useValue: {} },
      ],
    });
  });

  const drop = async (check: TimesheetCheck) => {
    api.check.mockReturnValue(of({ answer: check }));
    const page = await render(TimesheetsPage);
    const event = Object.assign(new Event('drop', { cancelable: true }), {
      dataTransfer: { files: [new File(['x'], check.file.name)] },
    });
    page.element.querySelector('.zone')?.dispatchEvent(event);
    await page.settle();
    return page;
  };

  it('says what to do first when nothing was ever imported', async () => {
    const page = await render(TimesheetsPage);
    expect(page.text).toContain('No timesheet yet');
    expect(page.text).toContain('.xlsx or .csv, up to 10 MB');
  });

  it('adds a good timesheet at one press, then leads to its hours and tells the bar', async () => {
    const page = await drop(sampleCheck());
    expect(page.textsOf('[role=status]')).toContain('3 rows read, 3 ready, 0 already there, 0 refused');
    const answer = { ...sampleCheck(), importId: 'i1', entriesAdded: 3, hoursAdded: '22.5000' };
    api.commit.mockReturnValue(of({ answer }));
    await page.press('Add 3 entries (22.50 h)');
    expect(api.commit.mock.calls[0]?.[1]).toMatchObject({ goodRows: false });
    expect(page.text).toContain('3 entries with 22.50 hours are in the books');
    expect(document.activeElement?.id).toBe('done-heading');
    expect(page.find('See these hours').getAttribute('href')).toBe('/hours?importId=i1&period=all');
    expect(rollup.refresh).toHaveBeenCalled();
    expect(api.list).toHaveBeenCalledTimes(2);
  });

  it('leaves refused rows out only after asking', async () => {
    const page = await drop(refused);
    await page.press('Add the 2 good rows, leave 1 out');
    expect(api.commit).not.toHaveBeenCalled();
    expect(inDialog()?.textContent).toContain('1 row with 7.50 hours stays out and costs no job anything.');
    expect(inDialog()?.textContent).toContain('Correct it in your workbook later');
    api.commit.mockReturnValue(NEVER);
    pressInDialog('Add the 2 good rows, leave 1 out');
    await new Promise((resolve) => setTimeout(resolve, 300));
    await page.settle();
    expect(api.commit.mock.calls[0]?.[1]).toMatchObject({ goodRows: true });
  });

  it('tells of a column that is not used, and opens the columns at it', async () => {
    const message = "Column F 'Was' (FORM) is not used.";
    const unusedColumns = [{ column: 'F', text: 'Was', samples: ['FORM'], message }];
    const page = await drop(sampleCheck({ unusedColumns }));
    expect(page.textsOf('app-unused-columns li')[0]).toContain(message);
    expect(page.all('app-mapping-panel')).toHaveLength(0);
    await page.press('Say what column F is');
    await new Promise((resolve) => setTimeout(resolve));
    expect(document.activeElement?.id).toBe('unused-F');
    await page.enter('#unused-F', 'machine');
    await new Promise((resolve) => setTimeout(resolve, 650));
    const { columns } = api.check.mock.calls.at(-1)[1].mapping;
    expect(columns).toEqual({ ...sampleCheck().mapping?.columns, machine: 'F' });
  });

  it('settles how text dates are written at one press, and takes it back', async () => {
    const offers = [{ dateFormat: 'MM/DD/YYYY' as const, text: '11/23/2026', date: '2026-11-23' }];
    const unread = sampleCheck({
      refused: 1,
      rows: [sampleRow(5, { state: 'refused' })],
      problems: [sampleProblem(5, { code: 'date_unreadable', cell: 'A5', field: 'date' })],
      unreadDates: { cells: ['A5'], offers },
    });
    const page = await drop(unread);
    expect(page.text).not.toContain('Cells to correct');
    const mapping = { ...unread.mapping, dateFormat: 'MM/DD/YYYY' as const };
    api.check.mockReturnValue(of({ answer: { ...sampleCheck(), mapping, mappingFrom: 'chosen' } }));
    await page.press('Text dates are written MM/DD/YYYY');
    await new Promise((resolve) => setTimeout(resolve, 650));
    await page.settle();
    expect(api.check.mock.calls.at(-1)[1].mapping).toEqual(mapping);
    expect(page.textsOf('.settled')[0]).toContain('Text dates are written MM/DD/YYYY');
    await page.press('Take back: text dates are written MM/DD/YYYY');
    await new Promise((resolve) => setTimeout(resolve, 650));
    expect(api.check.mock.calls.at(-1)[1].mapping.dateFormat).toBeUndefined();
  });

  it('keeps the last check in sight when a further one fails', async () => {
    const page = await drop(refused);
    api.check.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    page.fixture.componentInstance['store'].runCheck();
    await page.settle();
    expect(page.text).toContain('The server cannot be reached');
    expect(page.text).toContain('Nothing was written. The file and what you settled are kept.');
    expect(page.textsOf('app-check-summary dd:not(.rows)')[0]).toBe('22.50');
  });

  it('asks for the columns first when some are missing, and offers nothing to add', async () => {
    const page = await drop(sampleCheck({ missingFields: ['operation'], entriesReady: 0, rows: [] }));
    expect(page.all('app-mapping-panel')).toHaveLength(1);
    expect(page.all('app-check-table')).toHaveLength(0);
    expect(page.all('.summary button')).toHaveLength(0);
  });

  it('says who imported this very file before', async () => {
    const alreadyImported = {
      importId: 'i0',
      importedAt: '2026-11-30T15:00:00Z',
      importedBy: 'Ines Halvorsen',
    };
    const page = await drop(sampleCheck({ alreadyImported, entriesReady: 0, alreadyThere: 3 }));
    expect(page.text).toContain(
      'This very file is already imported. Ines Halvorsen added it on Nov 30, 2026',
    );
    expect(page.find('Open that import').getAttribute('href')).toBe('/timesheets/i0');
    expect(page.text).toContain('Nothing new to add.');
  });
});
