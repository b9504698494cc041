import { and, eq, isNull } from 'drizzle-orm';
import { apiKey } from '#drizzle/tables/access';
import { problemSentence } from '#shared/words/problem-words';
import { appendEvent } from '#server/db/events';
import type { ApiKeyPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { problem } from '#server/http/problem';
import { presentKey } from './present-key';

/** Ends a key at once, also on the sockets it has open. */
export async function revokeApiKey(context: Context, id: string): Promise<ApiKeyPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const keyId = localId('key', id);
  const row =
    keyId === null
      ? undefined
      : await services.doors.inShop(shopId, async (tx) => {
          const now = services.now();
          const [revoked] = await tx
            .update(apiKey)
            .set({ revokedAt: now })
            .where(and(eq(apiKey.id, keyId), isNull(apiKey.revokedAt)))
            .returning();
          if (!revoked) return undefined;
          await appendEvent(tx, shopId, {
            type: 'API_KEY_REVOKED',
            by: memberId,
            happenedAt: now,
            recordedAt: now,
            data: { keyId },
          });
          return revoked;
        });
  if (!row) {
    const sentence = problemSentence({ code: 'NOT_FOUND' });
    return { problems: [problem('NOT_FOUND', sentence, 'id')] };
  }
  services.hub.revoke(row.keyHash);
  services.hub.wake();
  await context.forget();
  return { apiKey: presentKey(row), problems: [] };
}
