import { type Routes } from '@angular/router';
import { leaveGuard } from '../forms/leave-guard';

export const jobsRoutes: Routes = [
  { path: '', title: 'Jobs', loadComponent: () => import('./jobs-page').then((m) => m.JobsPage) },
  {
    path: ':jobId/estimate',
    title: 'Estimate',
    loadComponent: () => import('./estimate/estimate-page').then((m) => m.EstimatePage),
    canDeactivate: [leaveGuard],
  },
  { path: ':jobId', title: 'Job', loadComponent: () => import('./job-page').then((m) => m.JobPage) },
];
