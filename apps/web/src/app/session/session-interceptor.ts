import { HttpErrorResponse, type HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, throwError } from 'rxjs';
import { SessionStore } from './session-store';

/** A session that has run out leads to sign-in, and from there back to the same page. */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  const store = inject(SessionStore);
  const router = inject(Router);
  return next(request).pipe(
    catchError((error: unknown) => {
      const isExpired =
        error instanceof HttpErrorResponse && error.status === 401 && request.url !== '/api/session';
      if (isExpired && store.session()) {
        store.forget();
        void router.navigate(['/sign-in'], { queryParams: { returnTo: router.url, expired: true } });
      }
      return throwError(() => error);
    }),
  );
};
