import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { type Session } from '@brakeven/contract';
import { type Observable } from 'rxjs';

/** Sign-in, sign-out, own password. */
@Injectable({ providedIn: 'root' })
export class SessionApi {
  private readonly http = inject(HttpClient);

  getSession(): Observable<Session> {
    return this.http.get<Session>('/api/session');
  }

  signIn(credentials: { email: string; password: string }): Observable<Session> {
    return this.http.post<Session>('/api/session', credentials);
  }

  signOut(): Observable<null> {
    return this.http.delete<null>('/api/session');
  }

  changePassword(change: { currentPassword: string; newPassword: string }): Observable<null> {
    return this.http.post<null>('/api/session/password', change);
  }
}
