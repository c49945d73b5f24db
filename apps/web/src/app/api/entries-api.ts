import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type EntryChoices,
  type EntryFilter,
  type EntryListQuery,
  type EntryPage,
  type EntryTotals,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

import { toQueryParams } from './query-params';

/** Time entries, page by page, their totals, and what the filters offer. */
@Injectable({ providedIn: 'root' })
export class EntriesApi {
  private readonly http = inject(HttpClient);

  list(query: Partial<EntryListQuery>): Observable<EntryPage> {
    return this.http.get<EntryPage>('/api/entries', { params: toQueryParams(query) });
  }

  getTotals(filter: EntryFilter): Observable<EntryTotals> {
    return this.http.get<EntryTotals>('/api/entries/totals', { params: toQueryParams(filter) });
  }

  getChoices(): Observable<EntryChoices> {
    return this.http.get<EntryChoices>('/api/entries/choices');
  }

  void(entryId: string): Observable<void> {
    return this.http.post<void>(`/api/entries/${entryId}/void`, {});
  }

  restore(entryId: string): Observable<void> {
    return this.http.post<void>(`/api/entries/${entryId}/restore`, {});
  }
}
