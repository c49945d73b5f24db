import { TestBed } from '@angular/core/testing';
import { type FigureRef, type Workings } from '@brakeven/contract';
import { Subject } from 'rxjs';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { WorkingsApi } from '../api/workings-api';
import { toSourceUrl } from './source-url';
import { WorkingsStore } from './workings-store';

const answer = (ids: string[], nextCursor: string | null): Workings =>
  ({ title: 'Labour', lines: ids.map((lineId) => ({ lineId })), nextCursor }) as unknown as Workings;

describe('WorkingsStore', () => {
  const asked: { ref: FigureRef; cursor: string | undefined; reply: Subject<Workings> }[] = [];
  let store: WorkingsStore;
  const reply = (workings: Workings) => {
    const request = asked.at(-1);
    request?.reply.next(workings);
    request?.reply.complete();
  };

  beforeEach(() => {
    asked.length = 0;
    const getWorkings = (ref: FigureRef, cursor?: string) => {
      const request = { ref, cursor, reply: new Subject<Workings>() };
      asked.push(request);
      return request.reply;
    };
    TestBed.configureTestingModule({ providers: [{ provide: WorkingsApi, useValue: { getWorkings } }] });
    store = TestBed.inject(WorkingsStore);
  });

  it('opens a figure, then a part of it, and goes back', () => {
    store.open({ figure: 'job.total' });
    reply(answer(['1'], null));
    store.open({ figure: 'job.labour' });
    expect(store.canGoBack()).toBe(true);
    store.back();
    expect(asked.map(({ ref }) => ref.figure)).toEqual(['job.total', 'job.labour', 'job.total']);
    expect(store.canGoBack()).toBe(false);
  });

  it('adds further pages to the rows it has', () => {
    store.open({ figure: 'job.labour' });
    reply(answer(['1', '2'], 'c1'));
    store.loadMore();
    expect(asked.at(-1)?.cursor).toBe('c1');
    reply(answer(['3'], null));
    expect(store.workings()?.lines.map(({ lineId }) => lineId)).toEqual(['1', '2', '3']);
    store.loadMore();
    expect(asked).toHaveLength(2);
  });

  it('keeps the rows it has when the next page fails', () => {
    store.open({ figure: 'job.labour' });
    reply(answer(['1'], 'c1'));
    store.loadMore();
    asked.at(-1)?.reply.error(new Error('down'));
    expect(store.workings()?.lines).toHaveLength(1);
    expect(store.problem()).not.toBeNull();
    expect(store.isLoading()).toBe(false);
  });

  it('does not show a late answer to a figure that was left', () => {
    store.open({ figure: 'job.total' });
    const late = asked[0]?.reply;
    store.close();
    late?.next(answer(['1'], null));
    expect(store.isOpen()).toBe(false);
    expect(store.workings()).toBeNull();
  });
});

describe('WorkingsApi', () => {
  it('asks for hours where a role without money may ask', () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    const api = TestBed.inject(WorkingsApi);
    const http = TestBed.inject(HttpTestingController);
    api.getWorkings({ figure: 'job.hours', jobId: 'j' }).subscribe();
    api.getWorkings({ figure: 'job.total' }, 'c1').subscribe();
    api.getWorkings({ figure: 'payback.earned', machineId: 'm', from: '2026-11-01' }).subscribe();
    api.getWorkings({ figure: 'overtime.week', employeeId: 'e', from: '2026-11-02' }).subscribe();
    api.getWorkings({ figure: 'stock.issue', issueId: 'i' }).subscribe();
    api.getWorkings({ figure: 'estimate.total', jobId: 'j' }).subscribe();
    const urls = http.match(() => true).map(({ request }) => request.urlWithParams);
    expect(urls).toEqual([
      '/api/workings/job-hours?figure=job.hours&jobId=j',
      '/api/workings/jobs?figure=job.total&cursor=c1&limit=500',
      '/api/workings/payback?figure=payback.earned&machineId=m&from=2026-11-01',
      '/api/workings/overtime?figure=overtime.week&employeeId=e&from=2026-11-02',
      '/api/workings/stock?figure=stock.issue&issueId=i',
      '/api/workings/estimates?figure=estimate.total&jobId=j',
    ]);
  });
});

describe('toSourceUrl', () => {
  it('leads to the cell, whatever the sheet is called', () => {
    const url = toSourceUrl({ importId: 'i', fileName: 'w.xlsx', sheet: 'Wk 47 & 48', row: 7, cell: 'F7' });
    expect(url).toBe('/timesheets/i?sheet=Wk+47+%26+48&row=7&cell=F7');
  });
});
