/** What kept a command from being carried out; the API's Problem. */
export interface Problem {
  code: string;
  field: string | null;
  sentence: string;
}

export function problem(code: string, sentence: string, field: string | null = null): Problem {
  return { code, field, sentence };
}

/** A parse result of zod, as far as problems need it. */
interface Issues {
  error: { issues: readonly { path: readonly PropertyKey[]; message: string }[] };
}

/**
 * One problem for each field that a schema found something wrong with: the first, as those that follow tend to follow from
 * it. `root` is the argument's name where the schema is of its value.
 */
export function inputProblems(failed: Issues, root?: string): Problem[] {
  const byField = new Map<string, Problem>();
  for (const issue of failed.error.issues) {
    const field = [...(root === undefined ? [] : [root]), ...issue.path.map(String)].join('.');
    if (!byField.has(field)) {
      byField.set(field, problem('INVALID_INPUT', issue.message, field || null));
    }
  }
  return [...byField.values()];
}
