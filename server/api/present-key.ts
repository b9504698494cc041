import type { InferSelectModel } from 'drizzle-orm';
import type { apiKey } from '#drizzle/tables/access';
import type { ApiKey } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';

/** A key's record as the API shows it; the key itself is not in it. */
export function presentKey(row: InferSelectModel<typeof apiKey>): ApiKey {
  return {
    id: globalId('key', row.id),
    name: row.name,
    prefix: row.prefix,
    lastFour: row.lastFour,
    scopes: row.scopes,
    createdAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt?.toISOString() ?? null,
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
    revokedAt: row.revokedAt?.toISOString() ?? null,
  };
}
