import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type Die,
  type DieInput,
  type ForceLineInput,
  type FormingMaterialDto,
  type FormingMaterialInput,
  type FormingReference,
  type Punch,
  type PunchInput,
  type ShopGauge,
  type ShopGaugeInput,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** What bends are computed from, and the tools that it names. */
@Injectable({ providedIn: 'root' })
export class FormingApi {
  private readonly http = inject(HttpClient);

  getReference(): Observable<FormingReference> {
    return this.http.get<FormingReference>('/api/forming/reference');
  }

  updateForceLine(input: ForceLineInput): Observable<void> {
    return this.http.patch<void>('/api/forming/force-line', input);
  }

  createMaterial(input: FormingMaterialInput & { code: string }): Observable<FormingMaterialDto> {
    return this.http.post<FormingMaterialDto>('/api/forming/materials', input);
  }

  updateMaterial(code: string, input: FormingMaterialInput): Observable<FormingMaterialDto> {
    return this.http.patch<FormingMaterialDto>(`/api/forming/materials/${encodeURIComponent(code)}`, input);
  }

  /** Takes an own material out, or puts a shipped one back. */
  deleteMaterial(code: string): Observable<void> {
    return this.http.delete<void>(`/api/forming/materials/${encodeURIComponent(code)}`);
  }

  updateGauge(system: ShopGauge['system'], gauge: number, input: ShopGaugeInput): Observable<ShopGauge> {
    return this.http.patch<ShopGauge>(`/api/forming/gauges/${system}/${gauge}`, input);
  }

  deleteGauge(system: ShopGauge['system'], gauge: number): Observable<void> {
    return this.http.delete<void>(`/api/forming/gauges/${system}/${gauge}`);
  }

  createPunch(machineId: string, input: PunchInput): Observable<Punch> {
    return this.http.post<Punch>(`/api/machines/${machineId}/punches`, input);
  }

  updatePunch(punchId: string, input: PunchInput): Observable<Punch> {
    return this.http.patch<Punch>(`/api/punches/${punchId}`, input);
  }

  deletePunch(punchId: string): Observable<void> {
    return this.http.delete<void>(`/api/punches/${punchId}`);
  }

  createDie(machineId: string, input: DieInput): Observable<Die> {
    return this.http.post<Die>(`/api/machines/${machineId}/dies`, input);
  }

  updateDie(dieId: string, input: DieInput): Observable<Die> {
    return this.http.patch<Die>(`/api/dies/${dieId}`, input);
  }

  deleteDie(dieId: string): Observable<void> {
    return this.http.delete<void>(`/api/dies/${dieId}`);
  }
}
