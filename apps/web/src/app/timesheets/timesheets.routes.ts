import { type Routes } from '@angular/router';

export const timesheetsRoutes: Routes = [];
