import { CombinedGraphQLErrors } from '@apollo/client/errors';

/** A command that was refused, where there is no form to show its problems; the message is the server's sentence. */
export class RefusedError extends Error {}

/**
 * What to tell a person when a request failed altogether (a refused command is no failure: it answers with problems).
 * The server's own sentence where it gave one, otherwise that it could not be reached and what that means.
 */
export function failureSentence(error: unknown): string {
  if (CombinedGraphQLErrors.is(error)) {
    return error.errors[0]?.message ?? 'The server refused this and did not say why.';
  }
  if (error instanceof RefusedError) return error.message;
  return 'The server could not be reached. Nothing is known to have changed; check the connection and try again.';
}
