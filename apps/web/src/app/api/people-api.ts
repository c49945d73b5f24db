import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Employee,
  type EmployeeCreate,
  type EmployeePatch,
  type OverheadRate,
  type OverheadRateInput,
  type PayRateInput,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Employees with their pay rates and spellings, and the shop's overhead rates. */
@Injectable({ providedIn: 'root' })
export class PeopleApi {
  private readonly http = inject(HttpClient);

  listEmployees(): Observable<Employee[]> {
    return this.http.get<Employee[]>('/api/employees');
  }

  createEmployee(input: EmployeeCreate): Observable<Employee> {
    return this.http.post<Employee>('/api/employees', input);
  }

  updateEmployee(employeeId: string, input: EmployeePatch): Observable<Employee> {
    return this.http.patch<Employee>(`/api/employees/${employeeId}`, input);
  }

  addPayRate(employeeId: string, input: PayRateInput): Observable<Employee> {
    return this.http.post<Employee>(`/api/employees/${employeeId}/rates`, input);
  }

  updatePayRate(employeeId: string, payRateId: string, input: PayRateInput): Observable<Employee> {
    return this.http.patch<Employee>(`/api/employees/${employeeId}/rates/${payRateId}`, input);
  }

  deletePayRate(employeeId: string, payRateId: string): Observable<Employee> {
    return this.http.delete<Employee>(`/api/employees/${employeeId}/rates/${payRateId}`);
  }

  deleteAlias(aliasId: string): Observable<void> {
    return this.http.delete<void>(`/api/aliases/${aliasId}`);
  }

  listOverheadRates(): Observable<OverheadRate[]> {
    return this.http.get<OverheadRate[]>('/api/overhead-rates');
  }

  addOverheadRate(input: OverheadRateInput): Observable<OverheadRate> {
    return this.http.post<OverheadRate>('/api/overhead-rates', input);
  }

  updateOverheadRate(overheadRateId: string, input: OverheadRateInput): Observable<OverheadRate> {
    return this.http.patch<OverheadRate>(`/api/overhead-rates/${overheadRateId}`, input);
  }

  deleteOverheadRate(overheadRateId: string): Observable<void> {
    return this.http.delete<void>(`/api/overhead-rates/${overheadRateId}`);
  }
}
