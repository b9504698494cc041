import { CombinedGraphQLErrors } from '@apollo/client/errors';

/** Why something could not be read: not allowed, the server said no for another reason, or it was not reached. */
export type FailureKind = 'forbidden' | 'refused' | 'unreached';

export function failureKind(error: unknown): FailureKind {
  if (!CombinedGraphQLErrors.is(error)) return 'unreached';
  const codes = error.errors.map((each) => each.extensions?.['code']);
  return codes.includes('FORBIDDEN') ? 'forbidden' : 'refused';
}
