import type { Services } from '#server/http/services';

/** Ends one session of a person, or all but one, and closes what was opened with them. Answers how many there were. */
export async function endSessions(
  services: Services,
  personId: string,
  which: { only: string } | { allBut: string },
): Promise<number> {
  const ended = await services.doors.entry<{ token_hash: string }>(
    'select token_hash from entry.end_sessions($1, $2, $3)',
    [personId, 'only' in which ? which.only : null, 'allBut' in which ? which.allBut : null],
  );
  for (const { token_hash: credential } of ended) services.hub.revoke(credential);
  return ended.length;
}
