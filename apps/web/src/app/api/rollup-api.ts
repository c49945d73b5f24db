import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type RollupResult, type RollupStatus } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Through which day costs are rolled up, and the button that rolls up the rest. */
@Injectable({ providedIn: 'root' })
export class RollupApi {
  private readonly http = inject(HttpClient);

  getStatus(): Observable<RollupStatus> {
    return this.http.get<RollupStatus>('/api/rollup');
  }

  run(): Observable<RollupResult> {
    return this.http.post<RollupResult>('/api/rollup', {});
  }
}
