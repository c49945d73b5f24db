import { type Routes } from '@angular/router';

export const materialsRoutes: Routes = [
  {
    path: '',
    title: 'Materials',
    loadComponent: () => import('./materials-page').then((m) => m.MaterialsPage),
  },
  {
    path: ':materialId',
    title: 'Material',
    loadComponent: () => import('./material-page').then((m) => m.MaterialPage),
  },
];
