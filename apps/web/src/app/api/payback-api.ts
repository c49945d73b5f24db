import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type Payback } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Has a machine paid for itself, and when will it. */
@Injectable({ providedIn: 'root' })
export class PaybackApi {
  private readonly http = inject(HttpClient);

  getPayback(machineId: string): Observable<Payback> {
    return this.http.get<Payback>(`/api/machines/${machineId}/payback`);
  }
}
