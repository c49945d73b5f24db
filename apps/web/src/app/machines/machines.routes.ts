import { type Routes } from '@angular/router';

export const machinesRoutes: Routes = [];
