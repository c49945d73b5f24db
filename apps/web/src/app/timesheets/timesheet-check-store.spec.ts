import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { type TimesheetCheck, type TimesheetImported, type TimesheetOptions } from '@brakeven/contract';
import { NEVER, type Observable, of, Subject, throwError } from 'rxjs';
import { ProgressApi } from '../api/progress-api';
import { TimesheetsApi, type Upload } from '../api/timesheets-api';
import { TimesheetCheckStore } from './timesheet-check-store';

const file = new File(['x'], 'week 48.xlsx');
const check = (change: Partial<TimesheetCheck> = {}) =>
  ({ rowsRead: 10, mapping: null, ...change }) as TimesheetCheck;
const name = { kind: 'employee', spelling: 'Bo', targetId: 'id-1', label: 'Bo Tran' } as const;

class FakeApi {
  readonly sent: Partial<TimesheetOptions>[] = [];
  answer: Observable<Upload<TimesheetCheck>> = of({ answer: check() });
  committed: Observable<Upload<TimesheetImported>> = NEVER;

  check(_file: File, options: Partial<TimesheetOptions>) {
    this.sent.push(options);
    return this.answer;
  }

  commit(_file: File, options: Partial<TimesheetOptions>) {
    this.sent.push(options);
    return this.committed;
  }
}

describe('TimesheetCheckStore', () => {
  let api: FakeApi;
  let store: TimesheetCheckStore;

  beforeEach(() => {
    api = new FakeApi();
    TestBed.configureTestingModule({
      providers: [
        TimesheetCheckStore,
        { provide: TimesheetsApi, useValue: api },
        { provide: ProgressApi, useValue: { watch: () => NEVER } },
      ],
    });
    store = TestBed.inject(TimesheetCheckStore);
  });

  it('checks a file as it is when it is opened', () => {
    store.open(file);
    expect(store.check()?.rowsRead).toBe(10);
    expect(api.sent[0]).toMatchObject({ aliases: [] });
    expect(api.sent[0]).not.toHaveProperty('mapping');
  });

  it('sends chosen names with every check, and leaves one out that was taken back', () => {
    store.open(file);
    store.chooseName(name);
    store.takeNameBack(name);
    expect(api.sent.map((options) => options.aliases)).toEqual([
      [],
      [{ kind: 'employee', spelling: 'Bo', targetId: 'id-1' }],
      [],
    ]);
  });

  it('keeps the last good check, the file and the choices when a check fails', () => {
    store.open(file);
    api.answer = throwError(() => new HttpErrorResponse({ status: 0 }));
    store.chooseName(name);
    expect(store.problem()?.code).toBe('offline');
    expect(store.check()?.rowsRead).toBe(10);
    expect(store.file()).toBe(file);
    expect(store.chosenNames()).toEqual([name]);
  });

  it('lets a later check win over one that is still running', () => {
    const first = new Subject<Upload<TimesheetCheck>>();
    api.answer = first;
    store.open(file);
    api.answer = of({ answer: check({ rowsRead: 12 }) });
    store.chooseName(name);
    first.next({ answer: check({ rowsRead: 11 }) });
    expect(store.check()?.rowsRead).toBe(12);
    expect(store.isBusy()).toBe(false);
  });

  it('checks once after the last of several columns was set, and commits nothing meanwhile', async () => {
    store.open(file);
    const mapping = { sheet: 'Hours', headerRow: 4, columns: { date: 'A' } };
    store.setMapping({ ...mapping, columns: {} });
    store.setMapping(mapping);
    store.commit(false, () => undefined);
    expect(store.isBusy()).toBe(true);
    expect(api.sent).toHaveLength(1);
    await new Promise((resolve) => setTimeout(resolve, 700));
    expect(api.sent.slice(1)).toEqual([expect.objectContaining({ mapping })]);
    expect(store.isBusy()).toBe(false);
  });

  it('says what was imported, once the server has said so', () => {
    const committed = new Subject<Upload<TimesheetImported>>();
    const heard: string[] = [];
    api.committed = committed;
    store.open(file);
    store.commit(true, (imported) => heard.push(String(imported.entriesAdded)));
    expect(api.sent.at(-1)).toMatchObject({ goodRows: true });
    expect(store.activity()?.kind).toBe('committing');
    committed.next({ answer: { ...check(), importId: 'i', entriesAdded: 9, hoursAdded: '70.0000' } });
    committed.complete();
    expect(heard).toEqual(['9']);
    expect(store.imported()?.entriesAdded).toBe(9);
    expect(store.isBusy()).toBe(false);
  });

  it('forgets everything about the file that was there before', () => {
    store.open(file);
    store.chooseName(name);
    store.open(new File(['y'], 'week 49.csv'));
    expect(store.chosenNames()).toEqual([]);
    expect(store.file()?.name).toBe('week 49.csv');
  });
});
