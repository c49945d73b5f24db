import { provideHttpClient } from '@angular/common/http';
import { bootstrapApplication } from '@angular/platform-browser';
import { provideRouter } from '@angular/router';
import { Shell } from './shell';

void bootstrapApplication(Shell, {
  providers: [
    provideHttpClient(),
    provideRouter([{ path: '', loadComponent: () => import('./empty-page').then((page) => page.EmptyPage) }]),
  ],
});
