import type { Context } from '#server/http/context';
import { endSessions } from './end-sessions';

/** Ends the session that asks. Nobody being signed in is as good. */
export async function signOut({ services, principal, setSession }: Context): Promise<boolean> {
  if (principal?.kind === 'member') {
    await endSessions(services, principal.personId, { only: principal.sessionId });
  }
  setSession(null);
  return true;
}
