import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Invoice,
  type InvoiceInput,
  type InvoiceList,
  type OutsideService,
  type OutsideServiceInput,
  type OutsideServiceList,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Outside services, invoices and credit notes of a job. */
@Injectable({ providedIn: 'root' })
export class JobMoneyApi {
  private readonly http = inject(HttpClient);

  listServices(jobId: string): Observable<OutsideServiceList> {
    return this.http.get<OutsideServiceList>(`/api/jobs/${jobId}/outside-services`);
  }

  addService(jobId: string, input: OutsideServiceInput): Observable<OutsideService> {
    return this.http.post<OutsideService>(`/api/jobs/${jobId}/outside-services`, input);
  }

  correctService(serviceId: string, input: OutsideServiceInput): Observable<OutsideService> {
    return this.http.patch<OutsideService>(`/api/outside-services/${serviceId}`, input);
  }

  voidService(serviceId: string): Observable<void> {
    return this.http.post<void>(`/api/outside-services/${serviceId}/void`, null);
  }

  restoreService(serviceId: string): Observable<void> {
    return this.http.post<void>(`/api/outside-services/${serviceId}/restore`, null);
  }

  listInvoices(jobId: string): Observable<InvoiceList> {
    return this.http.get<InvoiceList>(`/api/jobs/${jobId}/invoices`);
  }

  addInvoice(jobId: string, input: InvoiceInput): Observable<Invoice> {
    return this.http.post<Invoice>(`/api/jobs/${jobId}/invoices`, input);
  }

  correctInvoice(invoiceId: string, input: InvoiceInput): Observable<Invoice> {
    return this.http.patch<Invoice>(`/api/invoices/${invoiceId}`, input);
  }

  voidInvoice(invoiceId: string): Observable<void> {
    return this.http.post<void>(`/api/invoices/${invoiceId}/void`, null);
  }

  restoreInvoice(invoiceId: string): Observable<void> {
    return this.http.post<void>(`/api/invoices/${invoiceId}/restore`, null);
  }
}
