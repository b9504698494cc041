import { inject } from '@angular/core';
import { ApolloLink, InMemoryCache, type ApolloClient } from '@apollo/client';
import { CombinedGraphQLErrors } from '@apollo/client/errors';
import { SetContextLink } from '@apollo/client/link/context';
import { ErrorLink } from '@apollo/client/link/error';
import { HttpLink } from '@apollo/client/link/http';
import { Bearer } from './bearer';
import { LostSession } from './lost-session';

/** The client: one HTTP link to this origin, the cookie with it, and a cache that keeps rows by id. */
export function apolloOptions(): ApolloClient.Options {
  const bearer = inject(Bearer);
  const lostSession = inject(LostSession);
  const authorise = new SetContextLink((context) => {
    const token = bearer.token();
    const headers = context['headers'] as Record<string, string> | undefined;
    return token ? { headers: { ...headers, authorization: `Bearer ${token}` } } : {};
  });
  const notice = new ErrorLink(({ error }) => {
    if (!CombinedGraphQLErrors.is(error)) return;
    const lost = error.errors.some((each) => each.extensions?.['code'] === 'UNAUTHENTICATED');
    if (lost) lostSession.tell();
  });
  const http = new HttpLink({
    uri: '/graphql',
    credentials: 'same-origin',
    headers: { 'apollo-require-preflight': 'true' },
  });
  return {
    link: ApolloLink.from([notice, authorise, http]),
    cache: new InMemoryCache({
      typePolicies: {
        // There is one of each: whoever is signed in, and what the Floor shows.
        Viewer: { keyFields: [] },
        Floor: { keyFields: [] },
      },
    }),
    defaultOptions: {
      // Rows are shown to people who act on them, so a page asks the server when it opens.
      watchQuery: { fetchPolicy: 'cache-and-network' },
      query: { fetchPolicy: 'network-only' },
    },
  };
}
