import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { sampleCheck } from '../testing/sample-check';
import { TimesheetsApi } from './timesheets-api';

describe('TimesheetsApi', () => {
  let api: TimesheetsApi;
  let server: HttpTestingController;

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    api = TestBed.inject(TimesheetsApi);
    server = TestBed.inject(HttpTestingController);
  });
  afterEach(() => server.verify());

  it('sends the file with the options beside it, options first, and answers what the server found', () => {
    const heard: unknown[] = [];
    const file = new File(['x'], 'week 48.xlsx');
    api.check(file, { goodRows: false, aliases: [] }).subscribe((upload) => heard.push(upload));
    const request = server.expectOne('/api/timesheets/check');
    const body = request.request.body as FormData;
    expect([...body.keys()]).toEqual(['options', 'file']);
    expect(JSON.parse(body.get('options') as string)).toEqual({ goodRows: false, aliases: [] });
    expect((body.get('file') as File).name).toBe('week 48.xlsx');
    const check = sampleCheck();
    request.flush(check);
    expect(heard).toEqual([{ answer: check }]);
  });

  it('asks for the rows around a row of a sheet', () => {
    api.getExcerpt('i1', 'Week 48 & 49', 16).subscribe();
    const { request } = server.expectOne((one) => one.url === '/api/timesheets/i1/excerpt');
    expect(request.params.get('sheet')).toBe('Week 48 & 49');
    expect(request.params.get('row')).toBe('16');
  });
});
