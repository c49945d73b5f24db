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
  withNavigationErrorHandler,
} from '@angular/router';
import { routes } from './app.routes';
import { sessionInterceptor } from './session/session-interceptor';
import { Notifier } from './shell/notifier';
import { PageTitle } from './shell/page-title';
import { ThemeStore } from './shell/theme-store';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
      withNavigationErrorHandler(warnOfUnloadedPage),
    ),
    provideHttpClient(
      withInterceptors([sessionInterceptor]),
      withXsrfConfiguration({ cookieName: 'XSRF-TOKEN', headerName: 'X-XSRF-TOKEN' }),
    ),
    provideAppInitializer(() => inject(ThemeStore).apply()),
    { provide: TitleStrategy, useExisting: PageTitle },
  ],
};

/** A page's code could not be fetched: the network, or a newer version has taken its place. */
function warnOfUnloadedPage(): void {
  inject(Notifier).warn('That page could not be loaded. Nothing was changed.', () => location.reload());
}
