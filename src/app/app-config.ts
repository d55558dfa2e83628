import { provideHttpClient } from '@angular/common/http';
import {
  ErrorHandler,
  inject,
  isDevMode,
  provideAppInitializer,
  type ApplicationConfig,
} from '@angular/core';
import { MatIconRegistry } from '@angular/material/icon';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';
import { provideServiceWorker } from '@angular/service-worker';
import { appRoutes } from './app-routes';
import { UnexpectedErrors } from './core/unexpected-errors';
import { PageTitle } from './page-title';

/** What the whole application shares: routes, HTTP, the icon font and what becomes of errors. */
export const appConfig: ApplicationConfig = {
  providers: [
    provideRouter(
      appRoutes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    // Without fetch, which can't say how far an upload has come.
    provideHttpClient(),
    provideAppInitializer(() => {
      inject(MatIconRegistry).setDefaultFontSetClass('icon');
    }),
    // Its first visit must not compete with the page for a weak signal.
    provideServiceWorker('ngsw-worker.js', {
      enabled: !isDevMode(),
      registrationStrategy: 'registerWhenStable:30000',
    }),
    { provide: ErrorHandler, useClass: UnexpectedErrors },
    { provide: TitleStrategy, useExisting: PageTitle },
  ],
};
