import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { done, makeBatch, readBatch } from '../factories/commands';
import { newMember, newOwner, type Person } from '../factories/people';
import { newDesign } from '../factories/things';

let server: ApiServer;
let owner: Person;
let maker: Person;
let designId: string;

beforeAll(async () => {
  // A Tuesday; the shop works from Monday to Friday.
  server = await startApiServer({}, { now: () => new Date('2026-12-01T08:00:00Z') });
  owner = await newOwner(server);
  maker = await newMember(server, owner, ['MAKER']);
  designId = await newDesign(owner.caller);
});
afterAll(() => server.stop());

const counts = async () => {
  const { rows } = await server.admin.query<{ batches: number; boards: number; events: number }>(
    `select (select count(*) from batch)::int as batches, (select count(*) from board)::int as boards,
       (select count(*) from event where type <> 'PLAN_MADE')::int as events`,
  );
  return rows[0];
};

describe('a repeated call', () => {
  it('with the same key gives the same batch', async () => {
    const input = { designId, boards: 3, idempotencyKey: 'first' };
    const made = await makeBatch(maker.caller, input);
    const before = await counts();
    const again = await makeBatch(maker.caller, input);
    expect(again.batch?.id).toBe(made.batch?.id);
    expect(again).toMatchObject({ problems: [], event: null });
    expect(await counts()).toEqual(before);
  });

  it('with the same key for something else is refused', async () => {
    const before = await counts();
    const { batch, problems } = await makeBatch(maker.caller, {
      designId,
      boards: 4,
      idempotencyKey: 'first',
    });
    expect(batch).toBeNull();
    expect(problems).toMatchObject([{ code: 'IDEMPOTENCY_MISMATCH', field: 'idempotencyKey' }]);
    expect(problems[0]?.sentence).toMatch(/new key/);
    expect(await counts()).toEqual(before);
  });

  it('at the same moment makes one batch', async () => {
    const before = await counts();
    const input = { designId, boards: 2, idempotencyKey: 'twice' };
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => makeBatch(maker.caller.twin(), input)),
    );
    expect(new Set(answers.map((each) => each.batch?.id)).size).toBe(1);
    expect(answers.filter((each) => each.event !== null)).toHaveLength(1);
    expect(await counts()).toEqual({
      batches: (before?.batches ?? 0) + 1,
      boards: (before?.boards ?? 0) + 2,
      events: (before?.events ?? 0) + 1,
    });
  });

  it('with the key of somebody else makes another batch', async () => {
    const input = { designId, boards: 3, idempotencyKey: 'first' };
    const mine = await done(makeBatch(maker.caller, input));
    const theirs = await done(makeBatch(owner.caller, input));
    expect(theirs.id).not.toBe(mine.id);
  });
});

describe('codes and serials', () => {
  it('are given once, to batches made at the same moment too', async () => {
    const made = await Promise.all(
      Array.from({ length: 6 }, () =>
        done(makeBatch(owner.caller.twin(), { designId, boards: 2 })),
      ),
    );
    expect(new Set(made.map((each) => each.code)).size).toBe(6);
    const { rows } = await server.admin.query(
      `select count(*)::int as boards, max(serial)::int as highest, (select board_serial from shop_counter) as counter
       from board`,
    );
    expect(rows[0]).toEqual({
      boards: rows[0].highest,
      highest: rows[0].counter,
      counter: rows[0].highest,
    });
  });
});

describe('a copy of the route', () => {
  it('is shared while the route is the same, and does not change with it', async () => {
    const first = await done(makeBatch(owner.caller, { designId, boards: 1 }));
    const second = await done(makeBatch(owner.caller, { designId, boards: 9 }));
    expect(second.routeId).toBe(first.routeId);
    const copies = () => server.admin.query('select id, steps from route_copy order by id');
    const { rows: before } = await copies();
    await server.admin.query(
      `update profile set figures = jsonb_set(figures, '{clampedMinutes}', '75') where usual and kind = 'GLUE'`,
    );
    const third = await done(makeBatch(owner.caller, { designId, boards: 1 }));
    expect(third.routeId).not.toBe(first.routeId);
    const { rows: after } = await copies();
    const old = after.filter((row: { id: string }) => row.id !== localId('route', third.routeId));
    expect(old).toEqual(before);
    expect((await readBatch(owner.caller, first.code)).routeId).toBe(first.routeId);
  });
});

describe('a batch without order lines', () => {
  it('aims at a ship-by date as orders do, and at none without a due date', async () => {
    const make = (dueDate: string | null) =>
      done(makeBatch(owner.caller, { designId, boards: 1, dueDate }));
    // Due on a Monday: two working days for the carrier, one for packing.
    expect(await make('2026-12-14')).toMatchObject({ shipBy: '2026-12-09' });
    expect(await make(null)).toMatchObject({ shipBy: null });
  });
});
