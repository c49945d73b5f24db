import { inject } from '@angular/core';
import {
  type ActivatedRouteSnapshot,
  type CanActivateChildFn,
  type CanActivateFn,
  type GuardResult,
  RedirectCommand,
  Router,
} from '@angular/router';
import { type Permission } from '@brakeven/contract';
import { findHomePath } from '../shell/navigation';
import { SessionStore } from './session-store';

/** Lets in who is signed in; others go to sign-in and come back. A temporary password has to be changed first. */
export const authGuard: CanActivateFn = async (_route, state): Promise<GuardResult> => {
  const store = inject(SessionStore);
  const router = inject(Router);
  try {
    const session = await store.load();
    if (!session) return router.createUrlTree(['/sign-in'], { queryParams: { returnTo: state.url } });
  } catch {
    return router.createUrlTree(['/sign-in'], {
      queryParams: { returnTo: state.url, unreachable: true },
    });
  }
  return true;
};

/** Shows a page only to roles that have its permission; the address stays, so that it can be told to somebody. */
export const permissionGuard: CanActivateChildFn = (route, state): GuardResult => {
  const store = inject(SessionStore);
  const router = inject(Router);
  if (store.user()?.mustChangePassword && !state.url.startsWith('/account')) {
    return router.createUrlTree(['/account']);
  }
  const permission = findPermission(route);
  if (!permission || store.can(permission)) return true;
  return new RedirectCommand(router.createUrlTree(['/not-allowed']), { skipLocationChange: true });
};

/** Leads from the bare address to the first page of the role. */
export const homeGuard: CanActivateFn = (): GuardResult => {
  const role = inject(SessionStore).role();
  return inject(Router).createUrlTree([role ? findHomePath(role) : '/sign-in']);
};

function findPermission(route: ActivatedRouteSnapshot): Permission | undefined {
  return route.data['permission'] as Permission | undefined;
}
