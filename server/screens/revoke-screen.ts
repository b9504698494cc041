import { and, eq, isNull } from 'drizzle-orm';
import { screen } from '#drizzle/tables/access';
import { problemSentence } from '#shared/words/problem-words';
import { appendEvent } from '#server/db/events';
import type { ScreensPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { problem } from '#server/http/problem';
import { readScreens } from './read-screens';

/** Ends a screen's token at once, also on the sockets it has open. */
export async function revokeScreen(context: Context, id: string): Promise<ScreensPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const screenId = localId('screen', id);
  const revoked =
    screenId !== null &&
    (await services.doors.inShop(shopId, async (tx) => {
      const now = services.now();
      const rows = await tx
        .update(screen)
        .set({ revokedAt: now })
        .where(and(eq(screen.id, screenId), isNull(screen.revokedAt)))
        .returning({ id: screen.id });
      if (rows.length === 0) return false;
      await appendEvent(tx, shopId, {
        type: 'SCREEN_REVOKED',
        by: memberId,
        happenedAt: now,
        recordedAt: now,
        data: { screenId },
      });
      return true;
    }));
  if (revoked) {
    services.hub.revoke(`screen ${screenId}`);
    services.hub.wake();
    await context.forget();
  }
  const sentence = problemSentence({ code: 'NOT_FOUND' });
  return {
    screens: await readScreens(context),
    problems: revoked ? [] : [problem('NOT_FOUND', sentence, 'id')],
  };
}
