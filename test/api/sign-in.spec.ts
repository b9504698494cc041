import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newMember, newOwner, PASSWORD, trySignIn, trySignUp } from '../factories/people';

let server: ApiServer;
beforeAll(async () => {
  server = await startApiServer();
});
afterAll(() => server.stop());

const VIEWER = '{ viewer { email member { name initials roles } shop { name zone } } }';

describe('signing up', () => {
  it('makes a shop with its settings and an owner who is signed in', async () => {
    const caller = server.stranger();
    const { viewer } = await trySignUp(caller, {
      email: ' Ruth@Example.com ',
      shopName: ' Tide  Line ',
    });
    expect(viewer).not.toBeNull();
    expect(caller.session).toMatch(/^[\w-]{43}$/);
    expect(await caller.get(VIEWER)).toEqual({
      viewer: {
        email: 'ruth@example.com',
        member: { name: 'Ruth Amsel', initials: 'RA', roles: ['OWNER'] },
        shop: { name: 'Tide Line', zone: 'Europe/Vienna' },
      },
    });
    const { shop } = await caller.get<{ shop: Record<string, unknown[]> }>(
      '{ shop { weekly { fromMinute } stations { key } clamps { key } profiles { key isDefault note } } }',
    );
    expect(shop['weekly']).toHaveLength(7);
    expect(shop['stations']).toHaveLength(6);
    expect(shop['clamps']).toHaveLength(2);
    expect(shop['profiles']).toHaveLength(4);
  });

  it('keeps the token in a cookie that scripts and other sites do not get, and only its hash in the database', async () => {
    const { email } = await newOwner(server);
    const caller = server.stranger();
    const response = await caller.post({
      query: `mutation { signIn(email: "${email}", password: "${PASSWORD}") { viewer { email } } }`,
    });
    const cookie = String(response.headers['set-cookie']);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    const { rows } = await server.admin.query<{ row: string }>(
      'select s::text as row from session s',
    );
    expect(rows.length).toBeGreaterThan(0);
    for (const { row } of rows) expect(row).not.toContain(caller.session);
  });

  it('refuses an address that someone has, also in capitals', async () => {
    const { email } = await newOwner(server);
    const { viewer, problems } = await trySignUp(server.stranger(), { email: email.toUpperCase() });
    expect(viewer).toBeNull();
    expect(problems).toMatchObject([{ code: 'EMAIL_TAKEN', field: 'email' }]);
  });

  it.each([
    ['shopName', 'empty', ''],
    ['shopName', 'blank', '   '],
    ['shopName', 'too long', 'x'.repeat(81)],
    ['shopName', 'of 10,000 characters', 'x'.repeat(10_000)],
    ['shopName', 'with a control character', 'a\u0000b'],
    ['name', 'empty', ''],
    ['name', 'of 10,000 characters', 'x'.repeat(10_000)],
    ['zone', 'that does not exist', 'Europe/Atlantis'],
    ['zone', 'that is an offset', '+02:00'],
    ['zone', 'of 10,000 characters', 'x'.repeat(10_000)],
    ['email', 'without an @', 'nobody'],
    ['email', 'without a domain', 'a@b'],
    ['email', 'with a space', 'a b@example.com'],
    ['email', 'of 10,000 characters', `${'x'.repeat(10_000)}@example.com`],
    ['password', 'too short', 'short'],
    ['password', 'too long', 'x'.repeat(257)],
    ['password', 'everyone has', 'password123'],
    ['password', 'everyone has, in capitals', 'QWERTYUIOP'],
    ['password', 'of one character', 'aaaaaaaaaaaa'],
  ])('refuses a %s %s, in words', async (field, _what, value) => {
    const { viewer, problems } = await trySignUp(server.stranger(), { [field]: value });
    expect(viewer).toBeNull();
    expect(problems.map((each) => each.field)).toEqual([field]);
    expect(problems[0]?.sentence).toMatch(/\.$/);
  });

  it('is refused for a while when one address does nothing else', async () => {
    const caller = server.stranger();
    const answers = [];
    for (let n = 0; n < 61; n++) answers.push(await trySignUp(caller, { email: 'nobody' }));
    expect(answers[59]?.problems).toMatchObject([{ field: 'email' }]);
    expect(answers[60]?.problems).toMatchObject([{ code: 'TRY_LATER' }]);
    expect((await trySignUp(server.stranger(), { email: 'nobody' })).problems).toMatchObject([
      { field: 'email' },
    ]);
  });
});

describe('signing in and out', () => {
  it('gives a new token each time, and the one before ends', async () => {
    const { caller, email } = await newOwner(server);
    const before = caller.twin();
    expect((await trySignIn(caller, email)).viewer).toMatchObject({ email });
    expect(caller.session).not.toBe(before.session);
    expect(await before.get('{ viewer { email } }')).toEqual({ viewer: null });
  });

  it('answers an unknown address like a wrong password, attempt for attempt', async () => {
    const { email } = await newOwner(server);
    const known = server.stranger();
    const unknown = server.stranger();
    for (let attempt = 0; attempt < 5; attempt++) {
      const one = await trySignIn(known, email, 'not the password');
      const other = await trySignIn(unknown, 'nobody-at-all@example.com', 'not the password');
      expect(one.viewer).toBeNull();
      expect(other.problems.map((p) => p.code)).toEqual(one.problems.map((p) => p.code));
    }
    const wrong = await trySignIn(server.stranger(), 'not an address', 'not the password');
    expect(wrong.problems).toMatchObject([{ code: 'WRONG_PASSWORD', field: null }]);
  });

  it('takes the time of one comparison for an unknown address too', async () => {
    const { passwordMatches } = await import('#server/secrets/password');
    // The steps are the same; that the stand-in costs as much as a real hash is what its parameters say.
    const { rows } = await server.admin.query<{ password_hash: string }>(
      'select password_hash from person limit 1',
    );
    expect(rows[0]?.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(await passwordMatches('anything', null)).toBe(false);
  });

  it('makes each attempt after the second wait longer, the right password too, until one works', async () => {
    const { email } = await newOwner(server);
    const caller = server.stranger();
    const codes = [];
    for (let n = 0; n < 4; n++) {
      codes.push((await trySignIn(caller, email, 'wrong password')).problems[0]?.code);
    }
    expect(codes).toEqual(['WRONG_PASSWORD', 'WRONG_PASSWORD', 'WRONG_PASSWORD', 'TRY_LATER']);
    const late = await trySignIn(caller, email);
    expect(late.viewer).toBeNull();
    expect(late.problems[0]?.sentence).toMatch(/Wait/);
    const delay = () =>
      server.admin
        .query<{ seconds: number; failures: number }>(
          `select extract(epoch from not_before - last_at)::float as seconds, failures from sign_in_failure
           where address_hash = encode(sha256(convert_to($1, 'UTF8')), 'hex')`,
          [email],
        )
        .then(({ rows }) => rows[0]);
    const soon = () => server.admin.query(`update sign_in_failure set not_before = now()`);
    expect((await delay())?.failures).toBe(3);
    await soon();
    await trySignIn(caller, email, 'wrong password');
    const first = (await delay())?.seconds ?? 0;
    await soon();
    await trySignIn(caller, email, 'wrong password');
    expect((await delay())?.seconds).toBeGreaterThan(first * 1.5);
    await soon();
    expect((await trySignIn(caller, email)).viewer).not.toBeNull();
    expect(await delay()).toBeUndefined();
  });

  it('counts attempts at the same moment one after another', async () => {
    const { email } = await newOwner(server);
    const answers = await Promise.all(
      Array.from({ length: 12 }, () => trySignIn(server.stranger(), email, 'wrong password')),
    );
    const heard = answers.filter(({ problems }) => problems[0]?.code === 'WRONG_PASSWORD');
    expect(heard).toHaveLength(3);
  });

  it('ends the session on the server, not only in the browser', async () => {
    const { caller } = await newOwner(server);
    const thief = caller.twin();
    expect(await caller.get('mutation { signOut }')).toEqual({ signOut: true });
    expect(caller.session).toBeNull();
    expect(await thief.get('{ viewer { email } }')).toEqual({ viewer: null });
    expect((await thief.ask('{ sessions { id } }')).codes).toEqual(['UNAUTHENTICATED']);
    expect(await server.stranger().get('mutation { signOut }')).toEqual({ signOut: true });
  });

  it('knows no one for a token that was never given, or is no token', async () => {
    for (const cookie of ['clamptide=' + 'A'.repeat(43), 'clamptide=x', 'clamptide=%00', '=;;=']) {
      const { data } = await server.stranger().ask('{ viewer { email } }', {}, { Cookie: cookie });
      expect(data).toEqual({ viewer: null });
    }
  });

  it('ends with seven days without use, and with thirty days in all', async () => {
    for (const age of [
      "last_seen_at = now() - interval '8 days'",
      "created_at = now() - interval '31 days'",
    ]) {
      const { caller } = await newOwner(server);
      await server.admin.query(`update session set ${age} where shop_id is not null and id = (
        select id from session order by created_at desc, id desc limit 1)`);
      expect(await caller.get('{ viewer { email } }')).toEqual({ viewer: null });
    }
  });
});

describe('sessions', () => {
  const SESSIONS = '{ sessions { id device current } }';
  type Sessions = { id: string; device: string; current: boolean }[];

  it('are listed, and end one by one or all but the one that asks', async () => {
    const { caller, email } = await newOwner(server);
    const others = [server.stranger(), server.stranger(), server.stranger()];
    for (const other of others) await trySignIn(other, email);
    const { sessions } = await caller.get<{ sessions: Sessions }>(SESSIONS);
    expect(sessions.map((each) => each.current)).toEqual([false, false, false, true]);
    const END =
      'mutation ($id: ID!) { endSession(id: $id) { sessions { id } problems { code field } } }';
    const { endSession } = await caller.get<{
      endSession: { sessions: Sessions; problems: unknown[] };
    }>(END, { id: sessions[0]?.id });
    expect(endSession.problems).toEqual([]);
    expect(endSession.sessions).toHaveLength(3);
    expect(await others[2]?.get('{ viewer { email } }')).toEqual({ viewer: null });
    expect(await others[1]?.get('{ viewer { email } }')).toEqual({ viewer: { email } });
    const rest = await caller.get<{ endOtherSessions: { sessions: Sessions } }>(
      'mutation { endOtherSessions { sessions { current } problems { code } } }',
    );
    expect(rest.endOtherSessions.sessions).toEqual([{ current: true }]);
    expect(await others[1]?.get('{ viewer { email } }')).toEqual({ viewer: null });
    expect(await caller.get(END, { id: sessions[0]?.id })).toMatchObject({
      endSession: { problems: [{ code: 'NOT_FOUND', field: 'id' }] },
    });
  });

  it('of others are not there', async () => {
    const one = await newOwner(server);
    const colleague = await newMember(server, one, ['MAKER']);
    const { sessions } = await one.caller.get<{ sessions: Sessions }>(SESSIONS);
    const { data } = await colleague.caller.ask(
      'mutation ($id: ID!) { endSession(id: $id) { problems { code } } }',
      { id: sessions[0]?.id },
    );
    expect(data).toEqual({ endSession: { problems: [{ code: 'NOT_FOUND' }] } });
    expect(await one.caller.get('{ viewer { email } }')).toEqual({ viewer: { email: one.email } });
  });
});
