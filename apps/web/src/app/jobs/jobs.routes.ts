import { type Routes } from '@angular/router';

export const jobsRoutes: Routes = [];
