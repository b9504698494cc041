import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { pino } from 'pino';
import { doorUrl } from '#server/db/connections';
import { openDoors, type Doors } from '#server/db/doors';
import { loadBatches } from '#server/floor/load';
import type { Services } from '#server/http/services';
import { Hub } from '#server/live/hub';
import { parseSecrets } from '#server/settings/settings';
import { cardOf } from '#shared/floor/card';
import { STAGES } from '#shared/route/route';
import { DAY_MS, HOUR_MS } from '#shared/time/instant';
import { migratedDatabase, type TestDatabase } from '#test/database';
import { TEST_SECRET } from '../../test/test-settings.mjs';
import { prepareDemo } from './prepare';

describe('the demo shop', () => {
  let database: TestDatabase;
  let doors: Doors;
  let hub: Hub;
  let now = new Date('2026-12-01T13:30:00Z');
  let services: Services;

  beforeAll(async () => {
    database = await migratedDatabase();
    const secrets = parseSecrets(TEST_SECRET);
    const log = pino({ level: 'silent' });
    doors = openDoors(database.adminUrl, secrets, () => undefined);
    hub = new Hub(doors, log, () => now, doorUrl(database.adminUrl, 'relay', secrets));
    services = {
      settings: { secrets, demoFresh: false },
      doors,
      hub,
      log,
      now: () => now,
    } as unknown as Services;
  });

  afterAll(async () => {
    await hub.close();
    await doors.close();
    await database.drop();
  });

  const demo = async () => {
    const [row] = await doors.entry<{ shop_id: string; made_at: Date }>(
      'select * from entry.demo_shop()',
    );
    if (!row) throw new Error('There is no demo.');
    return row;
  };

  // A working afternoon, a night, Sunday before dawn, and the hour that clocks skip.
  it.each([
    '2026-12-01T13:30:00Z',
    '2026-12-03T01:00:00Z',
    '2026-12-06T04:00:00Z',
    '2027-03-28T01:30:00Z',
  ])('has something to say on every screen at %s', async (instant) => {
    now = new Date(instant);
    services.settings.demoFresh = true;
    await prepareDemo(services);
    services.settings.demoFresh = false;
    const { shop_id: shopId } = await demo();
    const loaded = await doors.readShop(shopId, (tx) => loadBatches(tx, 'OPEN', now));
    const cards = loaded.map(({ floor }) => cardOf(floor, now.getTime()));
    expect(cards.length).toBeGreaterThanOrEqual(14);
    for (const stage of STAGES) {
      expect(cards.filter((card) => card.place === stage).length, stage).toBeGreaterThan(0);
    }
    expect(cards.filter((card) => card.place === 'QUEUED').length).toBeGreaterThan(0);
    expect(cards.filter((card) => card.holds.length > 0).length).toBeGreaterThan(1);
    expect(cards.filter((card) => card.shelf === 'WORKING').length).toBeGreaterThan(0);
    const { rows } = {
      rows: await doors.readShop(shopId, (tx) =>
        tx.execute<{ orders: number; designs: number; readings: number; days: number }>(
          `select (select count(*) from shop_order)::int as orders, (select count(*) from design)::int as designs,
           (select count(*) from reading)::int as readings,
           (select extract(day from max(happened_at) - min(happened_at)) from event)::int as days`,
        ),
      ),
    };
    const [counts] = rows.rows;
    expect(counts).toMatchObject({ orders: 20, designs: 6 });
    expect(counts?.readings).toBeGreaterThan(20);
    expect(counts?.days).toBeGreaterThanOrEqual(12);
  });

  it('is made once, moved to now when nobody touched it, and left alone when somebody did', async () => {
    const before = await demo();
    await prepareDemo(services);
    expect((await demo()).shop_id).toBe(before.shop_id);
    now = new Date(now.getTime() + 13 * HOUR_MS);
    await prepareDemo(services);
    const moved = await demo();
    expect(moved.shop_id).not.toBe(before.shop_id);
    expect(moved.made_at).toEqual(now);
    await doors.inShop(moved.shop_id, (tx) =>
      tx.execute(`with c as (update shop_counter set seq = seq + 1 returning shop_id, seq)
        insert into event (shop_id, seq, type, by, happened_at, recorded_at, data)
        select shop_id, seq, 'STEP_STARTED', shop_id, now() + interval '9 years', now() + interval '9 years', '{}' from c`),
    );
    now = new Date(now.getTime() + 3 * DAY_MS);
    await prepareDemo(services);
    expect((await demo()).shop_id).toBe(moved.shop_id);
  });

  it('is made anew where a start was interrupted half-way', async () => {
    const whole = await demo();
    // The shop and its people are there, and nothing else: what was to follow came to nothing.
    const broken = {
      ...services,
      doors: {
        ...doors,
        inShop: async (shopId, work) => {
          if (++made > 1) throw new Error('The power is gone.');
          return doors.inShop(shopId, work);
        },
      } satisfies Doors as Doors,
    };
    let made = 0;
    services.settings.demoFresh = true;
    await expect(prepareDemo(broken)).rejects.toThrow('The power is gone.');
    // This time it ends before people have become members.
    await expect(prepareDemo(broken)).rejects.toThrow('The power is gone.');
    services.settings.demoFresh = false;
    const half = await demo();
    expect(half.shop_id).not.toBe(whole.shop_id);
    await prepareDemo(services);
    const again = await demo();
    expect(again.shop_id).not.toBe(half.shop_id);
    const people = await doors.readShop(again.shop_id, (tx) =>
      tx.execute('select name from member order by name'),
    );
    expect(people.rows).toHaveLength(4);
    const loaded = await doors.readShop(again.shop_id, (tx) => loadBatches(tx, 'OPEN', now));
    expect(loaded.length).toBeGreaterThanOrEqual(14);
    await prepareDemo(services);
    expect((await demo()).shop_id).toBe(again.shop_id);
  });
});
