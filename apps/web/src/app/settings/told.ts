import type { FormProblem } from '../ui/problem-list';

/** What a form says about the last attempt to save it. */
export interface Told<Newer = unknown> {
  readonly problems: readonly FormProblem[];
  readonly saved?: boolean;
  /** What somebody else saved meanwhile, when that is why this was refused. */
  readonly newer?: Newer | null;
}

/** Problems with paths as the form has them, whether or not the server puts the argument's name before them. */
export function underRoot(problems: readonly FormProblem[], root: string): FormProblem[] {
  return problems.map(({ field, sentence }) => ({
    sentence,
    field: field === root ? null : (field?.replace(new RegExp(`^${root}\\.`), '') ?? null),
  }));
}

/** Whether somebody else was quicker. */
export function isConflict(problems: readonly { readonly code: string }[]): boolean {
  return problems.some((problem) => problem.code === 'VERSION_CONFLICT');
}
