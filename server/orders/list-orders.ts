import { GraphQLError } from 'graphql';
import { and, asc, eq, gt, or, sql, type SQL } from 'drizzle-orm';
import { shopOrder } from '#drizzle/tables/order';
import { isLocalDate } from '#shared/time/zone';
import type { OrderStatus } from '#shared/orders/status';
import type { Order, OrderPage } from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { readOrders } from './read-orders';

/**
 * Open orders that a status is looked for in, by due date. A status follows from the floor and is stored nowhere, so it
 * is derived for all of them; a shop of six people has a tenth of this open.
 */
const MOST_DERIVED = 500;

/** A place in the list: orders stand by due date, then by id. */
interface Place {
  dueDate: string;
  id: string;
}

/** One order by its code. */
export function readOrder(context: Context, code: string): Promise<Order | null> {
  if (!/^[\w-]{1,40}$/.test(code)) return Promise.resolve(null);
  return context.read(async (tx) => {
    const rows = await tx.select().from(shopOrder).where(eq(shopOrder.code, code.toUpperCase()));
    const [order] = await readOrders(tx, rows, context.services.now());
    return order ?? null;
  });
}

/** A page of orders by due date. */
export function listOrders(
  context: Context,
  asked: { first: number; after: string | null; status: OrderStatus | null },
): Promise<OrderPage> {
  const { first, status } = asked;
  if (first < 1 || first > 100) throw badInput('Ask for 1 to 100 orders at a time.');
  const after = asked.after === null ? null : readPlace(asked.after);
  if (status === null) return stored(context, first, after, undefined);
  // Whether all boards have left the shop stands in the rows; the other statuses are derived.
  if (status === 'SHIPPED') return stored(context, first, after, sql`not ${isOpen}`);
  return derived(context, first, after, status);
}

/** Whether boards of the order are still in the shop, or not made yet. */
const isOpen = sql`exists (
  select from order_line l
  left join lateral (
    select sum(s.boards) as boards from line_batch s join batch b on b.shop_id = s.shop_id and b.id = s.batch_id
    where s.shop_id = l.shop_id and s.line_id = l.id and b.shipped_at is not null
  ) gone on true
  where l.shop_id = shop_order.shop_id and l.order_id = shop_order.id and (
    coalesce(gone.boards, 0) < l.count or exists (
      select from line_batch s join batch b on b.shop_id = s.shop_id and b.id = s.batch_id
      where s.shop_id = l.shop_id and s.line_id = l.id and b.shipped_at is null
    )
  )
)`;

function stored(
  context: Context,
  first: number,
  after: Place | null,
  filter: SQL | undefined,
): Promise<OrderPage> {
  return context.read(async (tx) => {
    const rows = await tx
      .select()
      .from(shopOrder)
      .where(and(filter, isAfter(after)))
      .orderBy(asc(shopOrder.dueDate), asc(shopOrder.id))
      .limit(first + 1);
    const [counted] = await tx
      .select({ count: sql<number>`count(*)::int` })
      .from(shopOrder)
      .where(filter);
    const nodes = await readOrders(tx, rows.slice(0, first), context.services.now());
    return page(nodes, rows.length > first, counted?.count ?? 0);
  });
}

function derived(
  context: Context,
  first: number,
  after: Place | null,
  status: OrderStatus,
): Promise<OrderPage> {
  return context.read(async (tx) => {
    const rows = await tx
      .select()
      .from(shopOrder)
      .where(isOpen)
      .orderBy(asc(shopOrder.dueDate), asc(shopOrder.id))
      .limit(MOST_DERIVED);
    const orders = await readOrders(tx, rows, context.services.now());
    const matching = orders.filter((order) => order.status === status);
    const rest = matching.filter(
      (order) => after === null || comesAfter(placeOfOrder(order), after),
    );
    return page(rest.slice(0, first), rest.length > first, matching.length);
  });
}

function page(nodes: Order[], hasNextPage: boolean, totalCount: number): OrderPage {
  const last = nodes.at(-1);
  return {
    nodes,
    pageInfo: { hasNextPage, endCursor: last ? writePlace(placeOfOrder(last)) : null },
    totalCount,
  };
}

function isAfter(place: Place | null): SQL | undefined {
  if (place === null) return undefined;
  return or(
    gt(shopOrder.dueDate, place.dueDate),
    and(eq(shopOrder.dueDate, place.dueDate), gt(shopOrder.id, place.id)),
  );
}

function comesAfter(a: Place, b: Place): boolean {
  return a.dueDate > b.dueDate || (a.dueDate === b.dueDate && a.id > b.id);
}

function placeOfOrder(order: Order): Place {
  return { dueDate: order.dueDate, id: localId('order', order.id) ?? '' };
}

function writePlace({ dueDate, id }: Place): string {
  return Buffer.from(`${dueDate} ${id}`).toString('base64url');
}

function readPlace(cursor: string): Place {
  const text = cursor.length <= 100 ? Buffer.from(cursor, 'base64url').toString() : '';
  const match = /^(\S+) ([0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12})$/.exec(text);
  if (!match?.[1] || !match[2] || !isLocalDate(match[1])) {
    throw badInput('This is not a place in the list of orders: hand cursors back as they came.');
  }
  return { dueDate: match[1], id: match[2] };
}

function badInput(message: string): GraphQLError {
  return new GraphQLError(message, { extensions: { code: 'BAD_USER_INPUT' } });
}
