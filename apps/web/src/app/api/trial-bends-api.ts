import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type DepthCard,
  type DepthCardInput,
  type DepthFit,
  type DepthFitQuery,
  type TrialBendDto,
  type TrialBendInput,
  type TrialBendPage,
  type TrialBendPaste,
  type TrialBendPasteResult,
} from '@brakeven/contract';
import { map, type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** Which trial bends are meant. */
export interface TrialBendFilter {
  machineId: string;
  punchId: string;
  materialCode: string;
}

/** The most trial bends that are shown at once. */
const SHOWN_MAX = 500;

/** Trial bends, what is fitted to them, and the card for the press. */
@Injectable({ providedIn: 'root' })
export class TrialBendsApi {
  private readonly http = inject(HttpClient);

  /** Latest first. */
  list(filter: TrialBendFilter): Observable<TrialBendPage> {
    const params = toQueryParams({ ...filter, limit: SHOWN_MAX });
    return this.http.get<TrialBendPage>('/api/trial-bends', { params });
  }

  /** The latest of all set-ups; undefined if there is none. */
  getLatest(): Observable<TrialBendDto | undefined> {
    const params = toQueryParams({ limit: 1 });
    return this.http.get<TrialBendPage>('/api/trial-bends', { params }).pipe(map(({ items }) => items[0]));
  }

  create(input: TrialBendInput): Observable<TrialBendDto> {
    return this.http.post<TrialBendDto>('/api/trial-bends', input);
  }

  /** All or none of the rows. */
  paste(input: TrialBendPaste): Observable<TrialBendPasteResult> {
    return this.http.post<TrialBendPasteResult>('/api/trial-bends/paste', input);
  }

  void(trialBendId: string): Observable<void> {
    return this.http.post<void>(`/api/trial-bends/${trialBendId}/void`, {});
  }

  restore(trialBendId: string): Observable<void> {
    return this.http.post<void>(`/api/trial-bends/${trialBendId}/restore`, {});
  }

  getFit(query: DepthFitQuery): Observable<DepthFit> {
    return this.http.get<DepthFit>('/api/forming/depth-fit', { params: toQueryParams(query) });
  }

  getCard(machineId: string): Observable<DepthCard> {
    return this.http.get<DepthCard>(`/api/machines/${machineId}/depth-card`);
  }

  updateCard(machineId: string, input: DepthCardInput): Observable<DepthCard> {
    return this.http.patch<DepthCard>(`/api/machines/${machineId}/depth-card`, input);
  }
}
