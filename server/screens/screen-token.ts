import { randomBytes } from 'node:crypto';
import { jwtVerify, SignJWT } from 'jose';
import type { Doors } from '#server/db/doors';
import { seal, unseal } from '#server/secrets/seal';
import type { Settings } from '#server/settings/settings';

const AUDIENCE = 'clamptide-screen';
const ISSUER = 'clamptide';

interface SigningKey {
  id: string;
  key: Buffer;
}

/** The keys that sign screens' tokens, the newest first; made when there are none. */
async function signingKeys(doors: Doors, settings: Settings): Promise<SigningKey[]> {
  const read = async () => {
    const rows = await doors.entry<{ id: string; sealed: string }>(
      'select id, sealed from entry.signing_keys()',
    );
    return rows.flatMap(({ id, sealed }) => {
      const key = unseal(sealed, settings.secrets);
      return key ? [{ id, key }] : [];
    });
  };
  const known = await read();
  if (known.length > 0) return known;
  const id = randomBytes(6).toString('hex');
  await doors.entry('select entry.add_signing_key($1, $2)', [
    id,
    seal(randomBytes(32), settings.secrets),
  ]);
  return read();
}

/** Signs the read-only token of a paired screen. It has no expiry of its own: revoking the screen ends it at once. */
export async function signScreenToken(
  doors: Doors,
  settings: Settings,
  screenId: string,
): Promise<string> {
  const [newest] = await signingKeys(doors, settings);
  if (!newest) throw new Error('There is no key to sign with.');
  return new SignJWT({})
    .setProtectedHeader({ alg: 'HS256', kid: newest.id })
    .setSubject(screenId)
    .setIssuer(ISSUER)
    .setAudience(AUDIENCE)
    .setIssuedAt()
    .sign(newest.key);
}

/** The screen that a token names, or null when the token is not one of ours. */
export async function verifyScreenToken(
  doors: Doors,
  settings: Settings,
  token: string,
): Promise<string | null> {
  const keys = await signingKeys(doors, settings);
  try {
    const { payload } = await jwtVerify(
      token,
      ({ kid }) => {
        const found = keys.find((candidate) => candidate.id === kid);
        if (!found) throw new Error('unknown key');
        return found.key;
      },
      { algorithms: ['HS256'], audience: AUDIENCE, issuer: ISSUER },
    );
    return payload.sub ?? null;
  } catch {
    // Any fault of the token, from its form to its signature, means the same: it names nobody.
    return null;
  }
}
