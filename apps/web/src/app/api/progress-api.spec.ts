import { TestBed } from '@angular/core/testing';
import { type Progress } from '@brakeven/contract';
import { OPEN_EVENT_SOURCE, ProgressApi } from './progress-api';

class FakeEventSource extends EventTarget {
  readyState = 1;
  isClosed = false;

  constructor(readonly url: string) {
    super();
  }

  close(): void {
    this.isClosed = true;
  }

  send(data: unknown): void {
    const text = typeof data === 'string' ? data : JSON.stringify(data);
    this.dispatchEvent(new MessageEvent('message', { data: text }));
  }
}

describe('ProgressApi', () => {
  let source: FakeEventSource;
  let heard: (Progress['stage'] | 'complete')[];

  beforeEach(() => {
    heard = [];
    TestBed.configureTestingModule({
      providers: [
        { provide: OPEN_EVENT_SOURCE, useValue: (url: string) => (source = new FakeEventSource(url)) },
      ],
    });
  });

  const watch = () =>
    TestBed.inject(ProgressApi)
      .watch('p-1')
      .subscribe({ next: ({ stage }) => heard.push(stage), complete: () => heard.push('complete') });

  it('follows the work until it is done, then closes the stream', () => {
    watch();
    for (const stage of ['reading', 'checking', 'done'])
      source.send({ stage, done: 1, total: 1, message: '' });
    expect(source.url).toBe('/api/progress/p-1');
    expect(heard).toEqual(['reading', 'checking', 'done', 'complete']);
    expect(source.isClosed).toBe(true);
  });

  it('passes over what is no news', () => {
    watch();
    source.send('still here');
    source.send({ hello: true });
    expect(heard).toEqual([]);
  });

  it('takes a stream that is closed for the end of the news, and one that reconnects for none', () => {
    watch();
    source.dispatchEvent(new Event('error'));
    expect(heard).toEqual([]);
    source.readyState = 2;
    source.dispatchEvent(new Event('error'));
    expect(heard).toEqual(['complete']);
  });

  it('closes the stream when nobody listens any more', () => {
    watch().unsubscribe();
    expect(source.isClosed).toBe(true);
  });
});
