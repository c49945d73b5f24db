import { type Routes } from '@angular/router';
import { type Permission } from '@brakeven/contract';
import { PROBLEM_WORDS, WORKINGS_OPENER } from '@brakeven/ui';
import { toShownProblem } from '../api/problem-text';
import { homeGuard, permissionGuard } from '../session/auth-guard';
import { WorkingsStore } from '../workings/workings-store';
import { Shell } from './shell';

const needs = (permission: Permission) => ({ permission });

/**
 * Every page behind sign-in. What the shared parts need is provided here and not at the root: `@brakeven/ui` would
 * otherwise be loaded before anybody has signed in.
 */
export const shellRoutes: Routes = [
  {
    path: '',
    component: Shell,
    providers: [
      { provide: PROBLEM_WORDS, useValue: toShownProblem },
      { provide: WORKINGS_OPENER, useExisting: WorkingsStore },
    ],
    canActivateChild: [permissionGuard],
    children: [
      { path: '', pathMatch: 'full', canActivate: [homeGuard], children: [] },
      {
        path: 'payback',
        data: needs('payback.view'),
        loadChildren: () => import('../payback/payback.routes').then((m) => m.paybackRoutes),
      },
      {
        path: 'jobs',
        data: needs('jobs.view'),
        loadChildren: () => import('../jobs/jobs.routes').then((m) => m.jobsRoutes),
      },
      {
        path: 'customers',
        data: needs('jobs.money'),
        loadChildren: () => import('../customers/customers.routes').then((m) => m.customersRoutes),
      },
      {
        path: 'hours',
        data: needs('hours.own'),
        loadChildren: () => import('../hours/hours.routes').then((m) => m.hoursRoutes),
      },
      {
        path: 'machines',
        data: needs('machines.view'),
        loadChildren: () => import('../machines/machines.routes').then((m) => m.machinesRoutes),
      },
      {
        path: 'forming',
        data: needs('forming.use'),
        loadChildren: () => import('../forming/forming.routes').then((m) => m.formingRoutes),
      },
      {
        path: 'timesheets',
        data: needs('timesheets.use'),
        loadChildren: () => import('../timesheets/timesheets.routes').then((m) => m.timesheetsRoutes),
      },
      {
        path: 'month-end',
        data: needs('months.view'),
        loadChildren: () => import('../month-end/month-end.routes').then((m) => m.monthEndRoutes),
      },
      {
        path: 'people',
        data: needs('people.view'),
        loadChildren: () => import('../setup/setup.routes').then((m) => m.peopleRoutes),
      },
      {
        path: 'materials',
        data: needs('materials.view'),
        loadChildren: () => import('../materials/materials.routes').then((m) => m.materialsRoutes),
      },
      {
        path: 'shop',
        data: needs('shop.edit'),
        loadChildren: () => import('../setup/setup.routes').then((m) => m.shopRoutes),
      },
      {
        path: 'account',
        data: needs('session.own'),
        loadChildren: () => import('../setup/setup.routes').then((m) => m.accountRoutes),
      },
      {
        path: 'not-allowed',
        title: 'Not for your role',
        data: { reason: 'forbidden' },
        loadComponent: () => import('./blocked-page').then((m) => m.BlockedPage),
      },
      {
        path: '**',
        title: 'No such page',
        data: { reason: 'no-such-page' },
        loadComponent: () => import('./blocked-page').then((m) => m.BlockedPage),
      },
    ],
  },
];
