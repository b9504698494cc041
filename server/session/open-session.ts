import { newId } from '#server/db/uuid';
import type { SignInPayload } from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { hashOf, newToken } from '#server/secrets/token';
import { endSessions } from './end-sessions';
import { membershipsOf, readViewer, type Membership } from './viewer';

/** Opens a session with a token of its own, in place of the one that the browser had, and answers who now looks at what. */
export async function openSession(
  context: Context,
  person: { id: string; email: string },
  into: Membership,
): Promise<SignInPayload> {
  const { services, principal } = context;
  if (principal?.kind === 'member') {
    await endSessions(services, principal.personId, { only: principal.sessionId });
  }
  const token = newToken();
  await services.doors.entry('select entry.open_session($1, $2, $3, $4, $5)', [
    newId(services.now().getTime()),
    hashOf(token),
    person.id,
    into.shopId,
    context.device,
  ]);
  context.setSession(token);
  const memberships = await membershipsOf(services, person.id);
  const viewer = await services.doors.readShop(into.shopId, (tx) =>
    readViewer(tx, { email: person.email, memberId: into.memberId }, memberships),
  );
  return { viewer, problems: [] };
}
