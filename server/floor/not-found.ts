import { problemSentence } from '#shared/words/problem-words';
import type { BatchPayload } from '#server/generated/schema';
import { problem, type Problem } from '#server/http/problem';

/** The payload for a batch that this shop does not have, or has no more. */
export function notFound(field: string): BatchPayload & { problems: Problem[] } {
  const problems = [problem('NOT_FOUND', problemSentence({ code: 'NOT_FOUND' }), field)];
  return { batch: null, problems, event: null };
}
