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

/** One problem for each thing that a schema found wrong; `root` is the argument's name where the schema is of its value. */
export function inputProblems(failed: Issues, root?: string): Problem[] {
  return failed.error.issues.map((issue) => {
    const path = [...(root === undefined ? [] : [root]), ...issue.path.map(String)];
    return problem('INVALID_INPUT', issue.message, path.join('.') || null);
  });
}
