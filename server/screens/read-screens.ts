import { desc, isNull } from 'drizzle-orm';
import { screen } from '#drizzle/tables/access';
import type { Screen } from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { globalId } from '#server/http/global-id';

/** The shop's paired screens, the newest first. */
export function readScreens(context: Context): Promise<Screen[]> {
  return context.read(async (tx) => {
    const rows = await tx
      .select()
      .from(screen)
      .where(isNull(screen.revokedAt))
      .orderBy(desc(screen.pairedAt), desc(screen.id));
    return rows.map((row) => ({
      id: globalId('screen', row.id),
      name: row.name,
      pairedAt: row.pairedAt.toISOString(),
      lastSeenAt: row.lastSeenAt?.toISOString() ?? null,
    }));
  });
}
