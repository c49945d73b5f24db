import { type Routes } from '@angular/router';
import { latestTrial } from './depth/latest-trial';
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
        path: 'depth',
        title: 'Ram depth',
        resolve: { latest: latestTrial },
        loadComponent: () => import('./depth/depth-page').then((m) => m.DepthPage),
      },
      {
        path: 'card',
        title: 'Card for the press',
        loadComponent: () => import('./depth/card-page').then((m) => m.CardPage),
      },
      {
        path: 'blank',
        title: 'Blank',
        loadComponent: () => import('./blank/blank-page').then((m) => m.BlankPage),
      },
      {
        path: 'runs',
        title: 'Press runs',
        data: { permission: 'press-runs.log' },
        loadComponent: () => import('./runs/runs-page').then((m) => m.RunsPage),
      },
      {
        path: 'setup-card',
        title: 'Set-up card',
        data: { permission: 'press-runs.log' },
        loadComponent: () => import('./runs/setup-card-page').then((m) => m.SetupCardPage),
      },
      {
        path: 'tooling',
        title: 'Dies and punches',
        loadComponent: () => import('./tooling/tooling-page').then((m) => m.ToolingPage),
      },
    ],
  },
];
