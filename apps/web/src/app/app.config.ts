import { provideBrowserGlobalErrorListeners, type ApplicationConfig } from '@angular/core';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
} from '@angular/router';
import { provideApollo } from 'apollo-angular';
import { routes } from './app.routes';
import { apolloOptions } from './graphql/apollo-options';
import { PageTitle } from './shell/page-title';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled' }),
    ),
    provideApollo(apolloOptions),
    { provide: TitleStrategy, useClass: PageTitle },
  ],
};
