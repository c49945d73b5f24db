import { type Routes } from '@angular/router';

export const paybackRoutes: Routes = [];
