import { TestBed } from '@angular/core/testing';
import { type AuditEvent } from '@brakeven/contract';
import { HttpErrorResponse } from '@angular/common/http';
import { of, throwError } from 'rxjs';
import { ShopApi } from '../api/shop-api';
import { render } from '../testing/rendered';
import { AuditCard } from './audit-card';

const event = (eventId: string, wage: number): AuditEvent => ({
  eventId,
  at: '2026-12-01T15:00:00Z',
  actor: 'Mara Oduya',
  action: 'changed',
  subjectKind: 'pay_rate',
  subjectId: 'r',
  before: { wage_per_hour: wage - 1 },
  after: { wage_per_hour: wage },
});

describe('AuditCard', () => {
  const api = { listAuditEvents: jest.fn() };

  beforeEach(() => {
    api.listAuditEvents.mockReset();
    TestBed.configureTestingModule({ providers: [{ provide: ShopApi, useValue: api }] });
  });

  it('reads out who changed what from what to what, and loads what is earlier', async () => {
    api.listAuditEvents
      .mockReturnValueOnce(of({ items: [event('2', 29)], nextCursor: '2' }))
      .mockReturnValueOnce(of({ items: [event('1', 28)], nextCursor: null }));
    const page = await render(AuditCard);
    expect(page.textsOf('.head')[0]).toContain('Mara Oduya changed pay rate');
    expect(page.textsOf('del, ins')).toEqual(['28', '29']);
    await page.press('Load earlier changes');
    expect(api.listAuditEvents).toHaveBeenLastCalledWith('2', expect.any(Number));
    expect(page.textsOf('ins')).toEqual(['29', '28']);
    expect(page.all('button')).toHaveLength(0);
  });

  it('keeps what is there when loading more fails, and tries again', async () => {
    api.listAuditEvents
      .mockReturnValueOnce(of({ items: [event('2', 29)], nextCursor: '2' }))
      .mockReturnValueOnce(throwError(() => new HttpErrorResponse({ status: 0 })))
      .mockReturnValueOnce(of({ items: [event('1', 28)], nextCursor: null }));
    const page = await render(AuditCard);
    await page.press('Load earlier changes');
    expect(page.text).toContain('The server cannot be reached');
    await page.press('Try again');
    expect(page.textsOf('ins')).toEqual(['29', '28']);
  });

  it('says when nothing has happened yet', async () => {
    api.listAuditEvents.mockReturnValue(of({ items: [], nextCursor: null }));
    expect((await render(AuditCard)).text).toContain('Nothing yet');
  });
});
