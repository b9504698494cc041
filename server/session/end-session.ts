import { problemSentence } from '#shared/words/problem-words';
import type { SessionsPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { problem } from '#server/http/problem';
import { endSessions } from './end-sessions';
import { readSessions } from './read-sessions';

/** Ends one of the person's sessions, which may be the one that asks. */
export async function endSession(context: Context, id: string): Promise<SessionsPayload> {
  const { personId, sessionId } = memberOf(context);
  const only = localId('session', id);
  const ended = only === null ? 0 : await endSessions(context.services, personId, { only });
  if (ended > 0 && only === sessionId) context.setSession(null);
  const sentence = problemSentence({ code: 'NOT_FOUND' });
  return {
    sessions: await readSessions(context),
    problems: ended > 0 ? [] : [problem('NOT_FOUND', sentence, 'id')],
  };
}

/** Ends all of the person's sessions but the one that asks. */
export async function endOtherSessions(context: Context): Promise<SessionsPayload> {
  const { personId, sessionId } = memberOf(context);
  await endSessions(context.services, personId, { allBut: sessionId });
  return { sessions: await readSessions(context), problems: [] };
}
