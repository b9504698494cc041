import { asc, eq, inArray, type InferSelectModel } from 'drizzle-orm';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { design } from '#drizzle/tables/design';
import { customer, lineBatch, orderLine, type shopOrder } from '#drizzle/tables/order';
import { shop } from '#drizzle/tables/shop';
import { progressPercent } from '#shared/floor/card';
import { placeOf } from '#shared/floor/progress';
import { lineStanding, orderStanding, type LineMaker } from '#shared/orders/status';
import { endOfWorkOn } from '#shared/time/calendar';
import type { Hours } from '#shared/time/hours';
import { formatInstant, type Instant } from '#shared/time/instant';
import { loadBatches, type LoadedBatch } from '#server/floor/load';
import type { Order, OrderLine } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';

type OrderRow = InferSelectModel<typeof shopOrder>;
type Reader = Pick<NodePgDatabase, 'select' | 'execute' | 'selectDistinctOn'>;

/** Orders as the API shows them, in the order of the rows; what they are made of is read as sets, however many there are. */
export async function readOrders(
  tx: Reader,
  rows: readonly OrderRow[],
  now: Date,
): Promise<Order[]> {
  if (rows.length === 0) return [];
  const hours = await hoursOf(tx);
  const customers = await tx
    .select()
    .from(customer)
    .where(inArray(customer.id, [...new Set(rows.map((row) => row.customerId))]));
  const lines = await tx
    .select({ line: orderLine, designName: design.name })
    .from(orderLine)
    .innerJoin(design, eq(design.id, orderLine.designId))
    .where(
      inArray(
        orderLine.orderId,
        rows.map((row) => row.id),
      ),
    )
    .orderBy(asc(orderLine.position));
  const shares =
    lines.length === 0
      ? []
      : await tx
          .select()
          .from(lineBatch)
          .where(
            inArray(
              lineBatch.lineId,
              lines.map(({ line }) => line.id),
            ),
          );
  const batches = await batchesById(tx, shares, now);
  return rows.map((row) => {
    const buyer = customers.find((candidate) => candidate.id === row.customerId);
    const made = lines
      .filter(({ line }) => line.orderId === row.id)
      .map(({ line, designName }) => {
        const own = shares.filter((share) => share.lineId === line.id);
        const makers = own.flatMap((share) => {
          const batch = batches.get(share.batchId);
          return batch ? [{ ...batch, boards: share.boards }] : [];
        });
        return { line, designName, makers, standing: lineStanding(line.count, makers) };
      });
    const standing = orderStanding(
      made.map(({ line, standing: own }) => ({ ...own, count: line.count })),
    );
    return {
      id: globalId('order', row.id),
      code: row.code,
      version: row.version,
      clientReference: row.clientReference,
      customer: buyer
        ? { id: globalId('customer', buyer.id), name: buyer.name, email: buyer.email }
        : null,
      dueDate: row.dueDate,
      shipBy: row.shipBy,
      createdAt: row.createdAt.toISOString(),
      lines: made.map(({ line, designName, makers, standing: own }): OrderLine => ({
        id: globalId('line', line.id),
        designName,
        designId: globalId('design', line.designId),
        count: line.count,
        status: own.status,
        stage: own.stage,
        progressPercent: own.progressPercent,
        forecastReadyAt: maybeInstant(own.readyAt),
        batchCodes: makers.map((maker) => maker.code).sort(),
      })),
      status: standing.status,
      stage: standing.stage,
      progressPercent: standing.progressPercent,
      forecastReadyAt: maybeInstant(standing.readyAt),
      onTime: standing.readyAt === null ? null : standing.readyAt <= endOfWorkOn(hours, row.shipBy),
    };
  });
}

/** The shop's working hours. */
export async function hoursOf(tx: Pick<NodePgDatabase, 'select'>): Promise<Hours> {
  const [row] = await tx
    .select({ zone: shop.zone, weekly: shop.weekly, exceptions: shop.exceptions })
    .from(shop);
  if (!row) throw new Error('The shop is gone.');
  return row;
}

type Maker = Omit<LineMaker, 'boards'> & { code: string };

async function batchesById(
  tx: Reader,
  shares: readonly { batchId: string }[],
  now: Date,
): Promise<Map<string, Maker>> {
  const ids = [...new Set(shares.map((share) => share.batchId))];
  if (ids.length === 0) return new Map();
  const loaded = await loadBatches(tx, { ids }, now);
  return new Map(loaded.map((batch) => [batch.floor.id, makerOf(batch, now.getTime())]));
}

function makerOf({ floor, forecast }: LoadedBatch, now: Instant): Maker {
  const place = placeOf(floor, now);
  const isDone = place === 'READY' || place === 'SHIPPED';
  const finishes = floor.runs.flatMap((run) => run.finishedAt ?? []);
  const finishedAt = finishes.length > 0 ? Math.max(...finishes) : null;
  return {
    code: floor.code,
    place,
    progressPercent: progressPercent(floor, now),
    // What is ready is not planned any more: it has been ready since its last step.
    readyAt: isDone ? finishedAt : (forecast?.readyAt.getTime() ?? null),
  };
}

function maybeInstant(at: Instant | null): string | null {
  return at === null ? null : formatInstant(at);
}
