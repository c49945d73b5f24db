import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { type RollupResult, type RollupStatus } from '@brakeven/contract';
import { of, Subject, throwError } from 'rxjs';
import { RollupApi } from '../api/rollup-api';
import { Notifier } from './notifier';
import { RollupStore, toRollupSentence } from './rollup-store';

const result: RollupResult = { shop: 'Tern Hollow Fabrication', days: 2, lines: 1042, through: '2026-11-26' };
const status: RollupStatus = {
  through: '2026-11-26',
  entriesWaiting: 0,
  daysWaiting: 0,
  lastRunAt: null,
  isRunning: false,
  gaps: [],
};

describe('RollupStore', () => {
  let run: Subject<RollupResult>;
  let calls: number;
  let store: RollupStore;

  beforeEach(() => {
    run = new Subject();
    calls = 0;
    const api = { getStatus: () => of(status), run: () => (calls++, run) };
    TestBed.configureTestingModule({ providers: [{ provide: RollupApi, useValue: api }] });
    store = TestBed.inject(RollupStore);
  });

  it('rolls up once however often it is pressed, then tells pages and asks how things stand', async () => {
    const seen: RollupResult[] = [];
    store.rolledUp.subscribe((done) => seen.push(done));
    const runs = Promise.all([store.run(), store.run()]);
    expect(store.isRunning()).toBe(true);
    run.next(result);
    run.complete();
    await runs;
    expect(calls).toBe(1);
    expect(seen).toEqual([result]);
    expect(store.isRunning()).toBe(false);
    expect(store.status()).toEqual(status);
  });

  it('says why it could not, and can be tried again', async () => {
    const failed = store.run();
    run.error(new HttpErrorResponse({ status: 0 }));
    await failed;
    const notice = TestBed.inject(Notifier).notice();
    expect(notice).toMatchObject({ tone: 'problem', action: { label: 'Try again' } });
    expect(store.isRunning()).toBe(false);
  });

  it('keeps what it knew when it cannot ask', async () => {
    await store.refresh();
    Object.assign(TestBed.inject(RollupApi), { getStatus: () => throwError(() => new Error('down')) });
    await store.refresh();
    expect(store.status()).toEqual(status);
  });
});

describe('toRollupSentence', () => {
  it('tells what was done, or that nothing had to be', () => {
    expect(toRollupSentence(result)).toBe('Rolled up 2 days, 1,042 cost lines.');
    expect(toRollupSentence({ ...result, days: 1, lines: 3 })).toBe('Rolled up 1 day, 3 cost lines.');
    expect(toRollupSentence({ ...result, days: 0 })).toMatch(/nothing has changed/);
  });
});
