import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type AuditEvent,
  type Operation,
  type OperationInput,
  type SetupResult,
  type Shop,
  type ShopPatch,
  type User,
  type UserCreate,
  type UserCreated,
  type UserPatch,
} from '@brakeven/contract';
import { type Observable } from 'rxjs';

import { toQueryParams } from './query-params';

export interface AuditPage {
  items: AuditEvent[];
  nextCursor: string | null;
}

/** The shop's settings, operations, users, set-up workbook and audit trail. */
@Injectable({ providedIn: 'root' })
export class ShopApi {
  private readonly http = inject(HttpClient);

  readonly setupTemplateUrl = '/api/setup/template';

  getShop(): Observable<Shop> {
    return this.http.get<Shop>('/api/shop');
  }

  updateShop(input: ShopPatch): Observable<Shop> {
    return this.http.patch<Shop>('/api/shop', input);
  }

  listOperations(): Observable<Operation[]> {
    return this.http.get<Operation[]>('/api/operations');
  }

  createOperation(input: OperationInput): Observable<Operation> {
    return this.http.post<Operation>('/api/operations', input);
  }

  updateOperation(operationId: string, input: OperationInput): Observable<Operation> {
    return this.http.patch<Operation>(`/api/operations/${operationId}`, input);
  }

  listUsers(): Observable<User[]> {
    return this.http.get<User[]>('/api/users');
  }

  createUser(input: UserCreate): Observable<UserCreated> {
    return this.http.post<UserCreated>('/api/users', input);
  }

  updateUser(userId: string, input: UserPatch): Observable<User> {
    return this.http.patch<User>(`/api/users/${userId}`, input);
  }

  resetPassword(userId: string): Observable<UserCreated> {
    return this.http.post<UserCreated>(`/api/users/${userId}/password`, {});
  }

  /** Checks a set-up workbook; writes nothing. */
  checkSetup(file: File): Observable<SetupResult> {
    return this.http.post<SetupResult>('/api/setup/check', fileBody(file));
  }

  /** Imports a set-up workbook, all or nothing. */
  importSetup(file: File): Observable<SetupResult> {
    return this.http.post<SetupResult>('/api/setup', fileBody(file));
  }

  listAuditEvents(cursor: string | undefined, limit: number): Observable<AuditPage> {
    return this.http.get<AuditPage>('/api/audit', { params: toQueryParams({ cursor, limit }) });
  }
}

function fileBody(file: File): FormData {
  const body = new FormData();
  body.append('file', file, file.name);
  return body;
}
