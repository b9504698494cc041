import { and, eq, inArray, sql } from 'drizzle-orm';
import { design } from '#drizzle/tables/design';
import { customer, orderLine, shopOrder } from '#drizzle/tables/order';
import { shop, shopCounter } from '#drizzle/tables/shop';
import { orderSchema, type NewOrder } from '#shared/orders/order-schema';
import { shipByOf } from '#shared/orders/ship-by';
import { addDays, toLocal } from '#shared/time/zone';
import { problemSentence } from '#shared/words/problem-words';
import type { ShopTransaction } from '#server/db/doors';
import { appendEvent } from '#server/db/events';
import { newId } from '#server/db/uuid';
import type { CreateOrderInput, OrderPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { inputProblems, problem, type Problem } from '#server/http/problem';
import { readOrders } from './read-orders';

/** A date further away than this is a typing mistake. */
const FURTHEST_DAYS = 5 * 366;

interface By {
  shopId: string;
  memberId: string;
  now: Date;
}

/** Enters an order, with its ship-by date, for a customer who is there already or is new. */
export async function createOrder(
  context: Context,
  input: CreateOrderInput,
): Promise<OrderPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const parsed = orderSchema.safeParse(input);
  if (!parsed.success) return { problems: inputProblems(parsed) };
  const by = { shopId, memberId, now: services.now() };
  const outcome = await services.doors.inShop(shopId, (tx) => enter(tx, by, parsed.data));
  if ('problems' in outcome) return { problems: outcome.problems };
  services.hub.wake();
  await context.forget();
  return context.read(async (tx) => {
    const rows = await tx.select().from(shopOrder).where(eq(shopOrder.id, outcome.id));
    const [order] = await readOrders(tx, rows, services.now());
    return { order: order ?? null, problems: [] };
  });
}

async function enter(
  tx: ShopTransaction,
  by: By,
  wanted: NewOrder,
): Promise<{ id: string } | { problems: Problem[] }> {
  const { shopId, memberId, now } = by;
  // Two orders at once do not make the same customer twice, nor use a reference twice.
  await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`orders ${shopId}`}, 0))`);
  const [settings] = await tx.select().from(shop);
  if (!settings) throw new Error('The shop is gone.');
  const { lines, problems } = await readLines(tx, wanted);
  problems.push(...dateProblems(toLocal(settings.zone, now.getTime()).date, wanted.dueDate));
  problems.push(...(await referenceProblems(tx, wanted.clientReference)));
  if (problems.length > 0) return { problems };
  const id = newId(now.getTime());
  const customerId = await customerFor(tx, by, wanted);
  const [counter] = await tx
    .update(shopCounter)
    .set({ orderCode: sql`${shopCounter.orderCode} + 1` })
    .where(eq(shopCounter.shopId, shopId))
    .returning({ code: shopCounter.orderCode });
  if (!counter) throw new Error('The shop has no counter.');
  await tx.insert(shopOrder).values({
    shopId,
    id,
    code: `OR-${counter.code}`,
    customerId,
    clientReference: wanted.clientReference,
    dueDate: wanted.dueDate,
    shipBy: shipByOf(settings, wanted.dueDate, settings),
    createdAt: now,
  });
  await tx.insert(orderLine).values(
    lines.map(({ designId, count }, index) => ({
      shopId,
      id: newId(now.getTime()),
      orderId: id,
      designId,
      count,
      position: index + 1,
    })),
  );
  await appendEvent(tx, shopId, {
    type: 'ORDER_MADE',
    by: memberId,
    happenedAt: now,
    recordedAt: now,
    orderId: id,
    data: { version: 1 },
  });
  return { id };
}

/** The lines with the rows of their designs, and what is wrong with those that have none. */
async function readLines(tx: ShopTransaction, wanted: NewOrder) {
  const asked = wanted.lines.map((line) => ({
    ...line,
    designId: localId('design', line.designId),
  }));
  const ids = asked.flatMap((line) => line.designId ?? []);
  const rows =
    ids.length === 0
      ? []
      : await tx.select({ id: design.id }).from(design).where(inArray(design.id, ids));
  const known = new Set(rows.map((row) => row.id));
  const lines: { designId: string; count: number }[] = [];
  const problems: Problem[] = [];
  asked.forEach(({ designId, count }, index) => {
    if (designId !== null && known.has(designId)) lines.push({ designId, count });
    else {
      const sentence = problemSentence({ code: 'NOT_FOUND' });
      problems.push(problem('NOT_FOUND', sentence, `lines.${index}.designId`));
    }
  });
  return { lines, problems };
}

function dateProblems(today: string, dueDate: string): Problem[] {
  if (dueDate < today) {
    return [problem('INVALID_INPUT', 'The due date is in the past.', 'dueDate')];
  }
  if (dueDate > addDays(today, FURTHEST_DAYS)) {
    return [problem('INVALID_INPUT', 'The due date is more than five years away.', 'dueDate')];
  }
  return [];
}

async function referenceProblems(tx: ShopTransaction, reference: string | null) {
  if (reference === null) return [];
  const [taken] = await tx
    .select({ code: shopOrder.code })
    .from(shopOrder)
    .where(eq(shopOrder.clientReference, reference));
  if (!taken) return [];
  const sentence = problemSentence({ code: 'REFERENCE_TAKEN', orderCode: taken.code });
  return [problem('REFERENCE_TAKEN', sentence, 'clientReference')];
}

/** The customer of that name and address, who is made when there is none. */
async function customerFor(tx: ShopTransaction, by: By, wanted: NewOrder): Promise<string> {
  const [known] = await tx
    .select({ id: customer.id })
    .from(customer)
    .where(
      and(
        eq(sql`lower(${customer.name})`, wanted.customerName.toLowerCase()),
        sql`lower(${customer.email}) is not distinct from ${wanted.customerEmail?.toLowerCase() ?? null}`,
      ),
    )
    .limit(1);
  if (known) return known.id;
  const id = newId(by.now.getTime());
  await tx
    .insert(customer)
    .values({ shopId: by.shopId, id, name: wanted.customerName, email: wanted.customerEmail });
  return id;
}
