import { eq } from 'drizzle-orm';
import { customer, lineBatch, orderLine, shopOrder } from '#drizzle/tables/order';
import { shopCounter } from '#drizzle/tables/shop';
import { DAY_MS } from '#shared/time/instant';
import { addDays, type LocalDate } from '#shared/time/zone';
import type { ShopTransaction } from '#server/db/doors';
import { newId } from '#server/db/uuid';
import { DEMO_CUSTOMERS } from './cast';

/** A batch as orders see it. */
export interface DemoLine {
  batchId: string;
  designId: string;
  boards: number;
  dueDate: LocalDate | null;
  shipBy: LocalDate | null;
}

const ORDERS = 20;
const FIRST_CODE = 1001;

/** Twenty orders: one or two for each of the first batches, and some that nothing is made for yet. */
export async function makeOrders(
  tx: ShopTransaction,
  shopId: string,
  now: Date,
  today: LocalDate,
  lines: readonly DemoLine[],
  designs: readonly { id: string }[],
): Promise<void> {
  const customers = DEMO_CUSTOMERS.map((each) => ({ shopId, id: newId(), ...each }));
  await tx.insert(customer).values(customers);
  for (let n = 0; n < ORDERS; n++) {
    const buyer = customers[n % customers.length];
    const made = lines[n];
    const designId = made?.designId ?? designs[n % designs.length]?.id;
    if (!buyer || !designId) continue;
    const dueDate = made?.dueDate ?? addDays(today, 16 + n);
    const orderId = newId();
    const lineId = newId();
    await tx.insert(shopOrder).values({
      shopId,
      id: orderId,
      code: `OR-${FIRST_CODE + n}`,
      customerId: buyer.id,
      clientReference: n % 4 === 1 ? `web-${4100 + n}` : null,
      dueDate,
      shipBy: made?.shipBy ?? addDays(dueDate, -3),
      createdAt: new Date(now.getTime() - (ORDERS - n) * 0.6 * DAY_MS),
    });
    const count = made ? Math.max(1, made.boards - (n % 3)) : 2 + (n % 4);
    await tx
      .insert(orderLine)
      .values({ shopId, id: lineId, orderId, designId, count, position: 1 });
    if (made) {
      await tx.insert(lineBatch).values({ shopId, lineId, batchId: made.batchId, boards: count });
    }
  }
  await tx
    .update(shopCounter)
    .set({ orderCode: FIRST_CODE + ORDERS - 1 })
    .where(eq(shopCounter.shopId, shopId));
}
