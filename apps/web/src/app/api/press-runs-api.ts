import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type ForceDistribution,
  type PressRun,
  type PressRunChoices,
  type PressRunFilter,
  type PressRunInput,
  type PressRunPage,
  type PressRunQuery,
  type SetupCard,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** Press runs: what was bent with what, and the force that it took. */
@Injectable({ providedIn: 'root' })
export class PressRunsApi {
  private readonly http = inject(HttpClient);

  list(query: Partial<PressRunQuery>): Observable<PressRunPage> {
    return this.http.get<PressRunPage>('/api/press-runs', { params: toQueryParams(query) });
  }

  /** Jobs that a run can be logged on, and time entries of one of them. */
  getChoices(jobId?: string): Observable<PressRunChoices> {
    return this.http.get<PressRunChoices>('/api/press-runs/choices', { params: toQueryParams({ jobId }) });
  }

  getDistribution(filter: PressRunFilter): Observable<ForceDistribution> {
    const params = toQueryParams(filter);
    return this.http.get<ForceDistribution>('/api/press-runs/distribution', { params });
  }

  create(input: PressRunInput): Observable<PressRun> {
    return this.http.post<PressRun>('/api/press-runs', input);
  }

  /** The run is voided and another takes its place. */
  correct(pressRunId: string, input: PressRunInput): Observable<PressRun> {
    return this.http.patch<PressRun>(`/api/press-runs/${pressRunId}`, input);
  }

  void(pressRunId: string): Observable<void> {
    return this.http.post<void>(`/api/press-runs/${pressRunId}/void`, {});
  }

  restore(pressRunId: string): Observable<void> {
    return this.http.post<void>(`/api/press-runs/${pressRunId}/restore`, {});
  }

  /** What the last good runs of a job used. */
  getSetupCard(jobId: string): Observable<SetupCard> {
    return this.http.get<SetupCard>(`/api/jobs/${jobId}/setup-card`);
  }
}
