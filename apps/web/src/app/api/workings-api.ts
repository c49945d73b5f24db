import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type FigureRef, LIMITS, type Workings } from '@brakeven/contract';
import { type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

const HOURS_OF_JOBS = ['job.hours', 'job.machineHours'];

/** Addresses that are not called like their figures. */
const SOURCES: Readonly<Record<string, string>> = { estimate: 'estimates' };

/** How a figure was made. */
@Injectable({ providedIn: 'root' })
export class WorkingsApi {
  private readonly http = inject(HttpClient);

  /** One page of a figure's workings, a short one first, long ones afterwards; hours of jobs have an address of their own, open to those without money. */
  getWorkings(ref: FigureRef, cursor?: string): Observable<Workings> {
    return this.http.get<Workings>(`/api/workings/${findSource(ref)}`, {
      params: toQueryParams({ ...ref, cursor, limit: cursor && LIMITS.pageSizeMax }),
    });
  }
}

function findSource({ figure }: FigureRef): string {
  const [kind = ''] = figure.split('.');
  if (kind !== 'job') return SOURCES[kind] ?? kind;
  return HOURS_OF_JOBS.includes(figure) ? 'job-hours' : 'jobs';
}
