import path from 'node:path';
import ts from 'typescript';
import { isCode, isGenerated, isIn, isSpec, type RepositoryFile, type Rule } from './rule';

/** Where an import leads: a path in the repository, or a package's name. */
interface Import {
  specifier: string;
  /** Null for a package. */
  place: string | null;
}

export function importsOf({ path: from, text }: RepositoryFile): Import[] {
  return ts.preProcessFile(text, true, true).importedFiles.map(({ fileName }) => {
    if (fileName.startsWith('#')) return { specifier: fileName, place: fileName.slice(1) };
    if (fileName.startsWith('.')) {
      return { specifier: fileName, place: path.posix.join(path.posix.dirname(from), fileName) };
    }
    return { specifier: fileName, place: null };
  });
}

/** A rule over the imports of the code files whose path `applies`. */
function importRule(
  rule: Omit<Rule, 'check'> & {
    applies(path: string): boolean;
    allows(target: Import, from: string): boolean;
  },
): Rule {
  const { applies, allows, ...rest } = rule;
  return {
    ...rest,
    check: (file) =>
      isCode(file.path) && !isGenerated(file.path) && applies(file.path)
        ? importsOf(file)
            .filter((target) => !allows(target, file.path))
            .map((target) => `imports ${target.specifier}`)
        : [],
  };
}

const one = (file: string, specifier: string): RepositoryFile => ({
  path: file,
  text: `import { x } from '${specifier}';\n`,
});

const CHECKER = 'shared/plan/check';
const MODEL = 'shared/plan/model';

export const importRules: readonly Rule[] = [
  importRule({
    name: 'the app knows shared/ and its generated documents only',
    instead: 'ask the server through a GraphQL document, or move what both need to shared/',
    applies: (file) => isIn(file, 'apps/web'),
    allows: ({ place }) => place === null || !isIn(place, 'server', 'drizzle', 'test'),
    bad: [
      one('apps/web/src/app/floor/floor.ts', '#server/floor/load'),
      one('apps/web/src/app/floor/floor.ts', '#drizzle/tables/batch'),
      one('apps/web/src/app/floor/floor.ts', '../../../../../server/floor/load'),
      { path: 'apps/web/src/app/a.ts', text: "const x = await import('#server/floor/load');" },
    ],
    good: [one('apps/web/src/app/floor/floor.ts', '#shared/floor/judge')],
  }),
  importRule({
    name: 'shared/ stands on nothing but itself',
    instead: 'pass in what is needed; zod is for *-schema.ts files, tests may use what they like',
    applies: (file) => isIn(file, 'shared') && !isSpec(file),
    allows: ({ specifier, place }, from) =>
      place !== null ? isIn(place, 'shared') : specifier === 'zod' && from.endsWith('-schema.ts'),
    bad: [
      one('shared/floor/judge.ts', 'luxon'),
      one('shared/floor/judge.ts', 'node:crypto'),
      one('shared/floor/judge.ts', 'zod'),
      one('shared/floor/judge.ts', '#server/db/pool'),
      one('shared/floor/judge.ts', '../../server/db/pool'),
    ],
    good: [
      one('shared/shop/hours-schema.ts', 'zod'),
      one('shared/floor/judge.ts', './model'),
      one('shared/floor/judge.spec.ts', 'luxon'),
    ],
  }),
  importRule({
    name: 'the server and its tables never look into the app',
    instead: 'move what both need to shared/',
    applies: (file) => isIn(file, 'server', 'drizzle'),
    allows: ({ place }) => place === null || !isIn(place, 'apps'),
    bad: [one('server/http/app.ts', '../../apps/web/src/app/app.routes')],
    good: [one('server/http/app.ts', '#shared/words/sentence')],
  }),
  importRule({
    name: 'the product never imports its tests',
    instead: 'move what the product needs out of test/',
    applies: (file) => isIn(file, 'server', 'drizzle', 'shared', 'apps') && !isSpec(file),
    allows: ({ place }) => place === null || !isIn(place, 'test'),
    bad: [one('server/demo/seed.ts', '#test/factories/batch')],
    good: [one('server/demo/seed.api.spec.ts', '#test/database')],
  }),
  importRule({
    name: 'the checker of plans shares only the model with the planner',
    instead: 'write it again from the rule: a checker that calls the planner repeats its mistakes',
    applies: (file) => isIn(file, CHECKER) && !isSpec(file),
    allows: ({ place }) =>
      place === null || !isIn(place, 'shared/plan') || place === MODEL || isIn(place, CHECKER),
    bad: [
      one('shared/plan/check/check.ts', '../forward'),
      one('shared/plan/check/check.ts', '#shared/plan/forward'),
    ],
    good: [
      one('shared/plan/check/check.ts', '../model'),
      one('shared/plan/check/check.ts', './capacity'),
      one('shared/plan/check/check.ts', '#shared/time/instant'),
    ],
  }),
  importRule({
    name: 'the planner does not lean on its checker',
    instead:
      'let shared/plan/plan-shop call both: it makes a plan and keeps it only when it is right',
    applies: (file) =>
      isIn(file, 'shared/plan') &&
      !isIn(file, CHECKER) &&
      !isSpec(file) &&
      file !== 'shared/plan/plan-shop.ts',
    allows: ({ place }) => place === null || !isIn(place, CHECKER),
    bad: [one('shared/plan/forward.ts', './check/check')],
    good: [
      one('shared/plan/forward.spec.ts', './check/check'),
      one('shared/plan/plan-shop.ts', './check/check'),
    ],
  }),
];
