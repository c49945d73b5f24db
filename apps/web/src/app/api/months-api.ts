import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type MonthEnd, type Months, type MonthTieOut } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Months: how they stand, what is missing, closing and reopening. */
@Injectable({ providedIn: 'root' })
export class MonthsApi {
  private readonly http = inject(HttpClient);

  list(): Observable<Months> {
    return this.http.get<Months>('/api/months');
  }

  get(month: string): Observable<MonthEnd> {
    return this.http.get<MonthEnd>(`/api/months/${month}`);
  }

  close(month: string): Observable<MonthEnd> {
    return this.http.post<MonthEnd>(`/api/months/${month}/close`, {});
  }

  reopen(month: string, reason: string): Observable<MonthEnd> {
    return this.http.post<MonthEnd>(`/api/months/${month}/reopen`, { reason });
  }

  /** Null forgets them. */
  savePayrollHours(month: string, employeeId: string, hours: string | null): Observable<MonthTieOut> {
    return this.http.patch<MonthTieOut>(`/api/months/${month}/payroll-hours/${employeeId}`, { hours });
  }

  /** Says that somebody has looked at the refused rows of an import, or takes that back. */
  reviewRefusals(importId: string, isReviewed: boolean): Observable<void> {
    return this.http.post<void>(`/api/timesheets/${importId}/review`, { isReviewed });
  }
}
