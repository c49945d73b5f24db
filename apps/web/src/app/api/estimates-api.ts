import { HttpClient, type HttpHeaders } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Estimate,
  type EstimateChoices,
  type EstimateDraft,
  type EstimateInput,
  type LikeJob,
} from '@brakeven/contract';
import { map, type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** An estimate, null if the job has none, and what names this state of it. */
export interface VersionedEstimate {
  estimate: Estimate | null;
  version: string;
}

/** In place of a version: whatever is there is replaced. */
export const ANY_VERSION = '*';

/** Estimates of jobs, and what they are made from. */
@Injectable({ providedIn: 'root' })
export class EstimatesApi {
  private readonly http = inject(HttpClient);

  getEstimate(jobId: string): Observable<VersionedEstimate> {
    return this.http
      .get<{ estimate: Estimate | null }>(`/api/jobs/${jobId}/estimate`, { observe: 'response' })
      .pipe(
        map(({ body, headers }) => ({ estimate: body?.estimate ?? null, version: readVersion(headers) })),
      );
  }

  /** Saves an estimate in place of the version that it was made from. */
  saveEstimate(jobId: string, input: EstimateInput, version: string): Observable<VersionedEstimate> {
    const options = { headers: { 'If-Match': version }, observe: 'response' } as const;
    return this.http
      .patch<Estimate>(`/api/jobs/${jobId}/estimate`, input, options)
      .pipe(map(({ body, headers }) => ({ estimate: body, version: readVersion(headers) })));
  }

  /** Answers the version of there being none. */
  deleteEstimate(jobId: string, version: string): Observable<string> {
    const options = { headers: { 'If-Match': version }, observe: 'response' } as const;
    return this.http
      .delete(`/api/jobs/${jobId}/estimate`, options)
      .pipe(map(({ headers }) => readVersion(headers)));
  }

  quotePrice(jobId: string, quotedPrice: string): Observable<void> {
    return this.http.post<void>(`/api/jobs/${jobId}/quoted-price`, { quotedPrice });
  }

  getChoices(on: string): Observable<EstimateChoices> {
    return this.http.get<EstimateChoices>('/api/estimates/choices', { params: { on } });
  }

  listLikeJobs(jobId: string, search: string): Observable<LikeJob[]> {
    return this.http.get<LikeJob[]>(`/api/jobs/${jobId}/like`, { params: toQueryParams({ search }) });
  }

  draftEstimate(
    jobId: string,
    query: { fromJobId: string; rates: 'copied' | 'today'; on: string },
  ): Observable<EstimateDraft> {
    return this.http.get<EstimateDraft>(`/api/jobs/${jobId}/estimate-draft`, {
      params: toQueryParams(query),
    });
  }
}

/** Without one, a proxy took it away: then no change is made blindly, for the server knows no such version. */
function readVersion(headers: HttpHeaders): string {
  return headers.get('ETag') ?? '"unknown"';
}
