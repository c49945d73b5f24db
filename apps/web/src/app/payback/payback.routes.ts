import { type Routes } from '@angular/router';
import { PaybackPage } from './payback-page';

export const paybackRoutes: Routes = [{ path: '', title: 'Payback', component: PaybackPage }];
