import { eq } from 'drizzle-orm';
import { design } from '#drizzle/tables/design';
import { designSchema, type NewDesign } from '#shared/designs/design-schema';
import { problemSentence } from '#shared/words/problem-words';
import { appendEvent } from '#server/db/events';
import { newId } from '#server/db/uuid';
import type { DesignInput, DesignPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { inputProblems, problem, type Problem } from '#server/http/problem';
import { presentDesign } from './read-designs';

/** Makes a design. Its clamps' lengths follow from its size. */
export async function createDesign(context: Context, input: DesignInput): Promise<DesignPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const parsed = designSchema.safeParse(input);
  if (!parsed.success) return refused(inputProblems(parsed));
  const now = services.now();
  const id = newId(now.getTime());
  const made = await services.doors.inShop(shopId, async (tx) => {
    const rows = await tx
      .insert(design)
      .values({ shopId, id, ...designRow(parsed.data) })
      .onConflictDoNothing({ target: [design.shopId, design.name] })
      .returning({ id: design.id });
    if (rows.length === 0) return false;
    await appendEvent(tx, shopId, {
      type: 'DESIGN_MADE',
      by: memberId,
      happenedAt: now,
      recordedAt: now,
      data: { designId: id, version: 1 },
    });
    return true;
  });
  if (!made) {
    return refused([problem('NAME_TAKEN', problemSentence({ code: 'NAME_TAKEN' }), 'name')]);
  }
  services.hub.wake();
  await context.forget();
  const [row] = await context.read((tx) => tx.select().from(design).where(eq(design.id, id)));
  return { design: row ? presentDesign(row) : null, problems: [] };
}

/**
 * What is stored of a new design. Clamps close across a panel's strips in the first glue-up, and along the board over
 * its slices in the second.
 */
export function designRow(
  made: Omit<NewDesign, 'strips'> & { strips: readonly { species: string; width: bigint }[] },
) {
  const { strips, ...rest } = made;
  return {
    ...rest,
    strips: strips.map(({ species, width }) => ({ species, width: width.toString() })),
    panelClampLength: strips.reduce((sum, strip) => sum + strip.width, 0n),
    blockClampLength: made.length,
  };
}

function refused(problems: Problem[]): DesignPayload {
  return { design: null, problems };
}
