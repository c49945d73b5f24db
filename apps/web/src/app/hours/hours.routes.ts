import { type Routes } from '@angular/router';

export const hoursRoutes: Routes = [];
