import { CombinedGraphQLErrors } from '@apollo/client/errors';

/**
 * What to tell a person when a request failed altogether (a refused command is no failure: it answers with problems).
 * The server's own sentence where it gave one, otherwise that it could not be reached and what that means.
 */
export function failureSentence(error: unknown): string {
  if (CombinedGraphQLErrors.is(error)) {
    return error.errors[0]?.message ?? 'The server refused this and did not say why.';
  }
  return 'The server could not be reached. Nothing is known to have changed; check the connection and try again.';
}
