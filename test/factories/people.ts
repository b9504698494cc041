import type { ApiScope } from '#drizzle/tables/access';
import type { Role } from '#shared/members/permissions';
import { newId } from '#server/db/uuid';
import { localId } from '#server/http/global-id';
import { hashPassword } from '#server/secrets/password';
import type { ApiServer } from './api-server';
import type { Caller } from './caller';

export const PASSWORD = 'quiet-tide-37';

/** A person with a session, in a shop. */
export interface Person {
  caller: Caller;
  email: string;
  /** The API's ids. */
  memberId: string;
  shopId: string;
}

let count = 0;

const SIGN_UP = `mutation ($input: SignUpInput!) {
  signUp(input: $input) { viewer { member { id } shop { id } } problems { code field sentence } }
}`;
const SIGN_IN = `mutation ($email: String!, $password: String!) {
  signIn(email: $email, password: $password) {
    viewer { email member { id } shop { id } } problems { code field sentence }
  }
}`;

interface EntryPayload {
  viewer: { member: { id: string }; shop: { id: string } } | null;
  problems: { code: string; field: string | null; sentence: string }[];
}

export function trySignUp(caller: Caller, changes: Record<string, unknown> = {}) {
  const input = {
    shopName: 'Tideline Boards',
    zone: 'Europe/Vienna',
    name: 'Ruth Amsel',
    email: `owner-${++count}@example.com`,
    password: PASSWORD,
    ...changes,
  };
  return caller.get<{ signUp: EntryPayload }>(SIGN_UP, { input }).then(({ signUp }) => ({
    ...signUp,
    email: input.email,
  }));
}

export function trySignIn(caller: Caller, email: string, password = PASSWORD) {
  return caller.get<{ signIn: EntryPayload }>(SIGN_IN, { email, password }).then((d) => d.signIn);
}

/** A new shop and its owner, signed in. */
export async function newOwner(
  server: ApiServer,
  changes: Record<string, unknown> = {},
): Promise<Person> {
  const caller = server.stranger();
  const { viewer, problems, email } = await trySignUp(caller, changes);
  if (!viewer) throw new Error(`No shop was made: ${JSON.stringify(problems)}`);
  return { caller, email, memberId: viewer.member.id, shopId: viewer.shop.id };
}

let hash: Promise<string> | null = null;

/**
 * A member with roles in a shop, signed in there. The product has no command for this yet, so the rows are written by the
 * superuser. `email` of someone known makes that person a member of one more shop.
 */
export async function newMember(
  server: ApiServer,
  shop: Pick<Person, 'shopId'>,
  roles: readonly Role[],
  email = `member-${++count}@example.com`,
): Promise<Person> {
  hash ??= hashPassword(PASSWORD);
  const memberId = newId();
  const [person] = (
    await server.admin.query<{ id: string }>(
      `insert into person (id, email, password_hash) values ($1, $2, $3)
       on conflict (lower(email)) do update set email = excluded.email returning id`,
      [newId(), email, await hash],
    )
  ).rows;
  await server.admin.query(
    `insert into member (shop_id, id, person_id, name, initials, roles, skills)
     values ($1, $2, $3, $4, 'ME', $5, '{machining,gluing,sanding,finishing}')`,
    [localId('shop', shop.shopId), memberId, person?.id, `Member ${roles.join(' ')}`, roles],
  );
  const caller = server.stranger();
  const { viewer } = await trySignIn(caller, email);
  if (!viewer) throw new Error('The member cannot sign in.');
  return { caller, email, memberId: viewer.member.id, shopId: viewer.shop.id };
}

/** A program with a new key of the shop. */
export async function newClient(
  server: ApiServer,
  owner: Person,
  scopes: readonly ApiScope[],
): Promise<Caller> {
  const { createApiKey } = await owner.caller.get<{ createApiKey: { key: string } }>(
    'mutation ($scopes: [ApiScope!]!) { createApiKey(name: "books", scopes: $scopes) { key } }',
    { scopes },
  );
  const caller = server.stranger();
  caller.bearer = createApiKey.key;
  return caller;
}

export interface Pairing {
  code: string;
  secret: string;
}

export async function startPairing(display: Caller): Promise<Pairing> {
  const { startPairing } = await display.get<{ startPairing: Pairing }>(
    'mutation { startPairing { code secret expiresAt } }',
  );
  return startPairing;
}

export async function pollPairing(display: Caller, secret: string) {
  const { pollPairing } = await display.get<{
    pollPairing: { state: string; token: string | null };
  }>('mutation ($secret: String!) { pollPairing(secret: $secret) { state token } }', { secret });
  return pollPairing;
}

export async function pairScreen(owner: Caller, code: string, name = 'Gluing room') {
  const { pairScreen } = await owner.get<{
    pairScreen: { screens: { id: string; name: string }[]; problems: { code: string }[] };
  }>(
    `mutation ($code: String!, $name: String!) {
      pairScreen(code: $code, name: $name) { screens { id name } problems { code field sentence } }
    }`,
    { code, name },
  );
  return pairScreen;
}

/** A paired display of the shop. */
export async function newScreen(server: ApiServer, owner: Person): Promise<Caller> {
  const display = server.stranger();
  const { code, secret } = await startPairing(display);
  await pairScreen(owner.caller, code);
  display.bearer = (await pollPairing(display, secret)).token;
  return display;
}
