import { isCode, isGenerated, isIn, isSpec, isTidy, lineRule, type Rule } from './rule';

const isPure = (path: string) => isIn(path, 'shared') && isCode(path) && !isSpec(path);
const isOurCode = (path: string) => isCode(path) && !isGenerated(path) && !isTidy(path);

const COLOUR_WORDS =
  'white|black|red|green|blue|yellow|orange|purple|pink|brown|gr[ae]y|silver|gold';
const COLOUR = new RegExp(
  [
    '(?<=[:\'"`(,=]\\s*)#(?:[0-9a-f]{3,4}|[0-9a-f]{6}|[0-9a-f]{8})(?![\\w/-])',
    '\\b(?:rgba?|hsla?|oklch|oklab|hwb)\\(',
    `\\b(?:color|background|background-color|fill|stroke|border[\\w-]*|outline)\\s*[:=]\\s*["']?[^;"']*(?<![\\w-])(?:${COLOUR_WORDS})(?![\\w-])`,
  ].join('|'),
  'i',
);

export const codeRules: readonly Rule[] = [
  lineRule({
    name: 'shared/ has no clock, no chance, no timer and no process',
    instead: 'take the instant or the seed as a parameter',
    applies: isPure,
    pattern:
      /\bDate\.now\(|\bnew Date\(\s*\)|\bMath\.random\b|\bset(?:Timeout|Interval|Immediate)\b|\bqueueMicrotask\b|\bperformance\.|\bprocess\.|\bcrypto\.|\bconsole\./,
    bad: [
      'const now = Date.now();',
      'const now = new Date();',
      'const n = Math.random();',
      'setTimeout(() => x(), 10);',
      'const zone = process.env.TZ;',
    ].map((text) => ({ path: 'shared/time/instant.ts', text })),
    good: [
      { path: 'shared/time/instant.ts', text: 'const date = new Date(instant);' },
      { path: 'shared/time/instant.spec.ts', text: 'const now = Date.now();' },
      { path: 'server/db/uuid.ts', text: 'const now = Date.now();' },
    ],
  }),
  lineRule({
    name: 'every test runs',
    instead: 'mend the test or remove it; one that depends on depth asks DEEP inside',
    applies: (path) => isSpec(path),
    pattern:
      /\b(?:it|test|describe|suite)\.(?:only|skip|todo|skipIf|runIf|fails)\b|\b(?:fit|fdescribe|xit|xdescribe)\(/,
    bad: [
      "it.only('x', () => {});",
      "describe.skip('x', () => {});",
      "it.todo('x');",
      "fit('x');",
    ].map((text) => ({ path: 'shared/a.spec.ts', text })),
    good: [{ path: 'shared/a.spec.ts', text: "it.each([1])('%s', benefit);" }],
  }),
  lineRule({
    name: 'nothing is left for later in a comment',
    instead: 'do it now, or leave it out',
    applies: (path) => !isTidy(path) && !isGenerated(path) && path !== 'DEVELOPERS.md',
    pattern: /(?:\/\/|\*|#|--).*\b(?:TODO|FIXME|XXX|HACK)\b/,
    bad: [{ path: 'server/a.ts', text: '// TODO: check the owner' }],
    good: [{ path: 'server/a.ts', text: "kind: 'TODO'" }],
  }),
  lineRule({
    name: 'types are not silenced',
    instead: 'narrow the value, parse it with a schema, or say why beside an unknown',
    applies: isOurCode,
    pattern: /\bas any\b|@ts-ignore|@ts-nocheck|<any>/,
    bad: [
      { path: 'server/a.ts', text: 'const x = y as any;' },
      { path: 'server/a.ts', text: '// @ts-ignore' },
    ],
    good: [{ path: 'server/a.ts', text: '// as anyone can see' }],
  }),
  lineRule({
    name: 'colours stand in the theme, tones of species in shared/designs',
    instead: "use the theme's variables, so that dark and high contrast follow",
    applies: (path) => isIn(path, 'apps/web/src/app') && !isGenerated(path) && !isSpec(path),
    pattern: COLOUR,
    bad: [
      { path: 'apps/web/src/app/a.scss', text: '  color: #fff;' },
      { path: 'apps/web/src/app/a.scss', text: '  border: 1px solid rgb(0 0 0 / 10%);' },
      { path: 'apps/web/src/app/a.ts', text: "  styles: '.a { background: white }'," },
      { path: 'apps/web/src/app/a.html', text: '<rect fill="#a1b2c3" />' },
    ],
    good: [
      { path: 'apps/web/src/app/a.ts', text: "import { a } from '#shared/floor/face';" },
      { path: 'apps/web/src/app/a.scss', text: '  color: var(--ink); white-space: nowrap;' },
      { path: 'apps/web/src/app/a.ts', text: '  readonly #feed = inject(Feed);' },
      { path: 'apps/web/src/theme/_palette.scss', text: '  --ink: #222;' },
    ],
  }),
  lineRule({
    name: 'events are never changed',
    instead: 'append another event that corrects the first; only a whole shop is ever removed',
    applies: (path) => isIn(path, 'server', 'drizzle', 'shared') && !isSpec(path),
    pattern:
      /\bupdate\s+(?:only\s+)?(?:"?public"?\.)?"?event"?(?![\w"])|\.(?:update|delete)\(event\)/i,
    bad: [
      { path: 'server/a.ts', text: 'await client.query(`update event set data = $1`);' },
      { path: 'drizzle/migrations/0009.sql', text: 'UPDATE "public"."event" SET x = 1;' },
      { path: 'drizzle/migrations/0009.sql', text: 'update public.event set x = 1;' },
      { path: 'server/a.ts', text: 'await tx.update(event).set({ data });' },
    ],
    good: [
      { path: 'server/a.ts', text: 'await tx.insert(event).values(fact);' },
      { path: 'server/a.ts', text: 'update event_cursor set seq = $1' },
    ],
  }),
];
