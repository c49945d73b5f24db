import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Job,
  type JobDetail,
  type JobInput,
  type JobLinePage,
  type JobLineQuery,
  type JobListQuery,
  type JobPage,
  type JobStatus,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** Jobs, their figures and cost lines. */
@Injectable({ providedIn: 'root' })
export class JobsApi {
  private readonly http = inject(HttpClient);

  listJobs(query: Partial<JobListQuery>): Observable<JobPage> {
    return this.http.get<JobPage>('/api/jobs', { params: toQueryParams(query) });
  }

  getJob(jobId: string): Observable<JobDetail> {
    return this.http.get<JobDetail>(`/api/jobs/${jobId}`);
  }

  listJobLines(jobId: string, query: Partial<JobLineQuery>): Observable<JobLinePage> {
    return this.http.get<JobLinePage>(`/api/jobs/${jobId}/lines`, { params: toQueryParams(query) });
  }

  createJob(input: JobInput): Observable<Job> {
    return this.http.post<Job>('/api/jobs', input);
  }

  updateJob(jobId: string, input: JobInput): Observable<Job> {
    return this.http.patch<Job>(`/api/jobs/${jobId}`, input);
  }

  changeStatus(jobId: string, status: JobStatus): Observable<Job> {
    return this.http.post<Job>(`/api/jobs/${jobId}/status`, { status });
  }

  listCustomers(): Observable<{ customerId: string; name: string }[]> {
    return this.http.get<{ customerId: string; name: string }[]>('/api/customers');
  }
}
