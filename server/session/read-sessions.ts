import type { Session } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { globalId } from '#server/http/global-id';

/** The person's sessions, the newest first. */
export async function readSessions(context: Context): Promise<Session[]> {
  const { personId, sessionId } = memberOf(context);
  const rows = await context.services.doors.entry<{
    session_id: string;
    device: string;
    created_at: Date;
    last_seen_at: Date;
  }>('select * from entry.sessions_of($1)', [personId]);
  return rows.map((row) => ({
    id: globalId('session', row.session_id),
    createdAt: row.created_at.toISOString(),
    lastSeenAt: row.last_seen_at.toISOString(),
    device: row.device,
    current: row.session_id === sessionId,
  }));
}
