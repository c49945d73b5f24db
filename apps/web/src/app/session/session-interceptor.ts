import { HttpErrorResponse, type HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, throwError } from 'rxjs';
import { Notifier } from '../shell/notifier';
import { SessionStore } from './session-store';

const SIGN_IN = '/sign-in';

/**
 * A session that has run out leads to sign-in, and from there back to the same page. Who stays with unsaved work keeps
 * the session's shop here: what is typed in its units must not be read in others.
 */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  const store = inject(SessionStore);
  const router = inject(Router);
  const notifier = inject(Notifier);
  return next(request).pipe(
    catchError((error: unknown) => {
      const isExpired =
        error instanceof HttpErrorResponse && error.status === 401 && request.url !== '/api/session';
      if (isExpired && store.session() && !isLeadingTo(SIGN_IN, router)) {
        const queryParams = { returnTo: router.url, expired: true };
        void router.navigate([SIGN_IN], { queryParams }).then((hasLeft) => {
          if (hasLeft) store.forget();
          else notifier.warn('Your session has ended. Sign in in another tab, then save here.');
        });
      }
      return throwError(() => error);
    }),
  );
};

function isLeadingTo(path: string, router: Router): boolean {
  return router.currentNavigation()?.extractedUrl.toString().startsWith(path) ?? false;
}
