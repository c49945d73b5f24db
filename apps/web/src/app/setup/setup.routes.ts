import { type Routes } from '@angular/router';

export const peopleRoutes: Routes = [];
export const shopRoutes: Routes = [];
export const accountRoutes: Routes = [];
