import path from 'node:path';
import { isGenerated, isTidy, lineRule, type Rule } from './rule';

const VAGUE = /^(?:utils?|helpers?|common|misc|stuff|lib|functions?|shared-utils)$/i;

/** What may stand at the root. A new entry is a decision that DEVELOPERS.md explains. */
const ROOT = new Set([
  ...['.ci', '.gitignore', '.npmrc', '.prettierignore', 'DEVELOPERS.md', 'README.md'],
  ...['angular.json', 'apps', 'codegen.ts', 'drizzle', 'package-lock.json', 'package.json'],
  ...['schema', 'server', 'shared', 'test', 'tsconfig.json'],
]);

const LONGEST = 400;
const hasLimit = (file: string) =>
  /\.(ts|mjs|js|html|scss|graphql)$/.test(file) && !isGenerated(file);

export const textRules: readonly Rule[] = [
  {
    name: 'files are short',
    instead: `split it by what its parts are about: ${LONGEST} lines is the most, 200 the aim`,
    check: (file) => {
      const lines = file.text.split('\n').length - 1;
      return hasLimit(file.path) && lines > LONGEST ? [`${lines} lines`] : [];
    },
    bad: [{ path: 'server/a.ts', text: 'x;\n'.repeat(LONGEST + 1) }],
    good: [
      { path: 'server/a.ts', text: 'x;\n'.repeat(LONGEST) },
      { path: 'server/generated/schema.ts', text: 'x;\n'.repeat(LONGEST + 1) },
    ],
  },
  {
    name: 'names say what is inside',
    instead: 'name the file or folder after what it does',
    check: (file) =>
      file.path
        .split('/')
        .map((part) => part.replace(/\..*$/, ''))
        .filter((part) => VAGUE.test(part))
        .map((part) => `"${part}" says nothing`),
    bad: [
      { path: 'server/utils.ts', text: '' },
      { path: 'shared/helpers/round.ts', text: '' },
      { path: 'apps/web/src/app/common/a.html', text: '' },
    ],
    good: [{ path: 'server/work/plan-worker.ts', text: '' }],
  },
  {
    name: 'no barrels',
    instead: 'import from the file that holds it',
    check: (file) =>
      path.posix.basename(file.path) === 'index.ts' && !isGenerated(file.path)
        ? ['an index.ts passes on what others hold']
        : [],
    bad: [{ path: 'shared/floor/index.ts', text: '' }],
    good: [{ path: 'apps/web/src/app/graphql/generated/index.ts', text: '' }],
  },
  {
    name: 'the root stays small',
    instead: 'put it into the room it belongs to',
    check: (file) => {
      const top = file.path.split('/')[0] ?? '';
      return ROOT.has(top) ? [] : [`"${top}" is not one of the root's entries`];
    },
    bad: [
      { path: 'docs/a.md', text: '' },
      { path: '.env', text: '' },
    ],
    good: [{ path: 'server/main.ts', text: '' }],
  },
  lineRule({
    name: 'nothing tells of the machine it was written on',
    instead: "use a path from the repository's root, an environment variable or os.tmpdir()",
    applies: (file) => !isTidy(file),
    pattern:
      /(?<![\w.~-])\/(?:work|root|home)\/[\w.]|\/tmp\/\w|\bregistry\.npmjs\.org|\b(?:deb|security)\.debian\.org|\bnpm\.pkg\.github/,
    bad: [
      '/work/main/server',
      '/root/.npmrc',
      '/home/someone/shop',
      'https://registry.npmjs.org/zod',
      '/tmp/log',
    ].map((text) => ({ path: 'README.md', text })),
    good: [
      { path: 'README.md', text: 'server/work/plan-worker.ts' },
      { path: 'README.md', text: 'import x from "#server/work/relay"' },
      { path: 'README.md', text: 'import x from "../work/relay"' },
    ],
  }),
];
