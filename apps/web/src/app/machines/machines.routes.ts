import { type Routes } from '@angular/router';
import { leaveGuard } from '../forms/leave-guard';

export const machinesRoutes: Routes = [
  { path: '', title: 'Machines', loadComponent: () => import('./machines-page').then((m) => m.MachinesPage) },
  {
    path: ':machineId',
    title: 'Machine',
    loadComponent: () => import('./machine-page').then((m) => m.MachinePage),
  },
  {
    path: ':machineId/rate',
    title: 'Machine-hour rate',
    data: { permission: 'machines.money' },
    loadComponent: () => import('./rate-builder-page').then((m) => m.RateBuilderPage),
    canDeactivate: [leaveGuard],
  },
];
