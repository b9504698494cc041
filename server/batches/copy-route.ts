import { createHash } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { routeCopy } from '#drizzle/tables/batch';
import type { RouteStep } from '#shared/route/route';
import type { ShopTransaction } from '#server/db/doors';
import { newId } from '#server/db/uuid';

/** The id of a copy of the steps. Batches whose copies are the same share one, as it never changes. */
export async function copyRoute(
  tx: ShopTransaction,
  shopId: string,
  steps: RouteStep[],
): Promise<string> {
  const hash = createHash('sha256').update(JSON.stringify(steps)).digest('hex');
  await tx
    .insert(routeCopy)
    .values({ shopId, id: newId(), hash, steps })
    .onConflictDoNothing({ target: [routeCopy.shopId, routeCopy.hash] });
  const [copy] = await tx
    .select({ id: routeCopy.id })
    .from(routeCopy)
    .where(eq(routeCopy.hash, hash));
  if (!copy) throw new Error('The route was not copied.');
  return copy.id;
}
