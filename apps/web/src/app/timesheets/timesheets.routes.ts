import { type Routes } from '@angular/router';

export const timesheetsRoutes: Routes = [
  {
    path: '',
    title: 'Timesheets',
    loadComponent: () => import('./timesheets-page').then((m) => m.TimesheetsPage),
  },
  {
    path: ':importId',
    title: 'Import',
    loadComponent: () => import('./import-page').then((m) => m.ImportPage),
  },
];
