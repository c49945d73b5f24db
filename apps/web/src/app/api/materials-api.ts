import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type JobMaterialList,
  type Material,
  type MaterialInput,
  type MaterialIssue,
  type MaterialIssueInput,
  type SheetLot,
  type SheetLotInput,
  type StockMovePage,
  type StockMoveQuery,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';
import { toQueryParams } from './query-params';

/** Materials, their lots, issues to jobs, and the stock ledger. */
@Injectable({ providedIn: 'root' })
export class MaterialsApi {
  private readonly http = inject(HttpClient);

  list(): Observable<Material[]> {
    return this.http.get<Material[]>('/api/materials');
  }

  get(materialId: string): Observable<Material> {
    return this.http.get<Material>(`/api/materials/${materialId}`);
  }

  create(input: MaterialInput): Observable<Material> {
    return this.http.post<Material>('/api/materials', input);
  }

  update(materialId: string, input: MaterialInput): Observable<Material> {
    return this.http.patch<Material>(`/api/materials/${materialId}`, input);
  }

  listMoves(materialId: string, query: Partial<StockMoveQuery>): Observable<StockMovePage> {
    const params = toQueryParams(query);
    return this.http.get<StockMovePage>(`/api/materials/${materialId}/moves`, { params });
  }

  addLot(materialId: string, input: SheetLotInput): Observable<SheetLot> {
    return this.http.post<SheetLot>(`/api/materials/${materialId}/lots`, input);
  }

  correctLot(lotId: string, input: SheetLotInput): Observable<SheetLot> {
    return this.http.patch<SheetLot>(`/api/sheet-lots/${lotId}`, input);
  }

  voidLot(lotId: string): Observable<void> {
    return this.http.post<void>(`/api/sheet-lots/${lotId}/void`, null);
  }

  restoreLot(lotId: string): Observable<void> {
    return this.http.post<void>(`/api/sheet-lots/${lotId}/restore`, null);
  }

  listOfJob(jobId: string): Observable<JobMaterialList> {
    return this.http.get<JobMaterialList>(`/api/jobs/${jobId}/material-issues`);
  }

  addIssue(input: MaterialIssueInput): Observable<MaterialIssue> {
    return this.http.post<MaterialIssue>('/api/material-issues', input);
  }

  correctIssue(issueId: string, input: MaterialIssueInput): Observable<MaterialIssue> {
    return this.http.patch<MaterialIssue>(`/api/material-issues/${issueId}`, input);
  }

  voidIssue(issueId: string): Observable<void> {
    return this.http.post<void>(`/api/material-issues/${issueId}/void`, null);
  }

  restoreIssue(issueId: string): Observable<void> {
    return this.http.post<void>(`/api/material-issues/${issueId}/restore`, null);
  }
}
