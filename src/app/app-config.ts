import { provideHttpClient, withFetch } from '@angular/common/http';
import { inject, provideAppInitializer, type ApplicationConfig } from '@angular/core';
import { MatIconRegistry } from '@angular/material/icon';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';
import { appRoutes } from './app-routes';
import { PageTitle } from './page-title';

/** What the whole application shares: routes, HTTP and the icon font. */
export const appConfig: ApplicationConfig = {
  providers: [
    provideRouter(
      appRoutes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    provideHttpClient(withFetch()),
    provideAppInitializer(() => {
      inject(MatIconRegistry).setDefaultFontSetClass('icon');
    }),
    { provide: TitleStrategy, useExisting: PageTitle },
  ],
};
