import { type Routes } from '@angular/router';

export const jobsRoutes: Routes = [
  { path: '', title: 'Jobs', loadComponent: () => import('./jobs-page').then((m) => m.JobsPage) },
  { path: ':jobId', title: 'Job', loadComponent: () => import('./job-page').then((m) => m.JobPage) },
];
