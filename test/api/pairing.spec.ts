import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import {
  newMember,
  newOwner,
  newScreen,
  pairScreen,
  pollPairing,
  startPairing,
  type Person,
} from '../factories/people';

let server: ApiServer;
let owner: Person;
beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
});
afterAll(() => server.stop());

const codesOf = (payload: { problems: { code: string }[] }) => payload.problems.map((p) => p.code);

describe('pairing a display', () => {
  it('goes from a code on the display to a token that only looks', async () => {
    const display = server.stranger();
    const { code, secret } = await startPairing(display);
    expect(code).toMatch(/^[A-Z0-9]{3}-[A-Z0-9]{3}$/);
    expect(await pollPairing(display, secret)).toEqual({ state: 'WAITING', token: null });
    const typed = ` ${code.replace('-', '').toLowerCase()} `;
    const { screens, problems } = await pairScreen(owner.caller, typed, ' Gluing  room ');
    expect(problems).toEqual([]);
    expect(screens.map((each) => each.name)).toContain('Gluing room');
    const answer = await pollPairing(display, secret);
    expect(answer.state).toBe('PAIRED');
    display.bearer = answer.token;
    expect(await display.get('{ floor { shop { name } } viewer { email } }')).toEqual({
      floor: { shop: { name: 'Tideline Boards' } },
      viewer: null,
    });
    const { rows } = await server.admin.query(
      `select data from event where shop_id = $1 and type = 'SCREEN_PAIRED'`,
      [localId('shop', owner.shopId)],
    );
    expect(rows).toEqual([{ data: { screenId: localId('screen', screens[0]?.id ?? '') } }]);
  });

  it('hands the token out once', async () => {
    const display = server.stranger();
    const { code, secret } = await startPairing(display);
    await pairScreen(owner.caller, code);
    expect((await pollPairing(display, secret)).state).toBe('PAIRED');
    expect(await pollPairing(display, secret)).toEqual({ state: 'EXPIRED', token: null });
  });

  it('takes a code once', async () => {
    const { caller } = await newOwner(server);
    const { code, secret } = await startPairing(server.stranger());
    expect(codesOf(await pairScreen(owner.caller, code))).toEqual([]);
    expect(codesOf(await pairScreen(caller, code))).toEqual(['CODE_USED']);
    await pollPairing(server.stranger(), secret);
    expect(codesOf(await pairScreen(caller, code))).toEqual(['CODE_USED']);
    expect(await caller.get('{ screens { id } }')).toEqual({ screens: [] });
  });

  it('gives up a code after ten minutes, for the owner and for the display', async () => {
    const { caller } = await newOwner(server);
    const display = server.stranger();
    const { code, secret } = await startPairing(display);
    const { rows } = await server.admin.query<{ minutes: number }>(
      `update pairing p set expires_at = now() from pairing old where old.secret_hash = p.secret_hash and p.code = $1
       returning extract(epoch from old.expires_at - now()) / 60 as minutes`,
      [code.replace('-', '')],
    );
    expect(Number(rows[0]?.minutes)).toBeGreaterThan(9);
    expect(Number(rows[0]?.minutes)).toBeLessThanOrEqual(10);
    expect(codesOf(await pairScreen(caller, code))).toEqual(['CODE_EXPIRED']);
    expect(await pollPairing(display, secret)).toEqual({ state: 'EXPIRED', token: null });
  });

  it('lets a member try five wrong codes in ten minutes, then not even the right one', async () => {
    const { caller } = await newOwner(server);
    const wrong = ['AAA-AAA', 'no code at all', '', 'x'.repeat(10_000), 'AAAAAA\u0000'];
    for (const code of wrong)
      expect(codesOf(await pairScreen(caller, code))).toEqual(['CODE_WRONG']);
    const { code } = await startPairing(server.stranger());
    expect(codesOf(await pairScreen(caller, code))).toEqual(['TOO_MANY_CODES']);
    await server.admin.query(`update pairing_attempt set at = at - interval '10 minutes'`);
    expect(codesOf(await pairScreen(caller, code))).toEqual([]);
  });

  it.each([
    ['empty', ''],
    ['blank', '   '],
    ['of 10,000 characters', 'x'.repeat(10_000)],
    ['with a control character', 'a\u0000b'],
  ])('wants a name, and none that is %s; the code stays good', async (_, name) => {
    const { caller } = await newOwner(server);
    const { code } = await startPairing(server.stranger());
    expect((await pairScreen(caller, code, name)).problems).toMatchObject([
      { code: 'INVALID_INPUT', field: 'name' },
    ]);
    expect(codesOf(await pairScreen(caller, code))).toEqual([]);
  });

  it('tells a stranger nothing for a secret that is none', async () => {
    for (const secret of ['', 'x', 'A'.repeat(43), 'x'.repeat(10_000), '\u0000']) {
      expect(await pollPairing(server.stranger(), secret)).toEqual({
        state: 'EXPIRED',
        token: null,
      });
    }
  });

  it('is for owners', async () => {
    const { caller } = await newMember(server, owner, ['MAKER', 'HELPER', 'OFFICE', 'INTEGRATOR']);
    const { codes } = await caller.ask(
      'mutation { pairScreen(code: "AAA-AAA", name: "x") { screens { id } } }',
    );
    expect(codes).toEqual(['FORBIDDEN']);
  });

  it('stops one address that asks for code after code', async () => {
    const display = server.stranger();
    const codes = [];
    for (let n = 0; n < 61; n++) {
      codes.push((await display.ask('mutation { startPairing { code } }')).codes[0]);
    }
    expect(codes.slice(0, 60).every((code) => code === undefined)).toBe(true);
    expect(codes[60]).toBe('TRY_LATER');
  });
});

describe('a paired display', () => {
  it('ends at once when it is revoked, and is gone from the list', async () => {
    const { caller, ...rest } = await newOwner(server);
    const display = await newScreen(server, { caller, ...rest });
    const { screens } = await caller.get<{ screens: { id: string }[] }>('{ screens { id } }');
    const REVOKE =
      'mutation ($id: ID!) { revokeScreen(id: $id) { screens { id } problems { code field } } }';
    const id = screens[0]?.id;
    expect(await caller.get(REVOKE, { id })).toEqual({
      revokeScreen: { screens: [], problems: [] },
    });
    expect((await display.ask('{ floor { cursor } }')).codes).toEqual(['UNAUTHENTICATED']);
    expect(await caller.get(REVOKE, { id })).toMatchObject({
      revokeScreen: { problems: [{ code: 'NOT_FOUND', field: 'id' }] },
    });
  });

  it('is nobody with a token that someone changed, signed otherwise, or made up', async () => {
    const display = await newScreen(server, owner);
    const [header = '', payload = '', signature = ''] = (display.bearer ?? '').split('.');
    const none = Buffer.from('{"alg":"none"}').toString('base64url');
    const other = Buffer.from('{"sub":"00000000-0000-7000-8000-000000000000"}').toString(
      'base64url',
    );
    for (const bearer of [
      `${header}.${other}.${signature}`,
      `${none}.${payload}.`,
      `${header}.${payload}.${signature.slice(0, -4)}AAAA`,
      `${header}.${payload}`,
      'x',
    ]) {
      const forger = server.stranger();
      forger.bearer = bearer;
      expect((await forger.ask('{ floor { cursor } }')).codes).toEqual(['UNAUTHENTICATED']);
    }
  });
});
