import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { DOORS, roleOf, type Door } from '#server/db/connections';
import { DENIED, DoorSql } from '../factories/door-sql';
import { fullShop, type FullShop } from '../factories/full-shop';
import { walledTables, type ShopTable } from '../factories/walls';

/* The four doors of the database: what each may touch, straight from the catalogue, and what each is refused. */

let server: ApiServer;
let mine: FullShop;
let walled: ShopTable[];
let sql: DoorSql;

beforeAll(async () => {
  server = await startApiServer();
  mine = await fullShop(server, 'Alder Yard');
  walled = await walledTables(server.admin);
  sql = new DoorSql(server);
});
afterAll(async () => {
  await sql.end();
  await server.stop();
});

describe('the doors', () => {
  it('are four roles that own nothing, pass by no rule and are no one else', async () => {
    const { rows } = await server.admin.query<Record<string, unknown>>(
      `select rolname, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb, rolreplication,
         (select count(*)::int from pg_auth_members m where m.member = r.oid) as member_of,
         (select count(*)::int from pg_class c join pg_namespace n on n.oid = c.relnamespace
           where c.relowner = r.oid and n.nspname <> 'graphile_worker' and n.nspname !~ '^pg_') as owned_relations,
         (select count(*)::int from pg_proc p join pg_namespace n on n.oid = p.pronamespace
           where p.proowner = r.oid and n.nspname <> 'graphile_worker') as owned_functions
       from pg_roles r where rolname like 'clamptide\\_%' and rolcanlogin and not rolsuper order by rolname`,
    );
    const none = {
      rolsuper: false,
      rolbypassrls: false,
      rolcreaterole: false,
      rolcreatedb: false,
      rolreplication: false,
      member_of: 0,
      owned_relations: 0,
      owned_functions: 0,
    };
    expect(rows).toEqual(
      DOORS.map(roleOf)
        .sort()
        .map((rolname) => ({ rolname, ...none })),
    );
  });

  it('touch the tables they are for, and no other', async () => {
    const { rows } = await server.admin.query<{ door: string; name: string; may: string }>(
      `select r.rolname as door, n.nspname || '.' || c.relname as name,
         string_agg(p.privilege, ' ' order by p.privilege) as may
       from pg_class c join pg_namespace n on n.oid = c.relnamespace
       cross join pg_roles r cross join unnest(array['SELECT', 'INSERT', 'UPDATE', 'DELETE', 'TRUNCATE',
         'REFERENCES', 'TRIGGER']) as p (privilege)
       where c.relkind in ('r', 'p', 'v', 'm', 'f') and n.nspname !~ '^pg_|information_schema'
         and not (n.nspname = 'graphile_worker' and r.rolname = 'clamptide_work')
         and r.rolname = any ($1)
         and (has_table_privilege(r.oid, c.oid, p.privilege)
           or (p.privilege in ('SELECT', 'INSERT', 'UPDATE', 'REFERENCES')
             and has_any_column_privilege(r.oid, c.oid, p.privilege)))
       group by 1, 2 order by 1, 2`,
      [DOORS.map(roleOf)],
    );
    const of = (door: Door) =>
      Object.fromEntries(
        rows.filter((row) => row.door === roleOf(door)).map((row) => [row.name, row.may]),
      );
    expect(of('entry')).toEqual({});
    expect(of('work')).toEqual({});
    expect(of('relay')).toEqual({
      'public.event': 'SELECT',
      'public.relay_cursor': 'INSERT SELECT UPDATE',
      'public.shop_counter': 'SELECT',
    });
    const all = 'DELETE INSERT SELECT UPDATE';
    const appended: Record<string, string> = {
      event: 'INSERT SELECT',
      rework_reason: 'INSERT SELECT',
      hold_override: 'INSERT SELECT UPDATE',
      occupation: 'INSERT SELECT UPDATE',
    };
    expect(of('shop')).toEqual(
      Object.fromEntries(walled.map(({ name }) => [`public.${name}`, appended[name] ?? all])),
    );
  });

  it('change of an override no more than that it was seen', async () => {
    const { rows } = await server.admin.query<{ attname: string }>(
      `select attname from pg_attribute where attrelid = 'hold_override'::regclass and attnum > 0
         and has_column_privilege('clamptide_shop', 'hold_override', attname, 'UPDATE')`,
    );
    expect(rows).toEqual([{ attname: 'seen_at' }]);
  });

  it('pass through functions that only entry may call, with a fixed search path', async () => {
    const { rows } = await server.admin.query<{
      name: string;
      path: string[] | null;
      owner: string;
      callers: string[];
    }>(
      `select n.nspname || '.' || p.proname as name, p.proconfig as path, o.rolname as owner,
         array(select r.rolname::text from pg_roles r where r.rolname like 'clamptide\\_%' and r.rolcanlogin and not r.rolsuper
           and has_function_privilege(r.oid, p.oid, 'EXECUTE')) as callers
       from pg_proc p join pg_namespace n on n.oid = p.pronamespace join pg_roles o on o.oid = p.proowner
       where p.prosecdef and n.nspname !~ '^pg_|information_schema' order by 1`,
    );
    expect(rows.length).toBeGreaterThan(10);
    for (const row of rows) {
      expect(row.name).toMatch(/^entry\./);
      expect(row.owner).toBe('clamptide_owner');
      expect(row.path).toEqual(['search_path=public, pg_temp']);
      expect(row.callers).toEqual(['clamptide_entry']);
    }
  });

  it('cannot become the owner, each other or the superuser', async () => {
    const { rows } = await server.admin.query<{ name: string }>(
      'select rolname as name from pg_roles where rolsuper',
    );
    const others = ['clamptide_owner', ...DOORS.map(roleOf), ...rows.map((row) => row.name)];
    for (const door of DOORS) {
      for (const role of others.filter((name) => name !== roleOf(door))) {
        expect(await sql.run(door, mine.id, `set role ${pg.escapeIdentifier(role)}`)).toEqual(
          DENIED,
        );
      }
    }
  });

  it('make no table, function or schema', async () => {
    for (const door of DOORS) {
      expect(await sql.run(door, mine.id, 'create table public.leak (x int)')).toEqual(DENIED);
      if (door === 'work') continue;
      expect(await sql.run(door, mine.id, 'create schema leak')).toEqual(DENIED);
    }
  });
});

describe('the other doors', () => {
  it('see no table but their own, whatever shop they claim', async () => {
    const { rows } = await server.admin.query<{ name: string }>(
      `select n.nspname || '.' || c.relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace
       where c.relkind in ('r', 'p') and n.nspname in ('public', 'drizzle')`,
    );
    const relays = ['public.event', 'public.shop_counter', 'public.relay_cursor'];
    for (const { name } of rows) {
      for (const door of ['entry', 'work', 'relay'] as const) {
        if (door === 'relay' && relays.includes(name)) continue;
        const seen = await sql.run(door, mine.id, `select * from ${name}`);
        expect([door, name, seen]).toEqual([door, name, DENIED]);
      }
    }
    const jobs = await sql.run('shop', mine.id, 'select * from graphile_worker.jobs');
    expect(jobs).toEqual(DENIED);
  });

  it('write no events', async () => {
    for (const door of ['entry', 'relay', 'work'] as const) {
      expect(await sql.run(door, mine.id, 'delete from public.event')).toEqual(DENIED);
      expect(await sql.run(door, mine.id, `update public.event set type = 'X'`)).toEqual(DENIED);
    }
    expect(await sql.run('shop', mine.id, 'delete from public.event')).toEqual(DENIED);
    expect(await sql.run('shop', mine.id, `update public.event set type = 'X'`)).toEqual(DENIED);
  });

  it('answers for a hash that nobody has with nothing', async () => {
    const { doors } = server.services;
    for (const call of ['entry.session($1)', 'entry.api_key($1)', 'entry.poll_pairing($1)']) {
      const rows = await doors.entry<{ state?: string }>(`select * from ${call}`, ['0'.repeat(64)]);
      expect(rows.filter((row) => row.state !== 'EXPIRED')).toEqual([]);
    }
  });
});
