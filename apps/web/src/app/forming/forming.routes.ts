import { type Routes } from '@angular/router';
import { FormingPage } from './forming-page';
import { FormingStore } from './forming-store';

export const formingRoutes: Routes = [
  {
    path: '',
    component: FormingPage,
    providers: [FormingStore],
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'fit' },
      {
        path: 'fit',
        title: 'Will it fit',
        loadComponent: () => import('./fit/fit-page').then((m) => m.FitPage),
      },
      {
        path: 'blank',
        title: 'Blank',
        loadComponent: () => import('./blank/blank-page').then((m) => m.BlankPage),
      },
    ],
  },
];
