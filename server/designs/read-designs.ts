import { asc, type InferSelectModel } from 'drizzle-orm';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { design } from '#drizzle/tables/design';
import type { Design } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';

/** The shop's designs by name. */
export async function readDesigns(tx: Pick<NodePgDatabase, 'select'>): Promise<Design[]> {
  const rows = await tx.select().from(design).orderBy(asc(design.name), asc(design.id));
  return rows.map(presentDesign);
}

/** A design as the API shows it. */
export function presentDesign(row: InferSelectModel<typeof design>): Design {
  return {
    id: globalId('design', row.id),
    version: row.version,
    name: row.name,
    length: row.length.toString(),
    width: row.width.toString(),
    thickness: row.thickness.toString(),
    strips: row.strips.map(({ species, width }) => ({ species, width })),
    slices: row.slices,
    panelCount: row.panelCount,
    panelBoards: row.panelBoards,
    blocksPerBoard: row.blocksPerBoard,
    panelClamps: { count: row.panelClampCount, length: row.panelClampLength.toString() },
    blockClamps: { count: row.blockClampCount, length: row.blockClampLength.toString() },
  };
}
