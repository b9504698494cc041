import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { DENIED, DoorSql, NO_ROWS } from '../factories/door-sql';
import { fullShop, type FullShop } from '../factories/full-shop';
import { fingerprint, shopTables, walledTables, type ShopTable } from '../factories/walls';

/* The wall between shops: goes through the door of a shop to every table and tries to cross. */

let server: ApiServer;
let mine: FullShop;
let theirs: FullShop;
let walled: ShopTable[];
let sql: DoorSql;

beforeAll(async () => {
  server = await startApiServer();
  mine = await fullShop(server, 'Alder Yard');
  theirs = await fullShop(server, 'Birch Yard');
  walled = await walledTables(server.admin);
  sql = new DoorSql(server);
});
afterAll(async () => {
  await sql.end();
  await server.stop();
});

describe('the wall', () => {
  it('stands in every table that has rows of shops, and nothing looks over it', async () => {
    const { rows: policies } = await server.admin.query<{
      name: string;
      rule: string;
      checked: string;
    }>(
      `select tablename as name, qual as rule, with_check as checked from pg_policies
       where 'clamptide_shop' = any (roles) order by 1`,
    );
    expect(policies.map((policy) => policy.name)).toEqual(walled.map(({ name }) => name).sort());
    for (const { name, rule, checked } of policies) {
      const column = name === 'shop' ? 'id' : 'shop_id';
      expect(rule).toBe(`(${column} = ( SELECT current_shop() AS current_shop))`);
      expect(checked).toBe(rule);
    }
    const { rows: open } = await server.admin.query(
      `select relname from pg_class where relnamespace = 'public'::regnamespace and
         ((relkind in ('r', 'p') and not relrowsecurity) or relkind in ('v', 'm', 'f'))`,
    );
    expect(open).toEqual([]);
    const { rows: anyone } = await server.admin.query(
      `select tablename from pg_policies where schemaname = 'public' and not roles <@
         array['clamptide_shop', 'clamptide_relay']::name[]`,
    );
    expect(anyone).toEqual([]);
  });

  it('goes through every foreign key and every unique key', async () => {
    const { rows: foreign } = await server.admin.query<{
      key: string;
      here: string[];
      there: string[];
      to: string;
    }>(
      `select conrelid::regclass || '.' || conname as key, confrelid::regclass::text as to,
         array(select attname::text from pg_attribute where attrelid = conrelid and attnum = any (conkey)) as here,
         array(select attname::text from pg_attribute where attrelid = confrelid and attnum = any (confkey)) as there
       from pg_constraint where contype = 'f' and connamespace = 'public'::regnamespace`,
    );
    expect(foreign.length).toBeGreaterThan(20);
    const names = walled.map(({ name }) => name);
    for (const { key, here, there, to } of foreign.filter((each) => names.includes(each.to))) {
      expect([key, here]).toEqual([key, expect.arrayContaining(['shop_id'])]);
      expect([key, there]).toEqual([
        key,
        expect.arrayContaining([to === 'shop' ? 'id' : 'shop_id']),
      ]);
    }
    const { rows: unique } = await server.admin.query<{
      name: string;
      columns: string[];
      table: string;
    }>(
      `select i.indexrelid::regclass::text as name, i.indrelid::regclass::text as table,
         array(select attname::text from pg_attribute where attrelid = i.indrelid and attnum = any (i.indkey)) as columns
       from pg_index i join pg_class c on c.oid = i.indrelid
       where i.indisunique and c.relnamespace = 'public'::regnamespace`,
    );
    const across = unique
      .filter(({ table }) => names.includes(table) && table !== 'shop')
      .filter(({ columns }) => !columns.includes('shop_id'))
      .map(({ name }) => name);
    // A key's hash is looked up before its shop is known; its 190 random bits tell nothing to whoever meets one.
    expect(across).toEqual(['api_key_key_hash_unique']);
  });

  it('has rows of two shops behind it in every table, so that what follows means something', async () => {
    for (const { name, column } of await shopTables(server.admin)) {
      const { rows } = await server.admin.query(
        `select distinct ${column} from ${name} where ${column} = any ($1)`,
        [[mine.id, theirs.id]],
      );
      expect([name, rows.length]).toEqual([name, 2]);
    }
  });

  it('hides every row when no shop is set', async () => {
    for (const { name } of walled) {
      expect([name, await sql.run('shop', null, `select * from ${name}`)]).toEqual([name, NO_ROWS]);
    }
  });

  it.each([
    ['', NO_ROWS],
    ['00000000-0000-0000-0000-000000000000', NO_ROWS],
    // Text that is no id is an error of its own.
    ['x', { refused: '22P02' }],
    ["' or true --", { refused: '22P02' }],
  ])('hides every row when the shop is set to %j', async (shop, outcome) => {
    for (const { name } of walled) {
      expect([name, await sql.run('shop', shop, `select * from ${name}`)]).toEqual([name, outcome]);
    }
  });

  it('shows the rows of the shop that is set and lets none of the others be read, changed, removed or made', async () => {
    const before = await fingerprint(server.admin, theirs.id);
    for (const { name, column } of walled) {
      const seen = await sql.run('shop', mine.id, `select distinct ${column} as shop from ${name}`);
      expect([name, seen]).toEqual([name, { rowCount: 1, rows: [{ shop: mine.id }] }]);

      const asked = await sql.run('shop', mine.id, `select * from ${name} where ${column} = $1`, [
        theirs.id,
      ]);
      expect([name, asked]).toEqual([name, NO_ROWS]);

      const changing = `update ${name} set ${column} = ${column} where ${column} = $1`;
      const changed = await sql.run('shop', mine.id, changing, [theirs.id]);
      expect([NO_ROWS, DENIED]).toContainEqual(changed);

      const removed = await sql.run('shop', mine.id, `delete from ${name} where ${column} = $1`, [
        theirs.id,
      ]);
      expect([NO_ROWS, DENIED]).toContainEqual(removed);

      const { rows } = await server.admin.query<{ row: unknown }>(
        `select to_jsonb(t) as row from ${name} t where ${column} = $1 limit 1`,
        [theirs.id],
      );
      const copying = `insert into ${name} select * from jsonb_populate_record(null::${name}, $1)`;
      const made = await sql.run('shop', mine.id, copying, [JSON.stringify(rows[0]?.row)]);
      expect([name, made]).toEqual([name, DENIED]);

      const given = await sql.run('shop', mine.id, `update ${name} set ${column} = $1`, [
        theirs.id,
      ]);
      expect([name, given]).toEqual([name, DENIED]);
    }
    expect(await fingerprint(server.admin, theirs.id)).toBe(before);
  });

  it('keeps a row from naming one of another shop', async () => {
    const { rows } = await server.admin.query<{ row: Record<string, unknown> }>(
      `select to_jsonb(b) as row from batch b where shop_id = $1 limit 1`,
      [mine.id],
    );
    const { rows: others } = await server.admin.query<{ id: string }>(
      'select id from design where shop_id = $1',
      [theirs.id],
    );
    const row = {
      ...rows[0]?.row,
      id: '00000000-0000-7000-8000-000000000001',
      code: 'X-1',
      design_id: others[0]?.id,
    };
    const made = await sql.run(
      'shop',
      mine.id,
      'insert into batch select * from jsonb_populate_record(null::batch, $1)',
      [JSON.stringify(row)],
    );
    expect(made).toEqual({ refused: '23503' });
  });

  it('falls with the transaction: a connection used by one shop shows the next nothing of it', async () => {
    const read = (shopId: string) =>
      server.services.doors.readShop(shopId, async (tx) => {
        const { rows } = await tx.execute<{ id: string }>('select id from shop');
        return rows.map((row) => row.id);
      });
    const shops = Array.from({ length: 40 }, (_, n) => (n % 2 === 0 ? mine.id : theirs.id));
    expect(await Promise.all(shops.map(read))).toEqual(shops.map((id) => [id]));
    const failing = server.services.doors.inShop(mine.id, () => Promise.reject(new Error('stop')));
    await expect(failing).rejects.toThrow('stop');
    for (const { name } of walled) {
      expect([name, await sql.run('shop', null, `select * from ${name}`)]).toEqual([name, NO_ROWS]);
    }
  });
});
