import { type Routes } from '@angular/router';
import { HoursPage } from './hours-page';

export const hoursRoutes: Routes = [{ path: '', title: 'Hours', component: HoursPage }];
