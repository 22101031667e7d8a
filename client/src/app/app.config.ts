import {
  provideHttpClient,
  withInterceptors,
  withXsrfConfiguration,
} from '@angular/common/http';
import {
  ApplicationConfig,
  LOCALE_ID,
  inject,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
  provideZonelessChangeDetection,
} from '@angular/core';
import {
  TitleStrategy,
  provideRouter,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';

import { routes } from './app.routes';
import { SessionStore } from './auth/session-store';
import {
  connectionInterceptor,
  freshTokenInterceptor,
  problemInterceptor,
  signInInterceptor,
} from './http/interceptors';
import { PageTitle } from './ui/page-title';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideZonelessChangeDetection(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    // The first interceptor sees a failure last: the typed problem leaves the innermost raw error.
    provideHttpClient(
      withXsrfConfiguration({ cookieName: 'XSRF-TOKEN', headerName: 'X-XSRF-TOKEN' }),
      withInterceptors([
        problemInterceptor,
        signInInterceptor,
        freshTokenInterceptor,
        connectionInterceptor,
      ]),
    ),
    { provide: LOCALE_ID, useValue: 'en-GB' },
    { provide: TitleStrategy, useClass: PageTitle },
    // Not awaited: the page is drawn at once, and the guards wait for the answer themselves.
    provideAppInitializer(() => {
      const session = inject(SessionStore);
      session.load().subscribe({ error: () => session.assumeVisitor() });
    }),
  ],
};
