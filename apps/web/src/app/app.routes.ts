import { type Routes } from '@angular/router';
import { authGuard } from './session/auth-guard';

export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    loadComponent: () => import('./sign-in/sign-in-page').then((m) => m.SignInPage),
  },
  {
    path: '',
    canActivate: [authGuard],
    loadChildren: () => import('./shell/shell.routes').then((m) => m.shellRoutes),
  },
];
