import { GraphQLError } from 'graphql';
import { problemSentence } from '#shared/words/problem-words';
import { problem, type Problem } from '#server/http/problem';

/** Too many attempts: says when the next one is heard. */
export function tryLater(seconds: number): Problem {
  return problem('TRY_LATER', problemSentence({ code: 'TRY_LATER', seconds }));
}

/** The same where the answer has no room for problems. */
export function tryLaterError(seconds: number): GraphQLError {
  const { code, sentence } = tryLater(seconds);
  return new GraphQLError(sentence, { extensions: { code, seconds } });
}
