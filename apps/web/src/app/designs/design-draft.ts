import { designSchema } from '#shared/designs/design-schema';
import { formatLength, parseLength, type LengthUnit } from '#shared/length/length';
import { lengthSentence } from '#shared/words/length-problems';
import type { DesignInput } from '../graphql/generated/graphql';
import type { FormProblem } from '../ui/problem-list';

/** What stands in the form: lengths as typed, an empty number field as null. */
export interface TypedDesign {
  readonly name: string;
  readonly length: string;
  readonly width: string;
  readonly thickness: string;
  readonly strips: readonly { readonly species: string; readonly width: string }[];
  readonly slices: number | null;
  readonly panelCount: number | null;
  readonly panelBoards: number | null;
  readonly blocksPerBoard: number | null;
  readonly panelClampCount: number | null;
  readonly blockClampCount: number | null;
}

export type DesignDraft =
  | { readonly input: DesignInput; readonly problems: readonly [] }
  | { readonly input: null; readonly problems: readonly FormProblem[] };

/** What was typed, checked as the server will check it. Lengths without a unit are in the shop's. */
export function readDesign(typed: TypedDesign, unit: LengthUnit): DesignDraft {
  const problems: FormProblem[] = [];
  const length = (text: string, field: string): string => {
    const parsed = parseLength(text, unit);
    if (parsed.ok) return String(parsed.length);
    problems.push({ field, sentence: lengthSentence(parsed.problem) });
    return '';
  };
  const draft = {
    name: typed.name,
    length: length(typed.length, 'length'),
    width: length(typed.width, 'width'),
    thickness: length(typed.thickness, 'thickness'),
    strips: typed.strips.map((strip, index) => ({
      species: strip.species,
      width: length(strip.width, `strips.${index}.width`),
    })),
    slices: typed.slices ?? Number.NaN,
    panelCount: typed.panelCount ?? Number.NaN,
    panelBoards: typed.panelBoards ?? Number.NaN,
    blocksPerBoard: typed.blocksPerBoard ?? Number.NaN,
    panelClampCount: typed.panelClampCount ?? Number.NaN,
    blockClampCount: typed.blockClampCount ?? Number.NaN,
  };
  const parsed = designSchema.safeParse(draft);
  for (const issue of parsed.error?.issues ?? []) {
    const field = issue.path.length > 0 ? issue.path.map(String).join('.') : null;
    // A length that could not be read has said so already, and better.
    if (!problems.some((problem) => field !== null && problem.field === field)) {
      problems.push({ field, sentence: issue.message });
    }
  }
  if (!parsed.success || problems.length > 0) return { input: null, problems };
  return { input: { ...draft, name: parsed.data.name }, problems: [] };
}

/** The strips that can be drawn: those whose width can be read and is more than nothing. */
export function drawableStrips(
  strips: TypedDesign['strips'],
  unit: LengthUnit,
): { species: string; width: string }[] {
  return strips.flatMap(({ species, width }) => {
    const parsed = parseLength(width, unit);
    return parsed.ok && parsed.length > 0n ? [{ species, width: String(parsed.length) }] : [];
  });
}

/**
 * What the strips add up to beside the finished width, in words; null while one of them cannot be read. A hint, not a
 * rule: what is over is trimmed off.
 */
export function widthHint(typed: TypedDesign, unit: LengthUnit): string | null {
  const strips = drawableStrips(typed.strips, unit);
  if (strips.length < typed.strips.length || strips.length === 0) return null;
  const sum = strips.reduce((all, strip) => all + BigInt(strip.width), 0n);
  const all = `The strips add up to ${formatLength(sum, unit)}`;
  const width = parseLength(typed.width, unit);
  if (!width.ok) return `${all}.`;
  const blocks = BigInt(Math.max(1, Math.trunc(typed.blocksPerBoard ?? 1)));
  if (sum * blocks >= width.length) return `${all}.`;
  return `${all}, which is less than the finished width of ${formatLength(width.length, unit)}.`;
}
