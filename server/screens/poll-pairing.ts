import type { PairingAnswer } from '#server/generated/schema';
import { waitSeconds } from '#server/http/address-limits';
import type { Context } from '#server/http/context';
import { hashOf } from '#server/secrets/token';
import { tryLaterError } from '#server/session/try-later';
import { signScreenToken } from './screen-token';

/** Several displays of one shop ask every few seconds from one address; their secrets cannot be guessed. */
const MOST_POLLS = 300;

/** What became of a display's code. The token is handed out once. */
export async function pollPairing(
  { services, address }: Context,
  secret: string,
): Promise<PairingAnswer> {
  const wait = waitSeconds(services, 'pollPairing', address, MOST_POLLS);
  if (wait > 0) throw tryLaterError(wait);
  if (!/^[\w-]{43}$/.test(secret)) return { state: 'EXPIRED' };
  const [row] = await services.doors.entry<{ state: string; screen_id: string | null }>(
    'select state, screen_id from entry.poll_pairing($1)',
    [hashOf(secret)],
  );
  switch (row?.state) {
    case 'PAIRED': {
      if (row.screen_id === null) throw new Error('A pairing has lost its screen.');
      const { doors, settings } = services;
      return { state: 'PAIRED', token: await signScreenToken(doors, settings, row.screen_id) };
    }
    case 'WAITING':
      return { state: 'WAITING' };
    default:
      return { state: 'EXPIRED' };
  }
}
