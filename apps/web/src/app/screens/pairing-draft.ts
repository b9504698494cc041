import type { FormProblem } from '../ui/problem-list';

/** Characters of the code that a display shows. */
export const CODE_LENGTH = 6;

export interface PairingDraft {
  readonly code: string;
  readonly name: string;
  readonly problems: readonly FormProblem[];
}

/** The code as the server wants it: as people read it off a screen, with spaces or small letters, is fine. */
export function readPairing(typed: { readonly code: string; readonly name: string }): PairingDraft {
  const code = typed.code.replace(/[\s-]/g, '').toUpperCase();
  const name = typed.name.trim();
  const problems: FormProblem[] = [];
  if (!new RegExp(`^[0-9A-Z]{${CODE_LENGTH}}$`).test(code)) {
    const sentence = `Enter the ${CODE_LENGTH} letters and digits that the display shows.`;
    problems.push({ field: 'code', sentence });
  }
  if (name === '') {
    problems.push({ field: 'name', sentence: 'Give the display a name, such as glue bench.' });
  }
  return { code, name, problems };
}
