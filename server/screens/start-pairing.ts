import { randomInt } from 'node:crypto';
import { PAIRING_ALPHABET, PAIRING_LENGTH, shownCode } from '#shared/screens/pairing-code';
import type { Pairing } from '#server/generated/schema';
import { waitSeconds } from '#server/http/address-limits';
import type { Context } from '#server/http/context';
import { hashOf, newToken } from '#server/secrets/token';
import { tryLaterError } from '#server/session/try-later';

const GOOD_FOR_MS = 10 * 60_000;
/** Codes that are taken are drawn again; that this many are says that far too many displays ask. */
const MOST_DRAWS = 8;

/** Gives a display a code to show and a secret to ask with. */
export async function startPairing({ services, address }: Context): Promise<Pairing> {
  const wait = waitSeconds(services, 'startPairing', address);
  if (wait > 0) throw tryLaterError(wait);
  const secret = newToken();
  for (let draw = 0; draw < MOST_DRAWS; draw++) {
    const code = newCode();
    const expiresAt = new Date(services.now().getTime() + GOOD_FOR_MS);
    const [row] = await services.doors.entry<{ noted: boolean }>(
      'select entry.start_pairing($1, $2) as noted',
      [hashOf(secret), code],
    );
    if (row?.noted) return { code: shownCode(code), secret, expiresAt: expiresAt.toISOString() };
  }
  throw tryLaterError(60);
}

function newCode(): string {
  return Array.from(
    { length: PAIRING_LENGTH },
    () => PAIRING_ALPHABET[randomInt(PAIRING_ALPHABET.length)],
  ).join('');
}
