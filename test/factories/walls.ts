import type pg from 'pg';

/** A table that holds rows of shops, and its column that says whose. */
export interface ShopTable {
  name: string;
  column: 'shop_id' | 'id';
}

/** Tables whose rows belong to shops, straight from the catalogue. */
export async function shopTables(admin: pg.Pool): Promise<ShopTable[]> {
  const { rows } = await admin.query<{ name: string }>(
    `select c.relname as name from pg_class c join pg_attribute a on a.attrelid = c.oid and a.attname = 'shop_id'
     where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p') and not a.attisdropped order by 1`,
  );
  return [
    { name: 'shop', column: 'id' },
    ...rows.map((row) => ({ ...row, column: 'shop_id' as const })),
  ];
}

/** Credentials and pairings name a shop but belong to people and displays, the cursor to the relay. */
const BESIDE_THE_WALL = ['session', 'pairing', 'relay_cursor'];

/** Tables that the door of a shop opens to, behind the wall. */
export async function walledTables(admin: pg.Pool): Promise<ShopTable[]> {
  return (await shopTables(admin)).filter(({ name }) => !BESIDE_THE_WALL.includes(name));
}

/** What background work writes on its own, and what is noted of credentials when they are used. */
const MOVES_BY_ITSELF = ['plan', 'forecast', 'shop_counter', 'relay_cursor', 'session', 'pairing'];

/** All rows of a shop as one text, to see whether anything of it changed. */
export async function fingerprint(admin: pg.Pool, shopId: string): Promise<string> {
  const prints: string[] = [];
  for (const { name, column } of await shopTables(admin)) {
    if (MOVES_BY_ITSELF.includes(name)) continue;
    const filter = name === 'event' ? `and type <> 'PLAN_MADE'` : '';
    const { rows } = await admin.query<{ print: string }>(
      `select count(*) || ' ' || coalesce(md5(string_agg(t::text, '|' order by t::text)), '') as print
       from ${name} t where ${column} = $1 ${filter}`,
      [shopId],
    );
    prints.push(`${name} ${rows[0]?.print ?? ''}`);
  }
  return prints.join('\n');
}
