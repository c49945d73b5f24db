import { type Routes } from '@angular/router';
import { type Permission } from '@brakeven/contract';
import { authGuard, homeGuard, permissionGuard } from './session/auth-guard';

const needs = (permission: Permission) => ({ permission });

export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    loadComponent: () => import('./sign-in/sign-in-page').then((m) => m.SignInPage),
  },
  {
    path: '',
    loadComponent: () => import('./shell/shell').then((m) => m.Shell),
    canActivate: [authGuard],
    canActivateChild: [permissionGuard],
    children: [
      { path: '', pathMatch: 'full', canActivate: [homeGuard], children: [] },
      {
        path: 'payback',
        data: needs('payback.view'),
        loadChildren: () => import('./payback/payback.routes').then((m) => m.paybackRoutes),
      },
      {
        path: 'jobs',
        data: needs('jobs.view'),
        loadChildren: () => import('./jobs/jobs.routes').then((m) => m.jobsRoutes),
      },
      {
        path: 'hours',
        data: needs('hours.own'),
        loadChildren: () => import('./hours/hours.routes').then((m) => m.hoursRoutes),
      },
      {
        path: 'machines',
        data: needs('machines.view'),
        loadChildren: () => import('./machines/machines.routes').then((m) => m.machinesRoutes),
      },
      {
        path: 'timesheets',
        data: needs('timesheets.use'),
        loadChildren: () => import('./timesheets/timesheets.routes').then((m) => m.timesheetsRoutes),
      },
      {
        path: 'people',
        data: needs('people.view'),
        loadChildren: () => import('./setup/setup.routes').then((m) => m.peopleRoutes),
      },
      {
        path: 'shop',
        data: needs('shop.edit'),
        loadChildren: () => import('./setup/setup.routes').then((m) => m.shopRoutes),
      },
      {
        path: 'account',
        data: needs('session.own'),
        loadChildren: () => import('./setup/setup.routes').then((m) => m.accountRoutes),
      },
      {
        path: 'not-allowed',
        title: 'Not for your role',
        data: { reason: 'forbidden' },
        loadComponent: () => import('./shell/blocked-page').then((m) => m.BlockedPage),
      },
      {
        path: '**',
        title: 'No such page',
        data: { reason: 'no-such-page' },
        loadComponent: () => import('./shell/blocked-page').then((m) => m.BlockedPage),
      },
    ],
  },
];
