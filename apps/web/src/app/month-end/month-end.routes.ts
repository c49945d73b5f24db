import { type Routes } from '@angular/router';

const loadComponent = () => import('./month-end-page').then((m) => m.MonthEndPage);

export const monthEndRoutes: Routes = [
  { path: '', title: 'Month end', loadComponent },
  { path: ':month', title: 'Month end', loadComponent },
];
