import { HttpClient, type HttpEvent, HttpEventType } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import {
  type SheetExcerpt,
  type TimesheetCheck,
  type TimesheetImport,
  type TimesheetImportDetail,
  type TimesheetImported,
  type TimesheetOptions,
  type TimesheetUndone,
} from '@brakeven/contract';
import { filter, map, type Observable } from 'rxjs';

/** What is known of an upload while it runs: the share that has been sent, or the answer. */
export type Upload<T> = { sent: number; total: number | null } | { answer: T };

/** Timesheets: check, commit, undo, history, and the kept workbook. */
@Injectable({ providedIn: 'root' })
export class TimesheetsApi {
  private readonly http = inject(HttpClient);

  /** Reads and checks a file; writes nothing. */
  check(file: File, options: Partial<TimesheetOptions>): Observable<Upload<TimesheetCheck>> {
    return this.upload<TimesheetCheck>('/api/timesheets/check', file, options);
  }

  /** Checks again and commits in one transaction. */
  commit(file: File, options: Partial<TimesheetOptions>): Observable<Upload<TimesheetImported>> {
    return this.upload<TimesheetImported>('/api/timesheets', file, options);
  }

  list(): Observable<TimesheetImport[]> {
    return this.http.get<TimesheetImport[]>('/api/timesheets');
  }

  get(importId: string): Observable<TimesheetImportDetail> {
    return this.http.get<TimesheetImportDetail>(`/api/timesheets/${importId}`);
  }

  getExcerpt(importId: string, sheet: string, row: number): Observable<SheetExcerpt> {
    return this.http.get<SheetExcerpt>(`/api/timesheets/${importId}/excerpt`, { params: { sheet, row } });
  }

  undo(importId: string): Observable<TimesheetUndone> {
    return this.http.post<TimesheetUndone>(`/api/timesheets/${importId}/undo`, {});
  }

  /** Where the browser fetches the workbook as it came. */
  fileUrl(importId: string): string {
    return `/api/timesheets/${importId}/file`;
  }

  private upload<T>(url: string, file: File, options: Partial<TimesheetOptions>): Observable<Upload<T>> {
    const body = new FormData();
    body.append('options', JSON.stringify(options));
    body.append('file', file, file.name);
    return this.http.post<T>(url, body, { observe: 'events', reportProgress: true }).pipe(
      map((event) => toUpload(event)),
      filter((upload) => upload !== null),
    );
  }
}

function toUpload<T>(event: HttpEvent<T>): Upload<T> | null {
  if (event.type === HttpEventType.UploadProgress) return { sent: event.loaded, total: event.total ?? null };
  if (event.type === HttpEventType.Response && event.body !== null) return { answer: event.body };
  return null;
}
