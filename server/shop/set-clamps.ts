import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { occupation } from '#drizzle/tables/batch';
import { clampClass } from '#drizzle/tables/shop';
import { clampsSchema } from '#shared/shop/clamps-schema';
import type { ClampClassInput, ShopPayload } from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { inputProblems } from '#server/http/problem';
import { changeShop, shopNow } from './change-shop';
import { clampChanges } from './clamp-changes';

/** Sets the shop's clamps, all of them. */
export async function setClamps(
  context: Context,
  version: number,
  clamps: readonly ClampClassInput[],
): Promise<ShopPayload> {
  const parsed = clampsSchema.safeParse(clamps);
  if (!parsed.success) {
    return { shop: await shopNow(context), problems: inputProblems(parsed, 'clamps') };
  }
  return changeShop(context, version, 'CLAMPS', async (tx, shopId) => {
    const current = await tx.select().from(clampClass).orderBy(asc(clampClass.length));
    const used = await tx
      .select({ key: occupation.resource, amount: sql<number>`sum(${occupation.amount})::int` })
      .from(occupation)
      .where(and(eq(occupation.isClamps, true), isNull(occupation.until)))
      .groupBy(occupation.resource);
    const inUse = new Map(used.map(({ key, amount }) => [key, amount]));
    const changes = clampChanges(current, parsed.data, inUse);
    if (!changes.ok) return changes.problems;
    if (changes.remove.length > 0) {
      await tx.delete(clampClass).where(inArray(clampClass.key, changes.remove));
    }
    for (const { key, length, count } of changes.keep) {
      await tx.update(clampClass).set({ length, count }).where(eq(clampClass.key, key));
    }
    if (changes.add.length > 0) {
      await tx.insert(clampClass).values(changes.add.map((each) => ({ shopId, ...each })));
    }
    return [];
  });
}
