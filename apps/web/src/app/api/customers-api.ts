import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type CustomerDetail, type CustomerInput, type CustomerList } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Customers with what their jobs cost and brought. */
@Injectable({ providedIn: 'root' })
export class CustomersApi {
  private readonly http = inject(HttpClient);

  list(): Observable<CustomerList> {
    return this.http.get<CustomerList>('/api/customers/figures');
  }

  get(customerId: string): Observable<CustomerDetail> {
    return this.http.get<CustomerDetail>(`/api/customers/${customerId}`);
  }

  rename(customerId: string, input: CustomerInput): Observable<CustomerDetail> {
    return this.http.patch<CustomerDetail>(`/api/customers/${customerId}`, input);
  }
}
