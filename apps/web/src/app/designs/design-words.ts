import { formatAmount, formatLength, type LengthUnit } from '#shared/length/length';
import { speciesName } from '#shared/designs/species';
import type { DesignFieldsFragment } from '../graphql/generated/graphql';

/** "400 × 280 × 38 mm": along the slices, across them, thick. */
export function sizeWords(
  design: Pick<DesignFieldsFragment, 'length' | 'width' | 'thickness'>,
  unit: LengthUnit,
): string {
  const length = formatAmount(BigInt(design.length), unit);
  const width = formatAmount(BigInt(design.width), unit);
  return `${length} × ${width} × ${formatLength(BigInt(design.thickness), unit)}`;
}

/** "10 slices of maple 40, walnut 25.4, maple 40 mm"; strips that follow one another alike are said once: "3 × maple 40". */
export function stripWords(
  design: Pick<DesignFieldsFragment, 'slices' | 'strips'>,
  unit: LengthUnit,
): string {
  const groups: { count: number; words: string }[] = [];
  for (const strip of design.strips) {
    const words = `${speciesName(strip.species)} ${formatAmount(BigInt(strip.width), unit)}`;
    const last = groups.at(-1);
    if (last?.words === words) last.count += 1;
    else groups.push({ count: 1, words });
  }
  const strips = groups.map(({ count, words }) => (count === 1 ? words : `${count} × ${words}`));
  const slices = design.slices === 1 ? '1 slice' : `${design.slices} slices`;
  return `${slices} of ${strips.join(', ')} ${unit === 'INCH' ? 'in' : 'mm'}`;
}

/** "1 panel for 4 boards"; with more than one block a board also that. */
export function panelWords(
  design: Pick<DesignFieldsFragment, 'panelCount' | 'panelBoards' | 'blocksPerBoard'>,
): string {
  const panels = design.panelCount === 1 ? '1 panel' : `${design.panelCount} panels`;
  const boards = design.panelBoards === 1 ? 'each board' : `${design.panelBoards} boards`;
  const blocks = design.blocksPerBoard === 1 ? '' : `, ${design.blocksPerBoard} blocks a board`;
  return `${panels} for ${boards}${blocks}`;
}

/** "6 from 300 mm on"; "none" when it takes none. */
export function clampWords(
  need: { readonly count: number; readonly length: string },
  unit: LengthUnit,
): string {
  if (need.count === 0) return 'none';
  return `${need.count} from ${formatLength(BigInt(need.length), unit)} on`;
}
