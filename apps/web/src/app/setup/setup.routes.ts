import { type Routes } from '@angular/router';

export const peopleRoutes: Routes = [
  {
    path: '',
    title: 'People & rates',
    loadComponent: () => import('./people-page').then((m) => m.PeoplePage),
  },
];

export const shopRoutes: Routes = [
  { path: '', title: 'Shop', loadComponent: () => import('./shop-page').then((m) => m.ShopPage) },
];

export const accountRoutes: Routes = [
  { path: '', title: 'Account', loadComponent: () => import('./account-page').then((m) => m.AccountPage) },
];
