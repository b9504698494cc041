import { problemSentence } from '#shared/words/problem-words';
import type { SignInPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { problem } from '#server/http/problem';
import { membershipsOf, readViewer } from './viewer';

/** Turns the session to another of the person's shops. What was opened in the old one closes and opens again. */
export async function switchShop(context: Context, id: string): Promise<SignInPayload> {
  const { services } = context;
  const { personId, sessionId, credential, email } = memberOf(context);
  const shopId = localId('shop', id);
  const memberships = await membershipsOf(services, personId);
  const into = memberships.find((membership) => membership.shopId === shopId);
  const [turned] = into
    ? await services.doors.entry<{ turned: boolean }>(
        'select entry.turn_session($1, $2, $3) as turned',
        [sessionId, personId, into.shopId],
      )
    : [];
  if (!into || !turned?.turned) {
    const sentence = problemSentence({ code: 'NOT_FOUND' });
    return { problems: [problem('NOT_FOUND', sentence, 'shopId')] };
  }
  services.hub.revoke(credential);
  // The operation's own snapshot is of the shop that was left.
  const viewer = await services.doors.readShop(into.shopId, (tx) =>
    readViewer(tx, { email, memberId: into.memberId }, memberships),
  );
  return { viewer, problems: [] };
}
