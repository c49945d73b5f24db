import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type SavedView, type SavedViewInput, type ViewPage } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Views that somebody keeps of a page. */
@Injectable({ providedIn: 'root' })
export class SavedViewsApi {
  private readonly http = inject(HttpClient);

  listSavedViews(page: ViewPage): Observable<SavedView[]> {
    return this.http.get<SavedView[]>('/api/saved-views', { params: { page } });
  }

  saveView(input: SavedViewInput): Observable<SavedView> {
    return this.http.post<SavedView>('/api/saved-views', input);
  }

  deleteSavedView(savedViewId: string): Observable<void> {
    return this.http.delete<void>(`/api/saved-views/${savedViewId}`);
  }
}
