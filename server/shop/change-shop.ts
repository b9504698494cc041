import { eq, sql } from 'drizzle-orm';
import { shop } from '#drizzle/tables/shop';
import { problemSentence } from '#shared/words/problem-words';
import type { ShopTransaction } from '#server/db/doors';
import { appendEvent } from '#server/db/events';
import type { ShopPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { problem, type Problem } from '#server/http/problem';
import { readShop } from './read-shop';

/**
 * One change of the shop's settings: in one transaction checks the version that the person saw, lets `write` write or
 * refuse, raises the version and appends the event. Answers the shop as it then stands.
 */
export async function changeShop(
  context: Context,
  version: number,
  part: 'HOURS' | 'CLAMPS',
  write: (tx: ShopTransaction, shopId: string) => Promise<Problem[]>,
): Promise<ShopPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const problems = await services.doors.inShop(shopId, async (tx): Promise<Problem[]> => {
    // What is in use is not taken or given back meanwhile: commands of the floor wait at the same lock.
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`floor ${shopId}`}, 0))`);
    const [row] = await tx
      .select({ version: shop.version })
      .from(shop)
      .where(eq(shop.id, shopId))
      .for('no key update');
    if (!row) throw new Error('The shop is gone.');
    if (row.version !== version) {
      const sentence = problemSentence({ code: 'VERSION_CONFLICT' });
      return [problem('VERSION_CONFLICT', sentence, 'version')];
    }
    const refused = await write(tx, shopId);
    if (refused.length > 0) return refused;
    await tx
      .update(shop)
      .set({ version: row.version + 1 })
      .where(eq(shop.id, shopId));
    const now = services.now();
    await appendEvent(tx, shopId, {
      type: 'SHOP_CHANGED',
      by: memberId,
      happenedAt: now,
      recordedAt: now,
      data: { version: row.version + 1, part },
    });
    return [];
  });
  if (problems.length === 0) services.hub.wake();
  return { shop: await shopNow(context), problems };
}

/** The shop in a fresh snapshot. */
export async function shopNow(context: Context): Promise<NonNullable<ShopPayload['shop']>> {
  await context.forget();
  return context.read((tx) => readShop(tx));
}
