import { eq } from 'drizzle-orm';
import { apiKey } from '#drizzle/tables/access';
import { apiKeySchema } from '#shared/api/api-key-schema';
import { DAY_MS } from '#shared/time/instant';
import { appendEvent } from '#server/db/events';
import { newId } from '#server/db/uuid';
import type { ApiKeyPayload, MutationCreateApiKeyArgs } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { inputProblems } from '#server/http/problem';
import { hashOf } from '#server/secrets/token';
import { newApiKey, shownPrefix } from './key-format';
import { presentKey } from './present-key';

/** Makes a key. Only its hash is stored: the answer is the one place where the key itself stands. */
export async function createApiKey(
  context: Context,
  input: MutationCreateApiKeyArgs,
): Promise<ApiKeyPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const parsed = apiKeySchema.safeParse(input);
  if (!parsed.success) return { problems: inputProblems(parsed) };
  const { name, scopes, expiresInDays } = parsed.data;
  const now = services.now();
  const id = newId(now.getTime());
  const key = newApiKey();
  await services.doors.inShop(shopId, async (tx) => {
    await tx.insert(apiKey).values({
      shopId,
      id,
      name,
      prefix: shownPrefix(key),
      lastFour: key.slice(-4),
      keyHash: hashOf(key),
      scopes,
      createdBy: memberId,
      createdAt: now,
      expiresAt: expiresInDays === null ? null : new Date(now.getTime() + expiresInDays * DAY_MS),
    });
    await appendEvent(tx, shopId, {
      type: 'API_KEY_MADE',
      by: memberId,
      happenedAt: now,
      recordedAt: now,
      data: { keyId: id, scopes },
    });
  });
  services.hub.wake();
  await context.forget();
  const [row] = await context.read((tx) => tx.select().from(apiKey).where(eq(apiKey.id, id)));
  return { apiKey: row ? presentKey(row) : null, key, problems: [] };
}
