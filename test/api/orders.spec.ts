import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newOwner, type Person } from '../factories/people';
import { inDays, newBatch, newDesign, newOrder, tryMove, tryOrder } from '../factories/things';

let server: ApiServer;
let owner: Person;
let designId: string;
beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
  designId = await newDesign(owner.caller, { name: 'Drift' });
});
afterAll(() => server.stop());

const fieldsOf = (payload: { problems: { field: string | null }[] }) =>
  payload.problems.map((problem) => problem.field);

interface Page {
  orders: {
    nodes: { code: string; dueDate: string; status: string }[];
    pageInfo: { hasNextPage: boolean; endCursor: string | null };
    totalCount: number;
  };
}
const LIST = `query ($first: Int, $after: String, $status: OrderStatus) {
  orders(first: $first, after: $after, status: $status) {
    nodes { code dueDate status } pageInfo { hasNextPage endCursor } totalCount
  }
}`;

describe('entering an order', () => {
  it('counts codes per shop from 1001, and aims at a working day before the due date', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    const dueDate = inDays(30);
    const first = await tryOrder(caller, { dueDate, lines: [{ designId: design, count: 3 }] });
    expect(first.problems).toEqual([]);
    expect(first.order).toMatchObject({
      code: 'OR-1001',
      dueDate,
      status: 'RECEIVED',
      customer: { name: 'Nell Farrow', email: null },
      lines: [{ count: 3 }],
    });
    const { shipBy } = first.order as unknown as { shipBy: string };
    expect(shipBy < dueDate).toBe(true);
    expect([0, 6]).not.toContain(new Date(`${shipBy}T00:00:00Z`).getUTCDay());
    const second = await newOrder(caller, { lines: [{ designId: design, count: 3 }] });
    expect(second.code).toBe('OR-1002');
  });

  it('gives codes without gaps or doubles when many come at once', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    const orders = await Promise.all(
      Array.from({ length: 10 }, () =>
        newOrder(caller, { lines: [{ designId: design, count: 1 }] }),
      ),
    );
    const codes = orders.map((order) => order.code).sort();
    expect(codes).toEqual(Array.from({ length: 10 }, (_, n) => `OR-${1001 + n}`));
    const { rows } = await server.admin.query<{ count: string }>(
      `select count(*) from customer c join shop_order o on o.shop_id = c.shop_id and o.customer_id = c.id
       where o.code = 'OR-1010' or c.id in (select customer_id from shop_order where code = 'OR-1009')`,
    );
    expect(Number(rows[0]?.count)).toBeGreaterThan(0);
    const { rows: customers } = await server.admin.query(
      `select distinct customer_id from shop_order where shop_id =
         (select shop_id from shop_order where code = 'OR-1010')`,
    );
    expect(customers).toHaveLength(1);
  });

  it('knows a customer again by name and address', async () => {
    const lines = [{ designId, count: 1 }];
    const enter = async (customerName: string, customerEmail: string | null) => {
      const { order } = await tryOrder(owner.caller, { customerName, customerEmail, lines });
      return (order as unknown as { customer: { id: string } }).customer.id;
    };
    const first = await enter('Ada Lund', 'ada@example.com');
    expect(await enter(' ada lund ', 'ADA@example.com')).toBe(first);
    expect(await enter('Ada Lund', null)).not.toBe(first);
    expect(await enter('Ada Lund', 'other@example.com')).not.toBe(first);
  });

  it('takes a reference once', async () => {
    const lines = [{ designId, count: 1 }];
    const { code } = await newOrder(owner.caller, { clientReference: 'PO 1', lines });
    const again = await tryOrder(owner.caller, { clientReference: ' PO 1 ', lines });
    expect(again.order).toBeNull();
    expect(again.problems).toMatchObject([{ code: 'REFERENCE_TAKEN', field: 'clientReference' }]);
    expect(again.problems[0]?.sentence).toContain(code);
  });

  it.each<[string, object, string[]]>([
    ['yesterday and earlier', { dueDate: inDays(-2) }, ['dueDate']],
    ['too far away', { dueDate: '9999-12-31' }, ['dueDate']],
    ['no name', { customerName: ' ' }, ['customerName']],
    ['a name of 10,000 characters', { customerName: 'x'.repeat(10_000) }, ['customerName']],
    ['no address', { customerEmail: 'nell' }, ['customerEmail']],
    ['a long reference', { clientReference: 'x'.repeat(81) }, ['clientReference']],
    ['no lines', { lines: [] }, ['lines']],
    ['no boards', { lines: [{ designId: 'x', count: 0 }] }, ['lines.0.count']],
    ['too many boards', { lines: [{ designId: 'x', count: 501 }] }, ['lines.0.count']],
    ['an unknown design', { lines: [{ designId: 'x', count: 1 }] }, ['lines.0.designId']],
  ])('refuses %s', async (_, input, fields) => {
    const refused = await tryOrder(owner.caller, { lines: [{ designId, count: 1 }], ...input });
    expect(refused.order).toBeNull();
    expect(fieldsOf(refused)).toEqual(fields);
  });

  it('refuses 51 lines, and what is refused leaves nothing behind', async () => {
    const count = () =>
      server.admin
        .query<{ rows: string }>(
          'select (select count(*) from shop_order) + (select count(*) from customer) as rows',
        )
        .then(({ rows }) => rows[0]?.rows);
    const before = await count();
    const lines = Array.from({ length: 51 }, () => ({ designId, count: 1 }));
    expect(fieldsOf(await tryOrder(owner.caller, { lines }))).toEqual(['lines']);
    const mixed = [
      { designId, count: 1 },
      { designId: 'design_x', count: 1 },
    ];
    expect(fieldsOf(await tryOrder(owner.caller, { customerName: 'New', lines: mixed }))).toEqual([
      'lines.1.designId',
    ]);
    expect(await count()).toBe(before);
  });
});

describe('reading orders', () => {
  it('finds one by its code, in any case, and answers null for what is no code', async () => {
    const { code } = await newOrder(owner.caller, { lines: [{ designId, count: 1 }] });
    const READ = 'query ($code: String!) { order(code: $code) { code } }';
    expect(await owner.caller.get(READ, { code: code.toLowerCase() })).toEqual({ order: { code } });
    for (const wrong of ['', 'OR-0', '%', 'x'.repeat(10_000), 'OR-1001\u0000', "' or 1=1 --"]) {
      expect(await owner.caller.get(READ, { code: wrong })).toEqual({ order: null });
    }
  });

  it('goes through all by due date, page by page, each once', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    for (const days of [9, 3, 7, 3, 5, 3, 8]) {
      await newOrder(caller, { dueDate: inDays(days), lines: [{ designId: design, count: 1 }] });
    }
    const seen: { code: string; dueDate: string }[] = [];
    let after: string | null = null;
    do {
      const { orders }: Page = await caller.get<Page>(LIST, { first: 3, after });
      expect(orders.totalCount).toBe(7);
      seen.push(...orders.nodes);
      after = orders.pageInfo.hasNextPage ? orders.pageInfo.endCursor : null;
    } while (after !== null);
    const dates = seen.map((order) => order.dueDate);
    expect(dates).toEqual([...dates].sort());
    expect(new Set(seen.map((order) => order.code)).size).toBe(7);
  });

  it('filters by a status that follows from the floor', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    const make = async (boards: number | null, to: string | null) => {
      const order = await newOrder(caller, { lines: [{ designId: design, count: 4 }] });
      if (boards === null) return order.code;
      const batch = await newBatch(caller, {
        designId: design,
        boards,
        orderLineIds: [order.lines[0]?.id],
      });
      if (to !== null) expect((await tryMove(caller, batch, to)).problems).toEqual([]);
      return order.code;
    };
    const received = [await make(null, null), await make(null, null)];
    const planned = await make(4, null);
    const inWork = await make(4, 'BLANK');
    const shipped = await make(4, null);
    await server.admin.query(
      `update batch b set shipped_at = now(), released_at = now() where b.id in (
         select s.batch_id from line_batch s join order_line l on l.id = s.line_id
         join shop_order o on o.id = l.order_id and o.code = $1)
       and b.shop_id = (select shop_id from member where 'member_' || replace(id::text, '-', '') = $2)`,
      [shipped, await memberOf(caller)],
    );
    const list = async (status: string | null, more = {}) => {
      const { orders } = await caller.get<Page>(LIST, { status, ...more });
      return orders;
    };
    const codes = async (status: string) => (await list(status)).nodes.map((node) => node.code);
    expect(await codes('RECEIVED')).toEqual(received);
    expect(await codes('PLANNED')).toEqual([planned]);
    expect(await codes('IN_WORK')).toEqual([inWork]);
    expect(await codes('READY')).toEqual([]);
    expect(await codes('SHIPPED')).toEqual([shipped]);
    expect((await list(null)).totalCount).toBe(5);
    const first = await list('RECEIVED', { first: 1 });
    expect(first).toMatchObject({ totalCount: 2, pageInfo: { hasNextPage: true } });
    const rest = await list('RECEIVED', { first: 1, after: first.pageInfo.endCursor });
    expect(rest.nodes.map((node) => node.code)).toEqual([received[1]]);
    expect(rest.pageInfo.hasNextPage).toBe(false);
  });

  it('is not ready while batches make fewer boards than were ordered', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    const order = await newOrder(caller, { lines: [{ designId: design, count: 8 }] });
    await newBatch(caller, { designId: design, boards: 4, orderLineIds: [order.lines[0]?.id] });
    await server.admin.query(
      'update batch set shipped_at = now(), released_at = now() where boards = 4',
    );
    const READ =
      'query ($code: String!) { order(code: $code) { status progressPercent forecastReadyAt } }';
    expect(await caller.get(READ, { code: order.code })).toEqual({
      order: { status: 'IN_WORK', progressPercent: 50, forecastReadyAt: null },
    });
  });

  it.each<[string, Record<string, unknown>]>([
    ['0 at a time', { first: 0 }],
    ['101 at a time', { first: 101 }],
    ['-1 at a time', { first: -1 }],
    ['a made-up cursor', { after: 'x' }],
    ['a cursor of 10,000 characters', { after: 'x'.repeat(10_000) }],
    ['a cursor without a date', { after: Buffer.from('x 0000').toString('base64url') }],
    ['an unknown status', { status: 'LOST' }],
  ])('refuses %s', async (_, variables) => {
    expect((await owner.caller.ask(LIST, variables)).codes).toEqual(['BAD_USER_INPUT']);
  });

  it('asks the database as often for twelve orders as for two', async () => {
    const { caller } = await newOwner(server);
    const design = await newDesign(caller);
    const make = async () => {
      const order = await newOrder(caller, { lines: [{ designId: design, count: 2 }] });
      await newBatch(caller, { designId: design, boards: 2, orderLineIds: [order.lines[0]?.id] });
    };
    const queries = async (first: number) => {
      const counting = countTransactions(/from "shop_order"/);
      try {
        const answer = await caller.get<Page>(
          `query ($first: Int) { orders(first: $first) {
            nodes { code dueDate status customer { name } lines { designName status batchCodes } }
            pageInfo { hasNextPage endCursor } totalCount } }`,
          { first },
        );
        expect(answer.orders.nodes).toHaveLength(first);
        expect(counting.lengths).toHaveLength(1);
        return counting.lengths[0] ?? 0;
      } finally {
        counting.stop();
      }
    };
    for (let n = 0; n < 12; n++) await make();
    const few = await queries(2);
    expect(few).toBeGreaterThan(3);
    expect(await queries(12)).toBe(few);
  });
});

/** Counts the statements of each transaction that asks for something, whatever the background does meanwhile. */
function countTransactions(of: RegExp): { lengths: number[]; stop(): void } {
  const prototype = pg.Client.prototype as { query: (...args: unknown[]) => unknown };
  const original = prototype.query;
  const open = new WeakMap<object, { statements: number; asks: boolean }>();
  const lengths: number[] = [];
  prototype.query = function (this: object, ...args: unknown[]) {
    const [first] = args;
    const text = typeof first === 'string' ? first : String((first as { text?: string }).text);
    const current = open.get(this);
    if (text.startsWith('begin')) open.set(this, { statements: 0, asks: false });
    else if (current && text === 'commit') {
      if (current.asks) lengths.push(current.statements);
      open.delete(this);
    } else if (current) {
      current.statements += 1;
      current.asks ||= of.test(text);
    }
    return original.apply(this, args);
  };
  return {
    lengths,
    stop: () => {
      prototype.query = original;
    },
  };
}

async function memberOf(caller: Person['caller']): Promise<string> {
  const { viewer } = await caller.get<{ viewer: { member: { id: string } } }>(
    '{ viewer { member { id } } }',
  );
  return viewer.member.id;
}
