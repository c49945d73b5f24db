import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Estimate,
  type EstimateChoices,
  type EstimateDraft,
  type EstimateInput,
  type LikeJob,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** Estimates of jobs, and what they are made from. */
@Injectable({ providedIn: 'root' })
export class EstimatesApi {
  private readonly http = inject(HttpClient);

  getEstimate(jobId: string): Observable<{ estimate: Estimate | null }> {
    return this.http.get<{ estimate: Estimate | null }>(`/api/jobs/${jobId}/estimate`);
  }

  saveEstimate(jobId: string, input: EstimateInput): Observable<Estimate> {
    return this.http.patch<Estimate>(`/api/jobs/${jobId}/estimate`, input);
  }

  deleteEstimate(jobId: string): Observable<void> {
    return this.http.delete<void>(`/api/jobs/${jobId}/estimate`);
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
