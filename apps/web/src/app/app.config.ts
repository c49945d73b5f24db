import { provideHttpClient, withInterceptors, withXsrfConfiguration } from '@angular/common/http';
import {
  type ApplicationConfig,
  inject,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
} from '@angular/core';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';
import { PROBLEM_WORDS, SHOP_FORMAT, WORKINGS_OPENER } from '@brakeven/ui';
import { toShownProblem } from './api/problem-text';
import { routes } from './app.routes';
import { sessionInterceptor } from './session/session-interceptor';
import { SessionStore } from './session/session-store';
import { PageTitle } from './shell/page-title';
import { ThemeStore } from './shell/theme-store';
import { WorkingsStore } from './workings/workings-store';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    provideHttpClient(
      withInterceptors([sessionInterceptor]),
      withXsrfConfiguration({ cookieName: 'XSRF-TOKEN', headerName: 'X-XSRF-TOKEN' }),
    ),
    provideAppInitializer(() => inject(ThemeStore).apply()),
    { provide: TitleStrategy, useExisting: PageTitle },
    { provide: SHOP_FORMAT, useFactory: () => inject(SessionStore).shopFormat },
    { provide: PROBLEM_WORDS, useValue: toShownProblem },
    { provide: WORKINGS_OPENER, useExisting: WorkingsStore },
  ],
};
