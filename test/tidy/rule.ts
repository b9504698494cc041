/** A file of the repository: its path from the root, with slashes, and its text. */
export interface RepositoryFile {
  path: string;
  text: string;
}

/**
 * One rule over single files. `bad` holds examples that it must refuse, `good` near ones that it must let through: a rule
 * that cannot fail protects nothing.
 */
export interface Rule {
  name: string;
  /** What to do instead, in a sentence that the failing test shows. */
  instead: string;
  /** What is wrong in the file, one text an offence. */
  check(file: RepositoryFile): string[];
  bad: readonly RepositoryFile[];
  good?: readonly RepositoryFile[];
}

/** A rule that refuses lines which match a pattern, in files whose path `applies`. */
export function lineRule(
  rule: Omit<Rule, 'check'> & { applies(path: string): boolean; pattern: RegExp },
): Rule {
  const { applies, pattern, ...rest } = rule;
  return {
    ...rest,
    check: ({ path, text }) =>
      applies(path)
        ? text
            .split('\n')
            .flatMap((line, index) =>
              pattern.test(line) ? [`line ${index + 1}: ${line.trim().slice(0, 120)}`] : [],
            )
        : [],
  };
}

export const isSpec = (path: string): boolean => path.endsWith('.spec.ts');
export const isCode = (path: string): boolean => /\.(ts|mjs|js)$/.test(path);
export const isGenerated = (path: string): boolean =>
  path.startsWith('apps/web/src/app/graphql/generated/') ||
  path.startsWith('server/generated/') ||
  path.startsWith('drizzle/migrations/') ||
  path === 'package-lock.json';
/** These rules and their examples name what they forbid. */
export const isTidy = (path: string): boolean => path.startsWith('test/tidy/');
export const isIn = (path: string, ...folders: string[]): boolean =>
  folders.some((folder) => path.startsWith(`${folder}/`));
