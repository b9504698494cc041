import type { ApiScope } from '#drizzle/tables/access';
import { ROLES, type Role } from '#shared/members/permissions';
import { isWellFormedKey } from '#server/api/key-format';
import { verifyScreenToken } from '#server/screens/screen-token';
import { hashOf } from '#server/secrets/token';
import type { Principal } from './principal';
import type { Services } from './services';

/** What a request carries of its sender. */
export interface Credentials {
  /** The session cookie's token. */
  session: string | null;
  /** The Authorization header. */
  authorization: string | null;
}

/**
 * Who sends a request: an API key or a screen's token where there is a bearer, else the session. Null for nobody, also
 * for a credential that has ended.
 */
export async function principalOf(
  services: Services,
  credentials: Credentials,
): Promise<Principal | null> {
  const bearer = /^Bearer\s+(\S{1,2000})$/i.exec(credentials.authorization ?? '')?.[1];
  if (bearer) {
    return isWellFormedKey(bearer) ? clientOf(services, bearer) : screenOf(services, bearer);
  }
  return credentials.session ? memberOf(services, credentials.session) : null;
}

async function memberOf(services: Services, token: string): Promise<Principal | null> {
  const credential = hashOf(token);
  const [row] = await services.doors.entry<{
    session_id: string;
    person_id: string;
    email: string;
    shop_id: string;
    member_id: string;
    roles: string[];
  }>('select * from entry.session($1)', [credential]);
  if (!row) return null;
  return {
    kind: 'member',
    shopId: row.shop_id,
    memberId: row.member_id,
    personId: row.person_id,
    sessionId: row.session_id,
    credential,
    email: row.email,
    roles: row.roles.filter((role): role is Role => ROLES.some((known) => known === role)),
  };
}

async function clientOf(services: Services, key: string): Promise<Principal | null> {
  const credential = hashOf(key);
  const [row] = await services.doors.entry<{ shop_id: string; key_id: string; scopes: ApiScope[] }>(
    'select * from entry.api_key($1)',
    [credential],
  );
  if (!row) return null;
  return {
    kind: 'client',
    shopId: row.shop_id,
    keyId: row.key_id,
    credential,
    scopes: row.scopes,
  };
}

async function screenOf(services: Services, token: string): Promise<Principal | null> {
  const screenId = await verifyScreenToken(services.doors, services.settings, token);
  if (screenId === null) return null;
  const [row] = await services.doors.entry<{ shop_id: string }>(
    'select shop_id from entry.screen($1)',
    [screenId],
  );
  if (!row) return null;
  return { kind: 'screen', shopId: row.shop_id, screenId, credential: `screen ${screenId}` };
}
