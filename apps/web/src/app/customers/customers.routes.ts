import { type Routes } from '@angular/router';

export const customersRoutes: Routes = [
  {
    path: '',
    title: 'Customers',
    loadComponent: () => import('./customers-page').then((m) => m.CustomersPage),
  },
  {
    path: ':customerId',
    title: 'Customer',
    loadComponent: () => import('./customer-page').then((m) => m.CustomerPage),
  },
];
