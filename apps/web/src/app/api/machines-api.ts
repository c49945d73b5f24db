import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Machine,
  type MachineBuiltRateInput,
  type MachineCostItemInput,
  type MachineInput,
  type MachineRateInput,
  type MachineRecovery,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Machines with their landed cost and rates; every change answers the whole machine. */
@Injectable({ providedIn: 'root' })
export class MachinesApi {
  private readonly http = inject(HttpClient);

  list(): Observable<Machine[]> {
    return this.http.get<Machine[]>('/api/machines');
  }

  get(machineId: string): Observable<Machine> {
    return this.http.get<Machine>(`/api/machines/${machineId}`);
  }

  create(input: MachineInput): Observable<Machine> {
    return this.http.post<Machine>('/api/machines', input);
  }

  update(machineId: string, input: MachineInput): Observable<Machine> {
    return this.http.patch<Machine>(`/api/machines/${machineId}`, input);
  }

  addCostItem(machineId: string, input: MachineCostItemInput): Observable<Machine> {
    return this.http.post<Machine>(`/api/machines/${machineId}/cost-items`, input);
  }

  updateCostItem(machineId: string, costItemId: string, input: MachineCostItemInput): Observable<Machine> {
    return this.http.patch<Machine>(`/api/machines/${machineId}/cost-items/${costItemId}`, input);
  }

  deleteCostItem(machineId: string, costItemId: string): Observable<Machine> {
    return this.http.delete<Machine>(`/api/machines/${machineId}/cost-items/${costItemId}`);
  }

  addRate(machineId: string, input: MachineRateInput): Observable<Machine> {
    return this.http.post<Machine>(`/api/machines/${machineId}/rates`, input);
  }

  updateRate(machineId: string, rateId: string, input: MachineRateInput): Observable<Machine> {
    return this.http.patch<Machine>(`/api/machines/${machineId}/rates/${rateId}`, input);
  }

  addBuiltRate(machineId: string, input: MachineBuiltRateInput): Observable<Machine> {
    return this.http.post<Machine>(`/api/machines/${machineId}/built-rates`, input);
  }

  updateBuiltRate(machineId: string, rateId: string, input: MachineBuiltRateInput): Observable<Machine> {
    return this.http.patch<Machine>(`/api/machines/${machineId}/built-rates/${rateId}`, input);
  }

  /** Fixed cost of a period against what the hours really run have carried of it. */
  getRecovery(machineId: string, from: string, to: string): Observable<MachineRecovery> {
    const params = { from, to };
    return this.http.get<MachineRecovery>(`/api/machines/${machineId}/recovery`, { params });
  }

  deleteRate(machineId: string, rateId: string): Observable<Machine> {
    return this.http.delete<Machine>(`/api/machines/${machineId}/rates/${rateId}`);
  }
}
