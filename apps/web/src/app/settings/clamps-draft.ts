import { formatLength, parseLength, type LengthUnit } from '#shared/length/length';
import { clampsSchema, type ClampsInput } from '#shared/shop/clamps-schema';
import { lengthSentence } from '#shared/words/length-problems';
import type { FormProblem } from '../ui/problem-list';

/** One line of the form. `id` names its inputs; the rest is what it began with. */
export interface ClampRow {
  readonly id: string;
  readonly key: string | null;
  /** Nanometres, as the API gave them; null on a new line. */
  readonly stored: string | null;
  readonly length: string;
  readonly count: string;
}

export interface ClampsDraft {
  readonly clamps: ClampsInput;
  /** Fields are `0.length`, `2.count`; about all of them together: null. */
  readonly problems: readonly FormProblem[];
}

/** Each filling of the form has a number of its own, so that no input keeps what was typed before it. */
export function clampRows(
  clamps: readonly { readonly key: string; readonly length: string; readonly count: number }[],
  unit: LengthUnit,
  filling: number,
): ClampRow[] {
  return clamps.map(({ key, length, count }, index) => ({
    id: `${filling}-${index}`,
    key,
    stored: length,
    length: formatLength(BigInt(length), unit),
    count: String(count),
  }));
}

/** What was typed, checked as the server will check it. `read` gives the text of an input by its name. */
export function readClamps(
  rows: readonly ClampRow[],
  unit: LengthUnit,
  read: (name: string) => string,
): ClampsDraft {
  const problems: FormProblem[] = [];
  const clamps = rows.map((row, index) => {
    const count = read(`count-${row.id}`).trim();
    return {
      key: row.key,
      length: readLength(row, unit, read(`length-${row.id}`), (sentence) =>
        problems.push({ field: `${index}.length`, sentence }),
      ),
      count: /^\d{1,6}$/.test(count) ? Number(count) : Number.NaN,
    };
  });
  const parsed = clampsSchema.safeParse(clamps);
  for (const issue of parsed.error?.issues ?? []) {
    const field = issue.path.length > 0 ? issue.path.map(String).join('.') : null;
    // A length that could not be read has said so already, and better.
    if (!problems.some((problem) => field !== null && problem.field === field)) {
      problems.push({ field, sentence: issue.message });
    }
  }
  return { clamps, problems };
}

function readLength(
  row: ClampRow,
  unit: LengthUnit,
  text: string,
  complain: (sentence: string) => void,
): string {
  // Left as it was shown: the stored length stays, even where the shown one was rounded.
  if (row.stored !== null && text === row.length) return row.stored;
  const parsed = parseLength(text, unit);
  if (parsed.ok) return String(parsed.length);
  complain(lengthSentence(parsed.problem));
  return '';
}
